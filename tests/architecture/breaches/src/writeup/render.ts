import { title } from '../features/sizing/title';

export const render = () => title;
