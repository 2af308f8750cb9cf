/** The geometry engine's public door. Everything outside `src/engine` imports from here and from nowhere deeper. */
import { defaultGrid } from './measure';
import { sizingOf, type Model } from './model';
import type { GridId, Sizing, Unit } from './types';

export type * from './types';
export { explain, explainAt, FUNCTION_NAMES, nearestName } from './formula';
export * from './measure';
export { areaOf, boundsOf, lengthOf, perimeterOf, pointsOf } from './net';
export { isName, keyOf } from './pattern/names';
export {
  cleanName,
  nameFault,
  renamedBack,
  renameInFormula,
  renameInPattern,
  renameInSizing,
  type Rename,
} from './pattern/rename';
export { formulasOfPattern, formulasOfPiece } from './pattern/texts';
export { instructionsOf, panelNames, readCell, type Cell } from './piece';
export {
  around,
  compileLive,
  compilePattern,
  evaluate,
  largest,
  openModel,
  orderOf,
  sealFormula,
  sealModel,
  sweep,
  workExact,
  workOut,
  type LiveMeasure,
  type Model,
  type SealedFormula,
  type SealedModel,
  type Solved,
  type Sweep,
} from './model';
export {
  cutsInWords,
  foldsRun,
  helpWithTooLarge,
  joinAt,
  joiningInWords,
  partings,
  planning,
  planSheets,
  stockOf,
  STOCKS,
  type Planned,
  type PlanOptions,
  type PlanProgress,
  type SheetPlan,
  type Stock,
  type StockId,
} from './sheet';
export {
  drawFolded,
  drawPiece,
  drawSheet,
  foldedExtent,
  usualTurn,
  USUAL_TILT,
  say,
  sayParts,
  showPosition,
  type FoldedDrawingOptions,
  type PieceDrawingOptions,
  type SaidPart,
} from './drawing';

/** A sizing with nothing answered: the usual size of the pattern, in these units, on their usual cut grid. */
export const usualSizing = (model: Model, units: Unit = 'in', grid: GridId = defaultGrid(units)): Sizing =>
  sizingOf(model, units, grid);
