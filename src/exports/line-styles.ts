import type { Role } from '@/engine';

/** Colours of a drawing that stands alone, without a style sheet. */
export interface Theme {
  readonly ink: string;
  readonly paper: string;
  readonly line: string;
  readonly valley: string;
  readonly mountain: string;
  readonly accent: string;
  readonly font: string;
  /** Lightest and darkest of the card, of the pages, and of layers of paper. */
  readonly card: readonly [string, string];
  readonly pages: readonly [string, string];
  readonly layer: readonly [string, string];
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
  layer: ['#c2d6ca', '#7f9b8b'],
};
/** Black on white: lines are told apart by their pattern alone. */
export const PRINT_THEME: Theme = {
  ink: '#000000',
  paper: '#ffffff',
  line: '#8a8a8a',
  valley: '#000000',
  mountain: '#000000',
  accent: '#000000',
  font: 'Figtree',
  card: ['#ffffff', '#c4c4c4'],
  pages: ['#ffffff', '#e2e2e2'],
  layer: ['#ffffff', '#d3d3d3'],
};

/** How a shape is painted; widths and dashes in drawing units, opacities from 0 to 1. */
export interface Paint {
  readonly fill?: string;
  readonly fillOpacity?: number;
  /** Filled with slanting lines of this colour instead. */
  readonly hatch?: string;
  readonly stroke?: string;
  readonly strokeWidth?: number;
  readonly strokeOpacity?: number;
  readonly dash?: readonly number[];
  /** Text only. */
  readonly text?: { readonly size: number; readonly weight: number };
}

const TONES = 7;

/** The one table from roles to looks, for every picture and paper that stands without a style sheet. */
export function paintOf(role: Role, theme: Theme, tone = 'tone-0'): Paint {
  const line = (stroke: string, strokeWidth: number, dash?: readonly number[]): Paint => ({
    stroke,
    strokeWidth,
    ...(dash ? { dash } : {}),
  });
  switch (role) {
    case 'cut':
      return line(theme.ink, 1.8);
    case 'valley':
      return line(theme.valley, 1.6, [8, 5]);
    case 'mountain':
      return line(theme.mountain, 1.6, [10, 4, 2, 4]);
    case 'slit':
      return line(theme.ink, 1.2);
    case 'glue':
      return { hatch: theme.ink };
    case 'panel':
      return { fill: theme.paper };
    case 'away':
      return line(theme.line, 1);
    case 'hidden':
      return line(theme.ink, 1, [1.5, 3]);
    case 'dimension':
    case 'extension':
    case 'ruler':
      return { ...line(theme.ink, 0.8), strokeOpacity: 0.6 };
    case 'origin':
      return { fill: theme.accent };
    case 'figure':
    case 'label':
      return { fill: theme.ink, text: { size: 13, weight: 600 } };
    case 'face': {
      const colour = toneColour(tone, theme);
      return { fill: colour, ...line(colour, 0.6) };
    }
    case 'face edge':
      return line(theme.ink, 1);
    case 'glass':
      return { fill: theme.card[0], fillOpacity: 0.08 };
  }
}

function toneColour(tone: string, theme: Theme): string {
  const [name, step] = tone.split('-');
  const [light, dark] = { pages: theme.pages, paper: theme.layer }[name ?? ''] ?? theme.card;
  const share = Number(step) / TONES;
  const channel = (at: number) =>
    Math.round(parseInt(light.slice(at, at + 2), 16) * (1 - share) + parseInt(dark.slice(at, at + 2), 16) * share);
  return `#${[1, 3, 5].map((at) => channel(at).toString(16).padStart(2, '0')).join('')}`;
}
