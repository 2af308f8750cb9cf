import type { EditingDesk } from '../../editor/editing-desk';
import { amountsInside } from '../../render-blocks';
import { usualPlan } from '../../usual-plan';
import { liveBlockView } from '../live-block';

export const amountsView = (desk: EditingDesk) =>
  liveBlockView(desk, {
    className: 'live-block amounts',
    words: 'What it takes',
    inside: ({ figures }) => amountsInside(figures, usualPlan(figures)),
  });
