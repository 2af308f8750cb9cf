import type { Drawing, Role, Shape } from '@/engine';
import { esc } from '../escape';

const className = (role: Role): string => `dr-${role.replace(' ', '-')}`;
const round = (value: number): number => Math.round(value * 100) / 100;

export interface SvgOptions {
  readonly class?: string;
  /** Leave the text alternative away where words beside the drawing already say it. */
  readonly decorative?: boolean;
}

/** A drawing for a page. Looks come from the page's style sheet by role, so that themes and print need no second drawing. */
export function drawingSvg(drawing: Drawing, options: SvgOptions = {}): string {
  const name = options.decorative ? 'aria-hidden="true"' : `role="img" aria-label="${esc(drawing.alt)}"`;
  return `<svg class="${esc(['drawing', options.class].filter(Boolean).join(' '))}" viewBox="0 0 ${round(drawing.width)} ${round(drawing.height)}" width="${round(drawing.width)}" height="${round(drawing.height)}" ${name}>${drawing.shapes.map((shape) => element(shape)).join('')}</svg>`;
}

function element(shape: Shape, paint = ''): string {
  const of = shape.of === undefined ? '' : ` data-of="${esc(shape.of)}"`;
  if (shape.type === 'path')
    return `<path class="${className(shape.role)}${shape.tone === undefined ? '' : ` ${esc(shape.tone)}`}" d="${shape.d}"${of}${paint}/>`;
  const turn = shape.turned ? ` transform="rotate(-90 ${round(shape.x)} ${round(shape.y)})"` : '';
  return `<text class="${className(shape.role)}" x="${round(shape.x)}" y="${round(shape.y)}" text-anchor="${shape.anchor}"${turn}${of}${paint}>${esc(shape.text)}</text>`;
}

/** Colours for a picture that stands alone, without a style sheet. */
export interface Theme {
  readonly ink: string;
  readonly paper: string;
  readonly line: string;
  readonly valley: string;
  readonly mountain: string;
  readonly accent: string;
  readonly font: string;
  /** Lightest and darkest of the card, and of the pages. */
  readonly card: readonly [string, string];
  readonly pages: readonly [string, string];
}
export const LIGHT_THEME: Theme = {
  ink: '#231c2b',
  paper: '#ffffff',
  line: '#cfddd6',
  valley: '#1b7155',
  mountain: '#a65a00',
  accent: '#6d2e5b',
  font: 'Figtree',
  card: ['#7d3a69', '#43193a'],
  pages: ['#fbf4e6', '#cdbf9f'],
};

/** The same drawing as a file of its own, every look written out (pictures for mail, social cards, uploads). */
export function drawingSvgStandalone(
  drawing: Drawing,
  theme: Theme = LIGHT_THEME,
  options: { readonly background?: string } = {},
): string {
  const ground =
    options.background === undefined
      ? ''
      : `<rect width="${round(drawing.width)}" height="${round(drawing.height)}" fill="${options.background}"/>`;
  return `<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 ${round(drawing.width)} ${round(drawing.height)}" width="${round(drawing.width)}" height="${round(drawing.height)}">${ground}${drawing.shapes.map((shape) => element(shape, paintOf(shape, theme))).join('')}</svg>`;
}

function paintOf(shape: Shape, theme: Theme): string {
  const stroke = (colour: string, width: number, more = '') =>
    ` fill="none" stroke="${colour}" stroke-width="${width}" stroke-linejoin="round"${more}`;
  switch (shape.role) {
    case 'cut':
      return stroke(theme.ink, 1.8);
    case 'valley':
      return stroke(theme.valley, 1.6, ' stroke-dasharray="8 5"');
    case 'mountain':
      return stroke(theme.mountain, 1.6, ' stroke-dasharray="10 4 2 4"');
    case 'slit':
      return stroke(theme.ink, 1.2);
    case 'glue':
      return ` fill="${theme.line}" fill-opacity="0.55"`;
    case 'panel':
      return ` fill="${theme.paper}"`;
    case 'away':
      return stroke(theme.line, 1);
    case 'hidden':
      return stroke(theme.ink, 1, ' stroke-dasharray="1.5 3"');
    case 'dimension':
    case 'extension':
    case 'ruler':
      return stroke(theme.ink, 0.8, ' stroke-opacity="0.6"');
    case 'origin':
      return ` fill="${theme.accent}"`;
    case 'figure':
    case 'label':
      return ` fill="${theme.ink}" font-family="${theme.font}" font-size="13" font-weight="600"`;
    case 'face': {
      const tone = toneColour(shape.type === 'path' ? (shape.tone ?? 'tone-0') : 'tone-0', theme);
      return ` fill="${tone}" stroke="${tone}" stroke-width="0.6"`;
    }
    case 'face edge':
      return stroke(theme.ink, 1);
  }
}
function toneColour(tone: string, theme: Theme): string {
  const [name, step] = tone.split('-');
  const [light, dark] = name === 'pages' ? theme.pages : theme.card;
  const share = Number(step) / 7;
  const channel = (at: number) =>
    Math.round(parseInt(light.slice(at, at + 2), 16) * (1 - share) + parseInt(dark.slice(at, at + 2), 16) * share);
  return `#${[1, 3, 5].map((at) => channel(at).toString(16).padStart(2, '0')).join('')}`;
}
