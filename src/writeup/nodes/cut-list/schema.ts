import { liveBlock } from '../live-block';

/** Every piece with its count, size and scores, in one table. */
export const CutList = liveBlock('cutList', 'data-cut-list', 'Cut list');
