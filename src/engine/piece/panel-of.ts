import type { Net, Panel } from '../types';

/** The panel of a net by its name as a pattern writes it. */
export const panelOf = (net: Net, name: string): Panel | undefined =>
  net.panels.find((one) => one.name === name.toLowerCase() || one.name === name);
