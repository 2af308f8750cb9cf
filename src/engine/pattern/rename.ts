import { namesAt, nearestName } from '../formula';
import type { Fault, Pattern, PieceDef, Result, Sizing } from '../types';
import { RENAMING } from './messages';
import { CARD_THICKNESS, drawnNames, isFunctionName, isGiven, isName, keyOf, reservedWordIn, sizeNames } from './names';
import { BOWED, mapTexts, type TextAt } from './texts';

/** What gets another name. Cells, columns and rows are of a piece; an option is of a choice. */
export type Rename = { readonly from: string; readonly to: string } & (
  | { readonly what: 'measure' | 'choice' | 'piece' | 'fit' }
  | { readonly what: 'option'; readonly choice: string }
  | { readonly what: 'cell' | 'track'; readonly piece: string }
);

/** The same, the other way. */
export const renamedBack = (rename: Rename): Rename => ({ ...rename, from: rename.to, to: rename.from });

/**
 * The pattern with one name changed, in its definition and in all that speaks of it. Names in formulas are found as the
 * formula reader finds them, and what stands round them keeps its layout. Refused, with the cure: a name that cannot be one,
 * one that is taken or has a meaning in formulas or drawings, a thing that is not there, and a pattern in which a formula holds
 * a mark that means nothing, for what it speaks of cannot be told.
 */
export function renameInPattern(pattern: Pattern, rename: Rename): Result<Pattern> {
  const clean = { ...rename, to: cleanName(rename.to) };
  const trouble = unknownName(pattern, clean) ?? nameFault(pattern, clean) ?? thicknessFault(clean);
  if (trouble) return { ok: false, faults: [trouble] };
  const faults: Fault[] = [];
  const renamed = mapTexts(pattern, (text, at) => {
    const changed = renameText(text, at, { pattern, rename: clean });
    if (changed.ok) return changed.value;
    faults.push(...changed.faults);
    return text;
  });
  return faults.length > 0 ? { ok: false, faults } : { ok: true, value: renamed };
}

/**
 * One formula with the name changed: `inside  width+2*tab` is `inside  width+2*flap` when `tab` becomes `flap`. A name written
 * in small letters throughout stays so, as in `lower spine.across` of the piece “Lower spine”.
 */
export function renameInFormula(text: string, rename: Rename, where = 'formula'): Result<string> {
  const read = namesAt(text, where);
  if (!read.ok) return read;
  let changed = text;
  for (const name of [...read.value].reverse()) {
    const part = partIn(text.slice(name.from, name.to), name, rename);
    if (part === null) continue;
    const [from, to] = [name.from + part.from, name.from + part.to];
    changed = changed.slice(0, from) + inItsCase(text.slice(from, to), rename) + changed.slice(to);
  }
  // Longer names may make a formula longer than may be.
  return changed === text ? { ok: true, value: text } : whole(changed, where);
}
function whole(text: string, where: string): Result<string> {
  const read = namesAt(text, where);
  return read.ok ? { ok: true, value: text } : read;
}

/** Which characters of a name as written are the one that changes; null when it speaks of something else. */
function partIn(
  written: string,
  { name, optionOf }: { readonly name: string; readonly optionOf?: string },
  rename: Rename,
): { readonly from: number; readonly to: number } | null {
  const from = keyOf(rename.from);
  const all = { from: 0, to: written.length };
  const dot = written.indexOf('.');
  switch (rename.what) {
    case 'measure':
    case 'choice':
      return optionOf === undefined && name === from ? all : null;
    case 'option':
      return optionOf === keyOf(rename.choice) && name === from ? all : null;
    case 'piece':
      return name.startsWith(`${from}.`) ? { from: 0, to: dot } : null;
    case 'track':
      return name === `${keyOf(rename.piece)}.${from}` ? { from: dot + 1, to: written.length } : null;
    default:
      return null;
  }
}
const inItsCase = (written: string, { from, to }: Rename): string =>
  written !== from && written === written.toLowerCase() ? to.toLowerCase() : to;

/** A sizing with its answers under the new name. */
export function renameInSizing(sizing: Sizing, rename: Rename): Sizing {
  const from = keyOf(rename.from);
  const to = keyOf(rename.to);
  function moved<T>(answers: Readonly<Record<string, T>>): Readonly<Record<string, T>> {
    return Object.fromEntries(Object.entries(answers).map(([key, answer]) => [keyOf(key) === from ? to : key, answer]));
  }
  if (rename.what === 'measure') return { ...sizing, values: moved(sizing.values) };
  if (rename.what === 'choice') return { ...sizing, choices: moved(sizing.choices) };
  if (rename.what !== 'option') return sizing;
  const choices = Object.entries(sizing.choices).map(([choice, option]) => [
    choice,
    keyOf(choice) === keyOf(rename.choice) && keyOf(option) === from ? cleanName(rename.to) : option,
  ]);
  return { ...sizing, choices: Object.fromEntries(choices) as Record<string, string> };
}

