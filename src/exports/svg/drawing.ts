import type { Drawing, Role, Shape } from '@/engine';
import { esc } from '../escape';
import { LIGHT_THEME, paintOf, type Theme } from '../line-styles';

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
  return `<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 ${round(drawing.width)} ${round(drawing.height)}" width="${round(drawing.width)}" height="${round(drawing.height)}">${hatchOf(drawing, theme)}${ground}${drawing.shapes.map((shape) => element(shape, attributesOf(shape, theme))).join('')}</svg>`;
}

const HATCH = 'glue-hatch';
/** Lines for glue areas; a tint would be told apart by its colour alone. */
function hatchOf({ shapes }: Drawing, theme: Theme): string {
  const { hatch } = paintOf('glue', theme);
  return hatch !== undefined && shapes.some(({ role }) => role === 'glue')
    ? `<defs><pattern id="${HATCH}" width="6" height="6" patternUnits="userSpaceOnUse" patternTransform="rotate(45)"><path d="M0 0V6" stroke="${hatch}" stroke-opacity="0.4" stroke-width="1.2"/></pattern></defs>`
    : '';
}

function attributesOf(shape: Shape, theme: Theme): string {
  const paint = paintOf(shape.role, theme, shape.type === 'path' ? shape.tone : undefined);
  const attributes: readonly (readonly [string, string | number | undefined])[] = [
    ['fill', paint.hatch === undefined ? (paint.fill ?? 'none') : `url(#${HATCH})`],
    ['fill-opacity', paint.fillOpacity],
    ['stroke', paint.stroke],
    ['stroke-width', paint.strokeWidth],
    ['stroke-opacity', paint.strokeOpacity],
    ['stroke-dasharray', paint.dash?.join(' ')],
    ['stroke-linejoin', paint.stroke === undefined ? undefined : 'round'],
    ['font-family', paint.text ? theme.font : undefined],
    ['font-size', paint.text?.size],
    ['font-weight', paint.text?.weight],
  ];
  return attributes.map(([name, value]) => (value === undefined ? '' : ` ${name}="${value}"`)).join('');
}
