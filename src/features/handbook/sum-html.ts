import { esc } from '@/exports/escape';
import { SUMS, type SumId } from './sums';

/** What a sum comes to, as HTML for the server and the browser alike. */
export function sumAnswerHtml(id: SumId, field: (name: string) => string): string {
  const answer = SUMS[id].answer(field);
  if (!answer.ok) return `<p class="error">${esc(answer.sentence)}</p>`;
  const rows = answer.rows.map(
    ({ term, figure }) => `<div><dt>${esc(term)}</dt><dd><span class="measure">${esc(figure)}</span></dd></div>`,
  );
  return `<dl>${rows.join('')}</dl><p class="small soft">${esc(answer.note)}</p>`;
}
