export * from './assemble';
export * from './crossing';
export * from './curve';
