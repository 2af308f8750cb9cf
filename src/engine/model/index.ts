export { compilePattern } from './compile';
export { evaluate, usualSizing as sizingOf, valuesBehind } from './evaluate';
export * from './live';
export type * from './model';
export * from './solve';
export * from './sweep';
export { workExact, workOut } from './values';
export * from './order';
