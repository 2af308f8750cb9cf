import {
  compilePattern,
  evaluate,
  showValue,
  STOCKS,
  sweep,
  type Figures,
  type Model,
  type Pattern,
  type Sizing,
} from '@/engine';
import type { ProofItem } from './proof';

/** What came of trying sizes all over the range. */
export interface RangeCheck {
  readonly tried: number;
  readonly failing: number;
  /** Why the first one cannot be made, and which measure it is about; null when all can. */
  readonly first: { readonly measure: string; readonly sentence: string; readonly size: string } | null;
  /** Pieces that fit no common sheet at the size shown first, and those that outgrow them at the largest sizes. */
  readonly outgrown: readonly { readonly piece: string; readonly when: 'shown' | 'largest' }[];
}

/** Sheets that makers have at home; whatever fits one of them, either way round, can be cut. */
const COMMON = [STOCKS['12x12in'], STOCKS.a4, STOCKS.letter];
const SIZES = 160;

/** Tries sizes all over the range of a pattern; null while it does not read. Takes up to a second: not while someone types. */
export function checkRange(pattern: Pattern, sizing: Sizing): RangeCheck | null {
  const compiled = compilePattern(pattern);
  if (!compiled.ok) return null;
  const model = compiled.value;
  const { tried, failing, first, works } = sweep(model, sizing, { count: SIZES });
  const shown = outgrow(evaluate(model, sizing));
  const largest = Object.entries(works).flatMap(([name, { to }]) =>
    outgrow(evaluate(model, { ...sizing, values: { ...sizing.values, [name]: to } })),
  );
  return {
    tried,
    failing,
    first: first && {
      measure: first.problem.measure,
      sentence: first.problem.sentence,
      size: sizeOf(model, first.sizing),
    },
    outgrown: [
      ...shown.map((piece) => ({ piece, when: 'shown' as const })),
      ...[...new Set(largest)]
        .filter((piece) => !shown.includes(piece))
        .map((piece) => ({ piece, when: 'largest' as const })),
    ],
  };
}

function outgrow({ pieces }: Figures): readonly string[] {
  return pieces
    .filter(({ stock, across, along, count }) => {
      if (stock === 'greyboard' || count === 0) return false;
      const [small, large] = [Math.min(across, along), Math.max(across, along)];
      return !COMMON.some(
        (sheet) => small <= Math.min(sheet.across, sheet.along) && large <= Math.max(sheet.across, sheet.along),
      );
    })
    .map(({ name }) => name);
}

/** "inside width 2 in, inside height 10 in" */
function sizeOf(model: Model, sizing: Sizing): string {
  const { measures } = evaluate(model, sizing);
  return measures
    .filter(({ asked, inUse, set }) => asked && inUse && set)
    .slice(0, 4)
    .map(
      ({ name, cut, kind, unit }) =>
        `${name} ${showValue(cut, kind, { units: sizing.units, grid: sizing.grid, unit }).text}`,
    )
    .join(', ');
}

/** What of it is worth a look, for the proof list. */
export function rangeItems({ tried, failing, first, outgrown }: RangeCheck): readonly ProofItem[] {
  const fails: ProofItem[] =
    first === null
      ? []
      : [
          {
            code: 'range fails',
            blocking: false,
            title: `${failing} of ${tried} sizes tried cannot be made`,
            detail: `The first is ${first.size}: ${first.sentence} Narrow the range, or change what is in the way.`,
            place: {
              column: 'measures',
              label: first.measure === '' ? 'Measures' : `Measures · ${first.measure}`,
              ...(first.measure === '' ? {} : { name: first.measure }),
            },
          },
        ];
  return [
    ...fails,
    ...outgrown.map(
      ({ piece, when }): ProofItem => ({
        code: 'outgrows',
        blocking: false,
        title:
          when === 'shown' ? `${piece} fits no common sheet` : `${piece} outgrows common sheets at the largest sizes`,
        detail:
          'Neither 12 × 12 in nor A4 nor Letter takes it whole. Say that it needs a larger sheet, or draw it in two parts.',
        place: { column: 'pieces', label: `Pieces · ${piece}`, name: piece },
      }),
    ),
  ];
}
