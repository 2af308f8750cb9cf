export interface Trouble {
  readonly what: 'later' | 'refused' | 'expired' | 'uncertain';
  readonly count: number;
  /** What the server said, one example. */
  readonly reply: string;
  readonly enhanced: string | null;
  readonly suppressed: boolean;
  /** When the next of them is tried again; null when none is. */
  readonly nextAt: number | null;
}
