import type { Shown } from '@/engine';
import { esc } from '@/exports/escape';
import { showLive, type LiveFigures, type LiveText } from './live';

/** What of a write-up follows the size within its text, as HTML: live measures, and steps that are counted. */

/** What stands behind a formula that gives no figure. */
export const NOT_WORKED_OUT = 'not worked out';

/** `<span class="measure" data-live="inside width">`, with words to hear beside the typeset figure. */
export function renderMeasure(live: LiveFigures, text: LiveText): string {
  const shown = showLive(live, text);
  const bare = text.bare ? ' data-bare' : '';
  return `<span class="measure${shown ? '' : ' unknown'}" data-live="${esc(text.formula)}"${bare}>${insideOf(shown, text)}</span>`;
}

/** What stands in the span; the class `unknown` goes with a measure that is not worked out. */
export const measureInside = (live: LiveFigures, text: LiveText): string => insideOf(showLive(live, text), text);

function insideOf(shown: Shown | null, { formula }: LiveText): string {
  return shown
    ? figure(shown)
    : `${esc(formula.trim() || 'empty measure')} <small class="unknown-mark">(${NOT_WORKED_OUT})</small>`;
}

/** A figure to see and the same to hear: a fraction slash is read aloud in a different way by every screen reader. */
export function figure({ typeset, spoken }: Shown): string {
  if (typeset === spoken) return esc(typeset);
  return `<span class="figure" aria-hidden="true">${esc(typeset)}</span><span class="visually-hidden spoken">${esc(spoken)}</span>`;
}

/** What stands in a reference to a step: `step 4`; one that does not apply has no number. */
export const stepRefInside = (word: string, number: number | null): string =>
  number === null
    ? `a ${word.toLowerCase()} that your box does without`
    : `${word}\u00a0<span data-number>${number}</span>`;
