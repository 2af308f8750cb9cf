export { compilePattern } from './compile';
export { evaluate, figureMaker, usualSizing as sizingOf, valuesBehind } from './evaluate';
export * from './live';
export type * from './model';
