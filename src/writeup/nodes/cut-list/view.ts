import type { EditingDesk } from '../../editor/editing-desk';
import { cutListInside } from '../../render-figures';
import { liveBlockView } from '../live-block';

export const cutListView = (desk: EditingDesk) =>
  liveBlockView(desk, {
    className: 'cut-list',
    words: 'The cut list',
    inside: ({ figures }) => cutListInside(figures),
  });
