/** The places that the header leads to, and who sees each. */
export type Place = 'projects' | 'handbook' | 'subscribe' | 'workroom' | 'admin';
export type Role = 'admin' | 'author' | 'reader';

export interface PlaceLink {
  readonly place: Place;
  readonly href: string;
  readonly label: string;
}

/** Authors and admins get the workroom where everybody else is offered the list. */
export function placesFor(role: Role | null): readonly PlaceLink[] {
  const open: PlaceLink[] = [
    { place: 'projects', href: '/projects', label: 'Projects' },
    { place: 'handbook', href: '/handbook', label: 'Handbook' },
  ];
  if (role === 'author' || role === 'admin') open.push({ place: 'workroom', href: '/workroom', label: 'Workroom' });
  else open.push({ place: 'subscribe', href: '/subscribe', label: 'Subscribe' });
  return open;
}