/**
 * Why a thing of the pattern cannot be called `to`; null when it can. `from` is what it is called so far: it may get other
 * capitals.
 */
export function nameFault(pattern: Pattern, rename: Rename): Fault | null {
  const to = cleanName(rename.to);
  const complain = (code: string, says: readonly string[]) => faultOf(rename, code, says);
  if (rename.what === 'fit' ? to === '' || to.length > 60 : !isName(to))
    return complain('bad name', RENAMING.badName(to));
  const reserved = rename.what === 'fit' ? undefined : reservedWordIn(to);
  if (reserved !== undefined) return complain('reserved name', RENAMING.reserved(to, reserved));
  if (rename.what === 'cell' && keyOf(to).split(' ').includes('on'))
    return complain('reserved name', RENAMING.reserved(to, 'on'));
  if (rename.what === 'measure' || rename.what === 'choice') {
    if (isFunctionName(to)) return complain('function name', RENAMING.functionName(to));
    if (isGiven(to)) return complain('given name', RENAMING.given(to));
  }
  if (keyOf(to) === keyOf(rename.from)) return null;
  const taken = takenNames(pattern, rename).find(({ name }) => keyOf(name) === keyOf(to));
  return taken ? complain('taken', RENAMING.taken(taken.what, taken.name)) : null;
}

/** The figures of the pieces would change with the name. */
function thicknessFault(rename: Rename): Fault | null {
  const [from, to] = [keyOf(rename.from), keyOf(rename.to)];
  if (rename.what !== 'measure' || from === to || (from !== CARD_THICKNESS && to !== CARD_THICKNESS)) return null;
  return faultOf(rename, 'card thickness', RENAMING.cardThickness());
}

function unknownName(pattern: Pattern, rename: Rename): Fault | null {
  const among = (what: string, name: string, known: readonly string[]): Fault | null =>
    known.some((one) => keyOf(one) === keyOf(name))
      ? null
      : faultOf(rename, 'unknown', RENAMING.unknown(what, name, nearestName(name, known)));
  const owner =
    rename.what === 'option'
      ? among('choice', rename.choice, namesOf(pattern.choices))
      : rename.what === 'cell' || rename.what === 'track'
        ? among('piece', rename.piece, namesOf(pattern.pieces))
        : null;
  return owner ?? among(WORDS[rename.what], rename.from, knownNames(pattern, rename));
}

function faultOf(rename: Rename, code: string, [found = '', expected = '', hint = '']: readonly string[]): Fault {
  return { code: `rename ${code}`, where: placeOf(rename), found, expected, hint };
}
const WORDS: Readonly<Record<Rename['what'], string>> = {
  measure: 'measure',
  choice: 'choice',
  option: 'option',
  piece: 'piece',
  cell: 'cell',
  track: 'column or row',
  fit: 'fit',
};
function placeOf(rename: Rename): string {
  const own = `${WORDS[rename.what]} “${rename.from}”`;
  if (rename.what === 'option') return `choice “${rename.choice}”, ${own}`;
  return 'piece' in rename ? `piece “${rename.piece}”, ${own}` : own;
}

/** The names of the kind that is renamed, as they stand in the pattern. */
function knownNames(pattern: Pattern, rename: Rename): readonly string[] {
  switch (rename.what) {
    case 'measure':
      return namesOf(pattern.measures);
    case 'choice':
      return namesOf(pattern.choices);
    case 'piece':
      return namesOf(pattern.pieces);
    case 'fit':
      return namesOf(pattern.fits);
    case 'option':
      return pattern.choices.find(({ name }) => keyOf(name) === keyOf(rename.choice))?.options ?? [];
    case 'cell':
      return cellsIn(pattern, rename.piece);
    case 'track': {
      const piece = pieceCalled(pattern, rename.piece);
      return piece?.builder === 'grid' ? namesOf([...piece.columns, ...piece.rows]) : [];
    }
  }
}
function takenNames(pattern: Pattern, rename: Rename): readonly { readonly what: string; readonly name: string }[] {
  const called = (what: string, names: readonly string[]) => names.map((name) => ({ what, name }));
  if (rename.what === 'measure' || rename.what === 'choice')
    return [...called('measure', namesOf(pattern.measures)), ...called('choice', namesOf(pattern.choices))];
  const piece = 'piece' in rename ? pieceCalled(pattern, rename.piece) : undefined;
  if (rename.what === 'cell') {
    const made = piece && MADE[piece.builder];
    return called('cell', [...cellsIn(pattern, rename.piece), ...(made === undefined ? [] : [made])]);
  }
  if (rename.what !== 'track' || !piece) return called(WORDS[rename.what], knownNames(pattern, rename));
  const sizes = [...sizeNames(piece), ...drawnNames(piece).map(({ name }) => name)];
  return called(
    'size of the piece',
    sizes.map((name) => name.slice(name.indexOf('.') + 1)),
  );
}
/** What builders call the tabs that they make themselves. */
const MADE: Partial<Record<PieceDef['builder'], string>> = { fan: 'tab', disc: 'tooth', sector: 'seam' };

