export * from './assemble';
export * from './crossing';
export * from './curve';
export * from './inset';
