export * from './number-words';
export * from './random';
export * from './read';
export * from './round';
export * from './show';
export * from './tolerance';
export * from './value';
