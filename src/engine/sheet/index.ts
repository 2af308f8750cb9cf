export type { Cut, Freed, Offcut, Part } from './cuts';
export { foldsRun, type Folds } from './grain';
export { joinAt, partings, type Joined, type Parting } from './joined';
export * from './plan';
export * from './stock';
export type { TooLarge } from './too-large';
export * from './words';
