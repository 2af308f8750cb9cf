export * from './cells';
export * from './figure';
export * from './grid';
export * from './words';
