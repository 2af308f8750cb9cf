import { cardFit, cardLineHtml, type CardBlank } from './card-fit';
import { keptSheets } from './sheet-keeper';

/** Cards of projects say whether the box comes out of the sheets that this browser keeps. */
export function fitCards(): void {
  const sheets = keptSheets();
  for (const line of document.querySelectorAll<HTMLElement>('[data-blanks]')) {
    const fit = cardFit(JSON.parse(line.dataset.blanks ?? '[]') as readonly CardBlank[], sheets);
    if (!fit) continue;
    line.innerHTML = cardLineHtml(fit);
    line.classList.toggle('too-large', !fit.enough);
  }
}
