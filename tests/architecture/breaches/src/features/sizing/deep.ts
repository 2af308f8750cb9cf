import { order } from '../../engine/formula/order';

export const deep = order;
