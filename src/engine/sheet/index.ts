export * from './plan';
export * from './stock';
export * from './words';
