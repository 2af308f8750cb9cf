import { z } from 'zod';
import type { Pattern, Sizing } from '@/engine';
import type { WriteUp } from '@/writeup/document';
import type { Stage } from './project-stage';

/** What an author changes at the desk: one document, saved whole. */
export interface ProjectState {
  readonly title: string;
  /** One line of what it is. */
  readonly summary: string;
  /** Minutes at the table; null when the author has not said. */
  readonly minutes: number | null;
  /** The upload that stands first on cards and on the page. */
  readonly hero: string | null;
  readonly pattern: Pattern;
  /** The author's own size: what readers see first. */
  readonly sizing: Sizing;
  readonly writeUp: WriteUp;
}

/** What somebody is to a project: co-authors may change and publish it, the rest is the owner's. */
export type Standing = 'owner' | 'co-author' | 'admin';

/** A project as the desk opens it. */
export interface OpenProject {
  readonly id: string;
  readonly slug: string;
  readonly revision: number;
  /** Milliseconds since 1970, UTC. */
  readonly updatedAt: number;
  readonly author: { readonly id: string; readonly name: string };
  /** Of whoever opened it. */
  readonly standing: Standing;
  readonly stage: Stage;
  /** Why it is withdrawn from readers; null when it is not. */
  readonly withdrawn: string | null;
  readonly state: ProjectState;
}

/** A row of the workroom's list. */
export interface ProjectSummary {
  readonly id: string;
  readonly slug: string;
  readonly title: string;
  readonly patternName: string;
  /** "9 × 6 × 2 1/4 in" at the author's size; empty while the pattern does not read. */
  readonly size: string;
  readonly stage: Stage;
  /** "4 measures and 2 steps differ", for a project changed since its edition. */
  readonly difference: string;
  readonly blocking: number;
  readonly advisory: number;
  readonly revision: number;
  readonly updatedAt: number;
  readonly author: { readonly id: string; readonly name: string };
  /** Up to two flat pieces, drawn at the list's one scale, as SVG. */
  readonly flat: readonly string[];
  readonly folded: string | null;
  /** Names of pieces and measures, for the search. */
  readonly words: string;
}
export interface ProjectList {
  readonly projects: readonly ProjectSummary[];
  /** CSS pixels that an inch takes in `flat`, for the ruler above it. */
  readonly pixelsAnInch: number;
}

export const TITLE_LIMIT = 120;
export const SUMMARY_LIMIT = 300;

/** The fields beside the pattern and the write-up, which have schemas of their own. */
export const factsSchema = z.object({
  title: z.string().max(TITLE_LIMIT, `A title has at most ${TITLE_LIMIT} characters.`),
  summary: z.string().max(SUMMARY_LIMIT, `A summary has at most ${SUMMARY_LIMIT} characters.`),
  minutes: z.number().int().min(1, 'At least one minute.').max(10_000, 'At most 10000 minutes.').nullable(),
  hero: z.string().min(1).max(64).nullable(),
});

export const sizingSchema = z.object({
  values: z.record(z.string().max(80), z.number().finite()),
  choices: z.record(z.string().max(80), z.string().max(80)),
  units: z.enum(['in', 'mm', 'cm']),
  grid: z.enum(['1/8in', '1/16in', '1/32in', '1mm', '0.5mm']),
});

/** Whether a project answers to what was typed: its title, pattern, pieces, measures and author. */
export const matchesSearch = (
  { title, patternName, words, author }: Pick<ProjectSummary, 'title' | 'patternName' | 'words' | 'author'>,
  query: string,
): boolean => answersTo(`${title} ${patternName} ${words} ${author.name}`, query);

/** Whether every word that was typed begins a word of a text, whatever its case and accents. */
export function answersTo(text: string, query: string): boolean {
  const words = ` ${plain(text)}`;
  return plain(query)
    .split(' ')
    .every((word) => words.includes(` ${word}`));
}
const plain = (text: string): string =>
  text
    .normalize('NFKD')
    .replace(/\p{M}/gu, '')
    .toLowerCase()
    .replace(/[^\p{L}\p{N}]+/gu, ' ')
    .trim();
