import { esc } from '@/exports/escape';

const FONT = "Figtree,'Segoe UI',Helvetica,Arial,sans-serif";
const LINK = /https?:\/\/[^\s<>"']+[^\s<>"'.,;:!?)]/g;

/**
 * A letter's text as HTML: the same words, with links that can be followed. Blank lines part paragraphs.
 * A mail cannot load our styles, so they stand in the elements.
 */
export function letterHtml(text: string): string {
  const paragraphs = text
    .trim()
    .split(/\n{2,}/)
    .map((paragraph) => `<p style="margin:0 0 16px">${linked(paragraph).replaceAll('\n', '<br>')}</p>`)
    .join('\n');
  return `<!doctype html>
<html lang="en"><head><meta charset="utf-8"><meta name="color-scheme" content="light dark"><meta name="viewport" content="width=device-width">
<style>:root{color-scheme:light dark}@media(prefers-color-scheme:dark){.b{background:#141019!important}.p{background:#1f1927!important;color:#f2eef5!important}.p a{color:#e0aed1!important}}</style></head>
<body class="b" style="margin:0;padding:24px 12px;background:#eaf3ef">
<div class="p" style="max-width:536px;margin:0 auto;padding:28px 32px 16px;background:#ffffff;border-top:6px solid #6d2e5b;font:400 16px/26px ${FONT};color:#231c2b;overflow-wrap:anywhere">
<p style="margin:0 0 20px;font:800 22px/28px ${FONT};letter-spacing:-.03em">Foldwright</p>
${paragraphs}
</div></body></html>
`;
}

function linked(text: string): string {
  let html = '';
  let from = 0;
  for (const match of text.matchAll(LINK)) {
    html += esc(text.slice(from, match.index));
    html += `<a href="${esc(match[0])}" style="color:#6d2e5b">${esc(match[0])}</a>`;
    from = match.index + match[0].length;
  }
  return html + esc(text.slice(from));
}
