import { liveBlock } from '../live-block';

/** The finished box inside and outside. */
export const SizeSummary = liveBlock('sizeSummary', 'data-size-summary', 'Sizes');
