import type { Pattern } from '@/engine';
import type { BlockNode, WriteUp } from '@/writeup/document';
import type { Built, Scene } from './picture';

/** A picture's scene, and the words for those who cannot see it. */
export interface DemoPicture {
  readonly alt: string;
  readonly scene: (build: Build) => Scene;
}
/** The project's box at its author's size; `change` alters the pattern for the picture's sake alone. */
export type Build = (change?: (pattern: Pattern) => Pattern) => Built;
/** Puts one of the project's pictures into the text, with a caption. */
export type ShowPicture = (name: string, caption: string) => BlockNode;

/** What a correction changed in the write-up, and the note that went with the new edition. */
export interface DemoEdition {
  readonly daysAgo: number;
  readonly note?: string;
  readonly writeUp: (show: ShowPicture) => WriteUp;
}
export interface DemoProject {
  readonly title: string;
  readonly summary: string;
  readonly minutes: number | null;
  /** Slug of the pattern it began from. */
  readonly pattern: string;
  /** Asked values that differ from the pattern's usual ones, millimetres. */
  readonly values?: Readonly<Record<string, number>>;
  /** Options that differ from the pattern's usual ones. */
  readonly choices?: Readonly<Record<string, string>>;
  readonly createdDaysAgo: number;
  /** Days since it was last saved, for a draft. */
  readonly savedDaysAgo?: number;
  readonly hero: string | null;
  readonly pictures: Readonly<Record<string, DemoPicture>>;
  /** Oldest first; empty for a draft. */
  readonly editions: readonly DemoEdition[];
  readonly draft?: (show: ShowPicture) => WriteUp;
}

export const INCH = 25.4;

/** Keeps only these placements of the folded picture. */
export const keep =
  (wanted: (piece: string, index: number) => boolean) =>
  (pattern: Pattern): Pattern => ({
    ...pattern,
    assembly: pattern.assembly.filter(({ piece }, index) => wanted(piece, index)),
  });
