import type { EditingDesk } from '../../editor/editing-desk';
import { sheetPlanInside } from '../../render-blocks';
import { usualPlan } from '../../usual-plan';
import { liveBlockView } from '../live-block';

export const sheetPlanView = (desk: EditingDesk) =>
  liveBlockView(desk, {
    className: 'live-block sheet-plan',
    words: 'The sheet plan',
    inside: ({ figures }) => sheetPlanInside(figures, usualPlan(figures)),
  });
