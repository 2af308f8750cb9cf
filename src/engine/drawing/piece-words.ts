import type { ShowOptions } from '../measure';
import { instructionsOf } from '../piece';
import type { PieceFigure, Sentence } from '../types';
import type { Note } from './notes';
import { say } from './say';
import { teethOf } from './stops';

/**
 * A drawing in words, for those who hear it: the blank, scores, cuts and curves as the making sentences say them, what is
 * noted besides, the names of panels and tabs, and those that the drawing has no room for.
 */
export function altOf(
  piece: PieceFigure,
  options: Pick<ShowOptions, 'units' | 'grid'>,
  { notes, unnamed }: { readonly notes: readonly Note[]; readonly unnamed: readonly string[] },
): string {
  const { name, net } = piece;
  const [blank = '', ...rest] = sentencesOf(instructionsOf(piece), options);
  const teeth = teethOf(net);
  const named = (role: 'panel' | 'tab') =>
    net.panels.flatMap((panel) => (panel.role === role && !teeth.includes(panel) ? [panel.name] : []));
  return [
    `${name}, ${blank.replace(/^Cut /, '')}`,
    ...rest.filter((sentence) => !/^Fold /.test(sentence)),
    ...list(
      'Noted',
      notes.filter(({ keyed }) => !keyed).map(({ text }) => spelt(text)),
    ),
    ...list('Panels', named('panel')),
    ...list('Glue tabs', named('tab')),
    ...list('Too small to be named in the drawing', unnamed),
  ].join(' ');
}
const list = (what: string, items: readonly string[]): readonly string[] =>
  items.length === 0 ? [] : [`${what}: ${items.join(', ')}.`];
const spelt = (text: string): string =>
  text
    .replace(/^(\d+)× /, '$1 times ')
    .replace(/(^|times )([\d.]+°)/, '$1an angle of $2')
    .replace(/tab (.+)/, 'a tab $1 deep')
    .replace('R\u202f', 'a radius of ')
    .replace('Ø\u202f', 'a diameter of ')
    .replace('fold ', 'a fold of ')
    .replaceAll('\u202f', ' ')
    .replaceAll('\u2044', '/');

const said = new WeakMap<readonly Sentence[], { readonly looked: string; readonly sentences: readonly string[] }>();
/** A piece is drawn for a wide page and for a narrow one: what is said of it is the same. */
function sentencesOf(
  instructions: readonly Sentence[],
  options: Pick<ShowOptions, 'units' | 'grid'>,
): readonly string[] {
  const looked = `${options.units} ${options.grid}`;
  const known = said.get(instructions);
  if (known?.looked === looked) return known.sentences;
  const sentences = instructions.map((sentence) => say(sentence, options));
  said.set(instructions, { looked, sentences });
  return sentences;
}
