import { roster } from './roster';

export const Roster = () => roster();
