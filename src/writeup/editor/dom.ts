import { ICONS, type IconName } from '@/components/icons';

/** Small pieces of DOM for node views. */

export function textField(given: {
  className: string;
  label: string;
  placeholder: string;
  maxLength: number;
}): HTMLInputElement {
  const field = document.createElement('input');
  field.type = 'text';
  field.className = given.className;
  field.placeholder = given.placeholder;
  field.maxLength = given.maxLength;
  field.autocomplete = 'off';
  field.setAttribute('aria-label', given.label);
  return field;
}

export function iconButton(icon: IconName, label: string, act: () => void): HTMLButtonElement {
  const button = document.createElement('button');
  button.type = 'button';
  button.className = 'icon-button';
  button.title = label;
  button.setAttribute('aria-label', label);
  button.append(iconSvg(icon));
  button.addEventListener('click', act);
  return button;
}

const SVG = 'http://www.w3.org/2000/svg';

export function iconSvg(icon: IconName): SVGSVGElement {
  const svg = document.createElementNS(SVG, 'svg');
  for (const [name, value] of Object.entries({
    class: 'icon',
    viewBox: '0 0 24 24',
    width: '20',
    height: '20',
    'aria-hidden': 'true',
  })) {
    svg.setAttribute(name, value);
  }
  const path = document.createElementNS(SVG, 'path');
  path.setAttribute('d', ICONS[icon]);
  svg.append(path);
  return svg;
}
