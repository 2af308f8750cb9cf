export * from './cells';
export * from './grid';
export * from './words';
