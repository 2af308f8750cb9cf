/** Somebody who works on a project with its owner, or is asked to. */
export interface CoAuthor {
  readonly id: string;
  readonly state: 'invited' | 'accepted';
  /** The address while the invitation waits. */
  readonly name: string;
  readonly isAsker: boolean;
}
/** An invitation as whoever is invited sees it. */
export interface Invited {
  readonly id: string;
  readonly title: string;
  readonly from: string;
}
/** A link by which somebody trusted reads the project as it stands; the link itself is shown once, when it is made. */
export interface DraftLink {
  readonly id: string;
  readonly label: string;
  /** Milliseconds since 1970, UTC. */
  readonly createdAt: number;
  readonly revokedAt: number | null;
}
export interface Sharing {
  readonly people: readonly CoAuthor[];
  readonly links: readonly DraftLink[];
}
export const LABEL_LIMIT = 80;
