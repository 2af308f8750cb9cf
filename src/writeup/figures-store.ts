import type { ReadableAtom } from 'nanostores';
import type { LiveFigures } from './live';

/** What the editor's live things follow. Null until the pattern has been worked out for the first time; after that, the last figures that worked. */
export type FiguresStore = ReadableAtom<LiveFigures | null>;
