export { compilePattern } from './compile';
export { evaluate, usualSizing as sizingOf, valuesBehind } from './evaluate';
export * from './live';
export type * from './model';