const namesOf = (things: readonly { readonly name: string }[]): readonly string[] => things.map(({ name }) => name);
const pieceCalled = (pattern: Pattern, name: string): PieceDef | undefined =>
  pattern.pieces.find((piece) => keyOf(piece.name) === keyOf(name));
function cellsIn(pattern: Pattern, piece: string): readonly string[] {
  const found = new Set<string>();
  mapTexts(pattern, (text, { role, owner }) => {
    if (keyOf(owner) !== keyOf(piece)) return text;
    if (role === 'cell') found.add(keyOf(text));
    if (role === 'cell words') {
      const { name } = cellWords(text);
      if (name.trim() !== '') found.add(keyOf(name));
    }
    return text;
  });
  return [...found];
}

// ── One text of the pattern ──────────────────────────────────────────────────────────────────────────────────────────

interface Renaming {
  readonly pattern: Pattern;
  readonly rename: Rename;
}

function renameText(text: string, { role, owner, where }: TextAt, { pattern, rename }: Renaming): Result<string> {
  const formula = (one: string) => renameInFormula(one, rename, where);
  const own = 'piece' in rename ? rename.piece : rename.what === 'option' ? rename.choice : owner;
  const name = (): Result<string> => ({
    ok: true,
    value: rename.what === role && keyOf(owner) === keyOf(own) ? swapped(text, rename) : text,
  });
  switch (role) {
    case 'formula':
      return formula(text);
    case 'prose':
      return renameInProse(text, formula);
    case 'stop': {
      const [, way, radius] = BOWED.exec(text) ?? [];
      if (way === undefined || radius === undefined) return { ok: true, value: text };
      const changed = formula(radius);
      return changed.ok ? { ok: true, value: way + changed.value } : changed;
    }
    case 'cell words': {
      if (rename.what !== 'cell' || keyOf(owner) !== keyOf(own)) return { ok: true, value: text };
      const words = cellWords(text);
      return {
        ok: true,
        value: words.kind + swapped(words.name, rename) + words.joint + swapped(words.hinge, rename),
      };
    }
    case 'cell': {
      // A fan numbers its flaps: `petal 1`.
      const fan = rename.what === 'cell' ? pieceCalled(pattern, rename.piece) : undefined;
      const [, stem, number] = /^(.+)( \d+)$/u.exec(text) ?? [];
      const numbered = fan?.builder === 'fan' && keyOf(fan.flap.name) === keyOf(rename.from) && stem !== undefined;
      if (numbered && keyOf(owner) === keyOf(own) && keyOf(stem) === keyOf(rename.from))
        return { ok: true, value: swapped(stem, rename) + number };
      return name();
    }
    default:
      return name();
  }
}

/** The new name where the text is the old one. */
const swapped = (text: string, rename: Rename): string =>
  keyOf(text) === keyOf(rename.from) ? inItsCase(text, rename) : text;

/** The formulas in `Score at [[tab]]`. */
function renameInProse(text: string, formula: (text: string) => Result<string>): Result<string> {
  const faults: Fault[] = [];
  const changed = text.replace(/\[\[(.+?)\]\]/gu, (whole, inside: string) => {
    const renamed = formula(inside);
    if (!renamed.ok) faults.push(...renamed.faults);
    return renamed.ok ? `[[${renamed.value}]]` : whole;
  });
  return faults.length > 0 ? { ok: false, faults } : { ok: true, value: changed };
}

/** `tab corner 1 on left end` in the parts that it is put together from again. */
function cellWords(text: string) {
  const [, kind = '', rest = ''] = /^(\s*\S+)(.*)$/su.exec(text) ?? [];
  const [, before, joint, hinge] = /^(.*)(\s+on\s+)(\S.*)$/isu.exec(rest) ?? [];
  const name = before ?? rest;
  const gap = name.length - name.trimStart().length;
  return { kind: kind + name.slice(0, gap), name: name.slice(gap), joint: joint ?? '', hinge: hinge ?? '' };
}

/** A name as it is kept: without spaces around it, with single ones inside. */
export const cleanName = (name: string): string => name.trim().replace(/\s+/gu, ' ');
