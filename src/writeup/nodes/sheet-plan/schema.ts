import { liveBlock } from '../live-block';

/** How the pieces lie on the sheets. */
export const SheetPlanBlock = liveBlock('sheetPlan', 'data-sheet-plan', 'Sheet plan');
