import type { Type } from './typeset.server';

/** Type sizes and greys of everything on paper, in points; one scale, so that pages belong together. */
export const INK = '#000000';
export const SOFT = '#4d4d4d';
export const RULE = '#b3b3b3';

export const TITLE: Type = { size: 19, weight: 800, colour: INK };
export const SECTION: Type = { size: 11.5, weight: 800, colour: INK };
export const HEAD: Type = { size: 9, weight: 800, colour: INK };
export const BODY: Type = { size: 8.2, weight: 400, colour: INK };
export const STRONG: Type = { ...BODY, weight: 600 };
export const SMALL: Type = { size: 7.2, weight: 400, colour: SOFT };
export const LEADING = 11;
export const SMALL_LEADING = 9.4;
/** Thickness of rules. */
export const THICK = 1.2;
export const THIN = 0.7;
export const HAIR = 0.5;
