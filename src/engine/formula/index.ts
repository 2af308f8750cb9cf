export * from './compile';
export * from './diagnose';
export { FUNCTIONS, FUNCTION_NAMES } from './functions';
export * from './kind';
export { explain, explainAt } from './messages';
export { nearestName } from './nearest';
export type { Names } from './parse';
export type { Node } from './syntax';
