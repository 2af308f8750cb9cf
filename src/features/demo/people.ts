import type { Role } from '@/db/schema';

/** One of each role, for the demo alone: their passwords are shown on the start screen and on the sign-in page. */
export interface DemoPerson {
  readonly name: string;
  readonly email: string;
  readonly role: Role;
  readonly password: string;
}

export const DEMO_PEOPLE: readonly DemoPerson[] = [
  { name: 'Ines Thornbury', email: 'ines@quilletlane.example', role: 'author', password: 'seed-paper-lantern' },
  { name: 'Bram Quillon', email: 'bram@foldwright.example', role: 'admin', password: 'bone-folder-kettle' },
  { name: 'Wenna Tolliver', email: 'wenna@quilletlane.example', role: 'reader', password: 'card-trimmer-moss' },
];
