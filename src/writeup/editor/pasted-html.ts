import { compileLive } from '@/engine';
import { safeHref } from '../links';
import type { LiveFigures } from '../live';

/**
 * What word processors put on the clipboard, made plain before the schema reads it. The page's security policy keeps the
 * parser from seeing inline styles, so they are read here as text: a `<b>` that is not bold is unwrapped, a bold or italic
 * span becomes an element, list paragraphs become lists, tables in tables lines, and pictures from elsewhere go: only our own are kept.
 */
export function plainPastedHtml(html: string, live: LiveFigures | null): string {
  const { body } = new DOMParser().parseFromString(withoutStyles(html), 'text/html');
  // Copied inside the editor: already ours, whole.
  if (body.querySelector('[data-pm-slice]')) return html;
  for (const unwanted of body.querySelectorAll(
    'script, style, meta, link, title, iframe, object, svg, img, picture, video, form, input, button',
  ))
    unwanted.remove();
  emphasise(body);
  rebuildLists(body);
  plainTables(body);
  resolveMeasures(body, live);
  for (const link of body.querySelectorAll('a[href]'))
    if (safeHref(link.getAttribute('href') ?? '') === null) unwrap(link);
  for (const h1 of body.querySelectorAll('h1')) rename(h1, 'h2');
  for (const deep of body.querySelectorAll('h4, h5, h6')) rename(deep, 'h3');
  return body.innerHTML;
}

/** Styles under another name, where the policy has nothing to complain of and they can still be read. */
const withoutStyles = (html: string): string =>
  html
    .replace(/<style\b[\s\S]*?<\/style\s*>/gi, '')
    .replace(/<[a-z][^>]*>/gi, (tag) => tag.replace(/\sstyle(?=\s*=)/gi, ' data-pasted-style'));

const styleOf = (element: Element) => element.getAttribute('data-pasted-style') ?? '';
const BOLD = /font-weight\s*:\s*(bold|bolder|[6-9]00)/i;
const NOT_BOLD = /font-weight\s*:\s*(normal|lighter|[1-4]00)/i;
const ITALIC = /font-style\s*:\s*(italic|oblique)/i;
const NOT_ITALIC = /font-style\s*:\s*normal/i;

function emphasise(body: Element) {
  for (const bold of body.querySelectorAll('b, strong')) if (NOT_BOLD.test(styleOf(bold))) unwrap(bold);
  for (const italic of body.querySelectorAll('i, em')) if (NOT_ITALIC.test(styleOf(italic))) unwrap(italic);
  for (const span of body.querySelectorAll('span[data-pasted-style]')) {
    if (BOLD.test(styleOf(span))) wrapInside(span, 'strong');
    if (ITALIC.test(styleOf(span))) wrapInside(span, 'em');
  }
}

/** `<p class="MsoListParagraph" style="mso-list:l0 level1 lfo1">1.  Item</p>`, one after the other, become one list. */
function rebuildLists(body: Element) {
  let list: { element: Element; last: Element } | null = null;
  for (const line of [...body.querySelectorAll('p, h1, h2, h3')]) {
    const isItem =
      /mso-list\s*:\s*(?!none|ignore|skip)/i.test(styleOf(line)) ||
      (/^MsoList/.test(line.className) && /^\s*([·•o§-]|\d{1,3}[.)])\s+/.test(line.textContent ?? ''));
    if (!isItem) {
      list = null;
      continue;
    }
    const ordered = takeMarker(line);
    const tag = ordered ? 'OL' : 'UL';
    const item = line.ownerDocument.createElement('li');
    const paragraph = line.ownerDocument.createElement('p');
    paragraph.append(...line.childNodes);
    item.append(paragraph);
    if (list && list.element.tagName === tag && list.last.nextElementSibling === line) {
      list.element.append(item);
      line.remove();
    } else {
      const element: Element = line.ownerDocument.createElement(tag);
      element.append(item);
      line.replaceWith(element);
      list = { element, last: element };
    }
  }
}

/** Takes the typed number or bullet away; true when it was a number. */
function takeMarker(line: Element): boolean {
  const marked = [...line.querySelectorAll('span')].find((span) => /mso-list\s*:\s*ignore/i.test(styleOf(span)));
  let marker = marked?.textContent ?? '';
  if (marked) marked.remove();
  else {
    const first = firstText(line);
    marker = /^\s*([·•o§-]|\d{1,3}[.)])\s+/.exec(first?.data ?? '')?.[0] ?? '';
    if (first) first.data = first.data.slice(marker.length);
  }
  return /\d/.test(marker);
}

function firstText(node: Node): Text | null {
  for (const child of node.childNodes) {
    if (child.nodeType === 3 && (child as Text).data.trim() !== '') return child as Text;
    const inner = firstText(child);
    if (inner) return inner;
  }
  return null;
}

/** Tables keep rows and cells; one inside another becomes lines, its cells parted by commas. */
function plainTables(body: Element) {
  for (const table of [...body.querySelectorAll('table table')].reverse()) {
    const lines = [...table.querySelectorAll('tr')].map((row) => {
      const line = table.ownerDocument.createElement('p');
      line.textContent = [...row.children]
        .map((cell) => (cell.textContent ?? '').trim().replace(/\s+/g, ' '))
        .filter(Boolean)
        .join(', ');
      return line;
    });
    table.replaceWith(...lines);
  }
  for (const aside of body.querySelectorAll('table > caption, table > colgroup')) aside.remove();
  for (const cell of body.querySelectorAll('td, th')) {
    for (const name of ['colspan', 'rowspan'])
      if (!/^([1-9]|1\d|20)$/.test(cell.getAttribute(name) ?? '1')) cell.removeAttribute(name);
    for (const heading of cell.querySelectorAll('h1, h2, h3, h4, h5, h6')) rename(heading, 'p');
  }
}

/** A measure copied from a page of ours stays live when the formula reads in this project; else it becomes the figure that it was. */
function resolveMeasures(body: Element, live: LiveFigures | null) {
  for (const span of body.querySelectorAll('span[data-live]')) {
    const formula = span.getAttribute('data-live') ?? '';
    for (const spoken of span.querySelectorAll('.visually-hidden')) spoken.remove();
    if (live && compileLive(live.model, formula).ok) span.textContent = formula;
    else unwrap(span);
  }
  for (const spoken of body.querySelectorAll('.visually-hidden')) spoken.remove();
}

function unwrap(element: Element) {
  element.replaceWith(...element.childNodes);
}
function wrapInside(element: Element, tag: string) {
  const wrapper = element.ownerDocument.createElement(tag);
  wrapper.append(...element.childNodes);
  element.append(wrapper);
}
function rename(element: Element, tag: string) {
  const renamed = element.ownerDocument.createElement(tag);
  renamed.append(...element.childNodes);
  element.replaceWith(renamed);
}
