import type { Extensions } from '@tiptap/core';
import { showLive, type LiveText } from '../live';
import { Amount } from '../nodes/amount/schema';
import { amountView } from '../nodes/amount/view';
import { Amounts } from '../nodes/amounts/schema';
import { amountsView } from '../nodes/amounts/view';
import { Caution } from '../nodes/caution/schema';
import { cautionView } from '../nodes/caution/view';
import { Correction } from '../nodes/correction/schema';
import { correctionView } from '../nodes/correction/view';
import { CurveTemplate } from '../nodes/curve-template/schema';
import { curveTemplateView } from '../nodes/curve-template/view';
import { CutList } from '../nodes/cut-list/schema';
import { cutListView } from '../nodes/cut-list/view';
import { FoldedViewBlock } from '../nodes/folded-view/schema';
import { foldedViewView } from '../nodes/folded-view/view';
import { Forward } from '../nodes/forward/schema';
import { forwardView } from '../nodes/forward/view';
import { Materials } from '../nodes/materials/schema';
import { materialsView } from '../nodes/materials/view';
import { Measure } from '../nodes/measure/schema';
import { measureView } from '../nodes/measure/view';
import { Photo } from '../nodes/photo/schema';
import { photoView } from '../nodes/photo/view';
import { PieceCard } from '../nodes/piece-card/schema';
import { pieceCardView } from '../nodes/piece-card/view';
import { SheetPlanBlock } from '../nodes/sheet-plan/schema';
import { sheetPlanView } from '../nodes/sheet-plan/view';
import { SizeSummary } from '../nodes/size-summary/schema';
import { sizeSummaryView } from '../nodes/size-summary/view';
import { StepRef } from '../nodes/step-ref/schema';
import { stepRefView } from '../nodes/step-ref/view';
import { Step } from '../nodes/step/schema';
import { stepView } from '../nodes/step/view';
import { Tip } from '../nodes/tip/schema';
import { tipView } from '../nodes/tip/view';
import { Tools } from '../nodes/tools/schema';
import { toolsView } from '../nodes/tools/view';
import { ownNodes, plainText } from '../schema';
import { blockKeys } from './block-keys';
import type { EditingDesk } from './editing-desk';
import { emptyHints } from './empty-hints';
import { find } from './find';
import { measureKeys } from './measure-keys';
import { photoUploads } from './photo-uploads';
import type { SendPicture } from './send-picture';
import { strayNumbers } from './stray-numbers';
import { tableKeys } from './table-keys';

/** The schema's nodes with their views in place of those without, and the editor's keys; `own` are those that keep something for the desk. */
export function editorExtensions(desk: EditingDesk, send: SendPicture, own: Extensions): Extensions {
  const viewed: Extensions = [
    Step.extend({ addNodeView: () => stepView(desk) }),
    Measure.extend({
      addNodeView: () => measureView(desk),
      renderText: ({ node }) => shownText(desk, node.attrs as LiveText),
    }),
    StepRef.extend({ addNodeView: () => stepRefView(desk) }),
    PieceCard.extend({ addNodeView: () => pieceCardView(desk) }),
    CutList.extend({ addNodeView: () => cutListView(desk) }),
    Photo.extend({ addNodeView: () => photoView(desk) }),
    Tip.extend({ addNodeView: () => tipView() }),
    Caution.extend({ addNodeView: () => cautionView() }),
    Correction.extend({ addNodeView: () => correctionView() }),
    Forward.extend({ addNodeView: () => forwardView(desk) }),
    Materials.extend({ addNodeView: () => materialsView() }),
    Tools.extend({ addNodeView: () => toolsView() }),
    Amount.extend({ addNodeView: () => amountView(desk) }),
    Amounts.extend({ addNodeView: () => amountsView(desk) }),
    SheetPlanBlock.extend({ addNodeView: () => sheetPlanView(desk) }),
    CurveTemplate.extend({ addNodeView: () => curveTemplateView(desk) }),
    FoldedViewBlock.extend({ addNodeView: () => foldedViewView(desk) }),
    SizeSummary.extend({ addNodeView: () => sizeSummaryView(desk) }),
  ];
  const names = new Set(viewed.map(({ name }) => name));
  return [
    plainText,
    ...ownNodes.filter(({ name }) => !names.has(name)),
    ...viewed,
    measureKeys(desk),
    blockKeys,
    tableKeys,
    find,
    emptyHints,
    strayNumbers(desk),
    photoUploads({ send, say: desk.say }),
    ...own,
  ];
}

/** What a measure is when it is copied as plain text: the figure, as one would type it. */
function shownText(desk: EditingDesk, text: LiveText): string {
  const live = desk.figures.get();
  return (live && showLive(live, text)?.text) ?? text.formula;
}
