import { liveBlock } from '../live-block';

/** The finished box. */
export const FoldedViewBlock = liveBlock('foldedView', 'data-folded-view', 'Folded');
