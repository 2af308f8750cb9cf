import type { Extensions } from '@tiptap/core';
import { showLive, type LiveText } from '../live';
import { Caution } from '../nodes/caution/schema';
import { cautionView } from '../nodes/caution/view';
import { CutList } from '../nodes/cut-list/schema';
import { cutListView } from '../nodes/cut-list/view';
import { Materials } from '../nodes/materials/schema';
import { materialsView } from '../nodes/materials/view';
import { Measure } from '../nodes/measure/schema';
import { measureView } from '../nodes/measure/view';
import { Photo } from '../nodes/photo/schema';
import { photoView } from '../nodes/photo/view';
import { PieceCard } from '../nodes/piece-card/schema';
import { pieceCardView } from '../nodes/piece-card/view';
import { StepRef } from '../nodes/step-ref/schema';
import { stepRefView } from '../nodes/step-ref/view';
import { Step } from '../nodes/step/schema';
import { stepView } from '../nodes/step/view';
import { Tip } from '../nodes/tip/schema';
import { tipView } from '../nodes/tip/view';
import { ownNodes, plainText } from '../schema';
import { blockKeys } from './block-keys';
import type { EditingDesk } from './editing-desk';
import { emptyHints } from './empty-hints';
import { measureKeys } from './measure-keys';
import { photoUploads } from './photo-uploads';
import type { SendPicture } from './send-picture';

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
    Photo.extend({ addNodeView: () => photoView() }),
    Tip.extend({ addNodeView: () => tipView() }),
    Caution.extend({ addNodeView: () => cautionView() }),
    Materials.extend({ addNodeView: () => materialsView() }),
  ];
  const names = new Set(viewed.map(({ name }) => name));
  return [
    plainText,
    ...ownNodes.filter(({ name }) => !names.has(name)),
    ...viewed,
    measureKeys(desk),
    blockKeys,
    emptyHints,
    photoUploads({ send, say: desk.say }),
    ...own,
  ];
}

/** What a measure is when it is copied as plain text: the figure, as one would type it. */
function shownText(desk: EditingDesk, text: LiveText): string {
  const live = desk.figures.get();
  return (live && showLive(live, text)?.text) ?? text.formula;
}
