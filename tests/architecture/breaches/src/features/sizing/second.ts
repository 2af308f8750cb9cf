import { first } from './first';

export const second = (): number => first();
