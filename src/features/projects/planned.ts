/** An edition that is to come out by itself. */
export interface Planned {
  /** Milliseconds since 1970, UTC. */
  readonly publishAt: number;
  /** The revision that will be published, whatever is saved after it. */
  readonly revision: number;
  readonly note: string;
  /** Why it did not come out when its time came; null while it waits. */
  readonly problem: string | null;
}
