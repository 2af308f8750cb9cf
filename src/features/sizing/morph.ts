/**
 * Brings `target`'s content to `html` and touches only what differs, so that a drawing keeps its place, a field its
 * caret and a screen reader its reading. `onFigure` hears of every element whose own text changed.
 */
export function morphInto(target: Element, html: string, onFigure: (element: Element) => void = () => undefined): void {
  const template = target.ownerDocument.createElement('template');
  template.innerHTML = html;
  morphChildren(target, template.content, onFigure);
}

function morphChildren(target: Element, source: ParentNode & Node, onFigure: (element: Element) => void): void {
  const old = [...target.childNodes];
  const next = [...source.childNodes];
  next.forEach((node, i) => {
    const before = old[i];
    if (!before) target.append(node);
    else if (before.nodeType !== node.nodeType || before.nodeName !== node.nodeName) target.replaceChild(node, before);
    else if (before instanceof Element && node instanceof Element) {
      morphAttributes(before, node);
      morphChildren(before, node, onFigure);
    } else if (before.nodeValue !== node.nodeValue) {
      before.nodeValue = node.nodeValue;
      onFigure(target);
    }
  });
  for (const extra of old.slice(next.length)) extra.remove();
}

function morphAttributes(target: Element, source: Element): void {
  for (const { name, value } of [...source.attributes])
    if (target.getAttribute(name) !== value) target.setAttribute(name, value);
  for (const { name } of [...target.attributes])
    if (!source.hasAttribute(name) && name !== 'open') target.removeAttribute(name);
}
