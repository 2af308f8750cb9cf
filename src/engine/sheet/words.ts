import type { Sentence, SentenceFigure } from '../types';
import type { Cut, Freed } from './cuts';
import type { SheetPlan } from './plan';
import type { TooLarge } from './too-large';

/**
 * The cuts of one sheet in words, in order. Each says what is taken in hand unless it is what the last cut left there, when
 * to turn it, and where to trim, measured from its edge.
 */
export function cutsInWords(plan: SheetPlan, sheet: number): readonly Sentence[] {
  return (plan.sheets[sheet]?.cuts ?? []).map((cut, index, all) => [
    `${cut.n}. `,
    ...inHand(cut, all[index - 1]),
    { mm: cut.measure },
    ...(index === 0 ? [cut.runs === 'along' ? ' from the left' : ' from the top'] : []),
    ': ',
    ...outcome(cut),
    '.',
  ]);
}

/** A sheet is the same either way up: only a cut in the other direction asks for a turn. */
function inHand(cut: Cut, before: Cut | undefined): Sentence {
  if (!before) return ['Trim at '];
  const turns = before.runs !== cut.runs;
  const rest = before.rest.is === 'strip' && sameSize(before.rest, cut.of);
  if (rest) return [turns ? 'Turn the rest and trim it at ' : 'Trim the rest at '];
  return ['Take the ', ...size(cut.of), turns ? ' strip, turn it and trim at ' : ' strip and trim at '];
}
const sameSize = (a: { across: number; along: number }, b: { across: number; along: number }) =>
  a.across === b.across && a.along === b.along;

function outcome({ off, rest }: Cut): Sentence {
  if (off.is === 'piece' && rest.is === 'piece')
    return off.name === rest.name
      ? [`that is the ${off.name}, twice`]
      : [`that is the ${off.name}, and the ${rest.name} is left`];
  const first: Sentence =
    off.is === 'piece' ? [`that is the ${off.name}`] : off.is === 'strip' ? ['a strip ', ...size(off)] : falls(off);
  const second: Sentence =
    rest.is === 'piece'
      ? [`the ${rest.name} is left`]
      : rest.is === 'strip'
        ? ['the rest is ', ...size(rest)]
        : falls(rest);
  return [...first, '; ', ...second];
}
function falls(freed: Freed): Sentence {
  if (freed.is === 'edge') return ['the edge comes off'];
  if (freed.is === 'sliver') return ['a sliver comes off'];
  return [`left over: offcut ${freed.name}, `, ...size(freed)];
}
const size = ({
  across,
  along,
}: {
  readonly across: number;
  readonly along: number;
}): readonly [SentenceFigure, string, SentenceFigure] => [{ mm: across, bare: true }, ' × ', { mm: along, bare: true }];

/** What would help with a piece that is too large: what the sheet has room for, which sheets would hold it, whether it can be joined. */
export function helpWithTooLarge({ room, fits, joined }: TooLarge): Sentence {
  const names = fits.map(({ name }) => name);
  const list = names.length < 2 ? names.join() : `${names.slice(0, -1).join(', ')} or ${names.at(-1)}`;
  const larger = names.length === 0 ? 'No sheet known here would hold it.' : `${list} would hold it.`;
  const last = joined
    ? ' Or make it of two parts, joined at a fold.'
    : names.length === 0
      ? ' Make the box smaller.'
      : '';
  return ['The sheet has room for ', { mm: room.across, bare: true }, ' × ', { mm: room.along }, `. ${larger}${last}`];
}

/** How the two parts of a joined piece come together. */
export function joiningInWords({ name, tab, parts: [first, second] }: SheetPlan['joined'][number]): Sentence {
  return [
    `The ${name} is made of two parts. The ${first.name.toLowerCase()} has an extra tab of `,
    { mm: tab },
    `: fold it as the score says and glue it behind the ${second.name.toLowerCase()}, edge to edge at the fold.`,
  ];
}
