import { compileLive, showValue, type Fault, type MeasureFigure } from '@/engine';
import type { LiveFigures } from '../live';

/** One line of the measure field's list. */
export interface MeasureOption {
  readonly formula: string;
  /** As the reader will see it; null when it has no answer at this size. */
  readonly shown: string | null;
  readonly is: 'asked' | 'worked' | 'formula';
  /** The text that goes on in the field instead of into the write-up: a name being completed inside a formula. */
  readonly completes?: string;
}
export interface MeasureOptions {
  readonly options: readonly MeasureOption[];
  /** Why what is typed is no formula, when no name fits it either. */
  readonly fault: Fault | null;
}

/**
 * What the typed text may mean: measures whose name holds it, or whose figure is it; itself, when it reads as a formula;
 * and, inside a formula, names that go on from its last word. The first option is the one that Enter takes.
 */
export function measureOptions({ model, figures }: LiveFigures, typed: string, bare: boolean): MeasureOptions {
  const query = typed.trim();
  const { units, grid } = figures.sizing;
  const show = ({ cut, kind, unit }: Pick<MeasureFigure, 'cut' | 'kind' | 'unit'>) =>
    Number.isFinite(cut) ? showValue(cut, kind, { units, grid, unit, bare }) : null;
  const measures = figures.measures.filter(({ kind }) => kind !== 'choice' && kind !== 'yes/no');
  const option = (measure: MeasureFigure): MeasureOption => ({
    formula: measure.name,
    shown: show(measure)?.typeset ?? null,
    is: measure.asked ? 'asked' : 'worked',
  });
  if (query === '') return { options: measures.map(option), fault: null };

  const wanted = query.toLowerCase();
  const ranked = measures
    .map((measure) => ({
      measure,
      rank: Math.min(rankOf(measure.name.toLowerCase(), wanted), figureRank(show(measure)?.text, wanted)),
    }))
    .filter(({ rank }) => rank < NONE)
    .sort((a, b) => a.rank - b.rank);
  const named = ranked.map(({ measure }) => option(measure));

  const compiled = compileLive(model, query);
  const exact = ranked[0]?.rank === 0;
  if (compiled.ok && !exact) {
    const { kind, unit } = compiled.value;
    const value = compiled.value.value(figures);
    const shown = value ? (showValue(value.cut, kind, { units, grid, unit, bare }).typeset ?? null) : null;
    const itself: MeasureOption = { formula: query, shown, is: 'formula' };
    // A bare figure is more likely meant to find the measure that has it than to be typed in a roundabout way.
    return { options: compiled.value.uses.length === 0 ? [...named, itself] : [itself, ...named], fault: null };
  }
  const completions = compiled.ok
    ? []
    : goingOn(typed, measures).map(
        (measure): MeasureOption => ({ ...option(measure), completes: completed(typed, measure.name) }),
      );
  const options = [...named, ...completions];
  return { options, fault: compiled.ok || named.length > 0 ? null : (compiled.faults[0] ?? null) };
}

const NONE = 9;

/** 0 the name itself, 1 its beginning, 2 the beginning of a word in it, 3 every typed word somewhere in it. */
function rankOf(name: string, wanted: string): number {
  if (name === wanted) return 0;
  if (name.startsWith(wanted)) return 1;
  if (name.split(' ').some((_, n, words) => words.slice(n).join(' ').startsWith(wanted))) return 2;
  return wanted.split(/\s+/).every((word) => name.includes(word)) ? 3 : NONE;
}

const figureRank = (shown: string | undefined, wanted: string): number => {
  if (shown === undefined || !/^[\d.−-]/.test(wanted)) return NONE;
  const plain = wanted.replace(/\u2044/g, '/').replace(/[\u202f\u00a0]/g, ' ');
  return shown === plain || shown.replace(/ (in|mm|cm)$/, '') === plain ? 1 : NONE;
};

/** The unfinished word at the end of a formula, after at least one sign. */
const tailOf = (typed: string): string =>
  /[-+*/^(,<>=]\s*([\p{L}][\p{L}\p{N} ]*)$/u.exec(typed)?.[1]?.toLowerCase() ?? '';

function goingOn(typed: string, measures: readonly MeasureFigure[]): readonly MeasureFigure[] {
  const tail = tailOf(typed);
  if (tail === '') return [];
  return measures.filter(({ name }) => rankOf(name.toLowerCase(), tail) <= 2).slice(0, 6);
}

const completed = (typed: string, name: string): string => typed.slice(0, typed.length - tailOf(typed).length) + name;
