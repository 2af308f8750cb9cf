/** The geometry engine's public door. Everything outside `src/engine` imports from here and from nowhere deeper. */
export type * from './types';
