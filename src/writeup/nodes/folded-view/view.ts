import type { EditingDesk } from '../../editor/editing-desk';
import { foldedInside } from '../../folded-block';
import { liveBlockView } from '../live-block';

export const foldedViewView = (desk: EditingDesk) =>
  liveBlockView(desk, { className: 'live-block folded-view', words: 'The folded box', inside: foldedInside });
