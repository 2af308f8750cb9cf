import type { EditingDesk } from '../../editor/editing-desk';
import { sizesInside } from '../../render-blocks';
import { liveBlockView } from '../live-block';

export const sizeSummaryView = (desk: EditingDesk) =>
  liveBlockView(desk, {
    className: 'live-block size-summary',
    words: 'The sizes',
    inside: ({ figures }) => sizesInside(figures),
  });
