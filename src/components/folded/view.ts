import { drawFolded, usualTurn, USUAL_TILT, type Figures, type Model } from '@/engine';
import { drawingSvg } from '@/exports/svg/drawing';

/** How a reader has the box before them. */
export interface FoldedState {
  /** Degrees about the upright axis, from -180 to 180. */
  readonly turn: number;
  /** Degrees looked down from above. */
  readonly tilt: number;
  /** Share of every fold, 0 flat to 1 closed. */
  readonly share: number;
  readonly seeThrough: boolean;
  readonly names: boolean;
}
/** Drawing units. */
export interface FoldedSize {
  readonly width: number;
  readonly height: number;
}

/** Names of the form's fields, which stand in an address beside those of the size. */
export const FIELD = {
  turn: 'view-turn',
  fold: 'view-fold',
  seeThrough: 'view-through',
  names: 'view-names',
  from: 'view-from',
} as const;

export const FROM_SIDES = [
  { side: 'front', label: 'Front', turn: 0, tilt: 12 },
  { side: 'back', label: 'Back', turn: 180, tilt: 12 },
  { side: 'above', label: 'From above', turn: 0, tilt: 80 },
] as const;

export const usualState = (model: Model): FoldedState => ({
  turn: usualTurn(model),
  tilt: USUAL_TILT,
  share: 1,
  seeThrough: false,
  names: false,
});

/** What the form says without JavaScript; what does not read is as usual. */
export function readState(model: Model, params: URLSearchParams): FoldedState {
  const usual = usualState(model);
  const from = FROM_SIDES.find(({ side }) => side === params.get(FIELD.from));
  const number = (name: string, least: number, most: number): number | null => {
    const text = params.get(name);
    const value = Number(text);
    return text === null || text === '' || !(value >= least && value <= most) ? null : value;
  };
  const fold = number(FIELD.fold, 0, 100);
  return {
    turn: from?.turn ?? number(FIELD.turn, -180, 180) ?? usual.turn,
    tilt: from?.tilt ?? usual.tilt,
    share: fold === null ? usual.share : fold / 100,
    seeThrough: params.has(FIELD.seeThrough),
    names: params.has(FIELD.names),
  };
}

export function viewSvg(model: Model, figures: Figures, state: FoldedState, size: FoldedSize): string {
  const { turn, tilt, share, seeThrough, names } = state;
  const drawing = drawFolded(model, figures, { ...size, turn, tilt, share, seeThrough, labels: names, steady: true });
  return drawingSvg(drawing, { class: 'folded' });
}
