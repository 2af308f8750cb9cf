import { liveBlock } from '../live-block';

/** Sheets, paper, glue and what else the box takes, in one list. */
export const Amounts = liveBlock('amounts', 'data-amounts', 'What it takes');
