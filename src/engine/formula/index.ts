export { codeOf, nodeOf } from './code';
export { compileFormula } from './compile';
export { diagnose } from './diagnose';
export * from './kind';
export { explain, explainAt } from './messages';
export { nearestName } from './nearest';
export { FUNCTION_NAMES } from './signatures';
export type { Formula, Names, Node, Scope, Values, Work } from './syntax';
export { workOf } from './work';
