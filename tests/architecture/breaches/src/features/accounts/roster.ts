import { people } from './people.server';

export const roster = () => people.join(', ');
