import { readdirSync, readFileSync } from 'node:fs';
import { compileLive, evaluate, usualSizing, type Sizing, type Unit } from '@/engine';
import { loadPattern } from '@/features/patterns/load-pattern';
import type { LiveFigures } from '@/writeup/live';

/** A sentence of the set: its text without brackets, and the lengths that stand in it. */
export interface MarkedSentence {
  readonly text: string;
  readonly marks: readonly Mark[];
}
export interface Mark {
  readonly from: number;
  readonly to: number;
  /** The measure or formula that is meant; a plain length such as `12 in` where no measure is. */
  readonly formula: string;
}
export interface SentenceFile {
  readonly name: string;
  readonly units: Unit;
  readonly live: LiveFigures;
  readonly sentences: readonly MarkedSentence[];
}

/** The files of one folder, each with its pattern at the size that stands at its head. */
export function sentencesIn(folder: 'sentences' | 'held-out'): readonly SentenceFile[] {
  const at = new URL(`./${folder}/`, import.meta.url);
  return readdirSync(at).map((name) => {
    const lines = readFileSync(new URL(name, at), 'utf8')
      .split('\n')
      .filter((line) => line !== '' && !line.startsWith('#'));
    const heads = lines.flatMap((line) => [/^(pattern|units|set): (.+)$/.exec(line)].filter((head) => head !== null));
    const value = (key: string) => heads.filter((head) => head[1] === key).map((head) => head[2] ?? '');
    const units = value('units')[0] as Unit;
    const live = liveAt(value('pattern')[0] ?? '', units, value('set'));
    return { name, units, live, sentences: lines.slice(heads.length).map(readMarks) };
  });
}

/** A pattern at its usual size but for what is set, as `inside width = 5 in`. */
export function liveAt(slug: string, units: Unit, set: readonly string[] = []): LiveFigures {
  const file = `content/patterns/${slug}.json`;
  const { model } = loadPattern(file, readFileSync(file, 'utf8'));
  const usual = usualSizing(model, units);
  const values = Object.fromEntries(
    set.map((line) => {
      const [name = '', formula = ''] = line.split(' = ');
      const live = compileLive(model, formula);
      const length = live.ok ? live.value.value(evaluate(model, usual)) : null;
      if (length === null) throw new Error(`${slug}: ${line}`);
      return [name, length.exact];
    }),
  );
  const sizing: Sizing = { ...usual, values: { ...usual.values, ...values } };
  return { model, figures: evaluate(model, sizing) };
}

export function readMarks(line: string): MarkedSentence {
  const marks: Mark[] = [];
  let text = '';
  for (const [, words, formula, plain] of line.matchAll(/\[([^|\]]+)\|([^\]]+)\]|([^[]+)/g)) {
    if (words !== undefined) marks.push({ from: text.length, to: text.length + words.length, formula: formula ?? '' });
    text += words ?? plain ?? '';
  }
  return { text, marks };
}
