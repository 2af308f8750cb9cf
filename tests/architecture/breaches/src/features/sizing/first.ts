import { second } from './second';

export const first = (): number => second();
