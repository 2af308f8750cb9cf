import { readFileSync } from 'node:fs';
import { order } from '../formula/order';
import { title } from '../../features/sizing/title';

export const length = () => [readFileSync, order, title, new Date()];
