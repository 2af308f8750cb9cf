import { people } from '../features/accounts/people.server';

export const Badge = () => people[0];
