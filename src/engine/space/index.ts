export * from './fold';
export * from './order';
export * from './vector';
