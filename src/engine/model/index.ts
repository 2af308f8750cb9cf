export { compilePattern } from './compile';
export { evaluate, usualSizing as sizingOf, valuesBehind } from './evaluate';
export * from './live';
export type * from './model';
export { openModel, sealFormula, sealModel, type SealedFormula, type SealedModel } from './seal';
export * from './solve';
export * from './sweep';
export { workExact, workOut } from './values';
export * from './order';
