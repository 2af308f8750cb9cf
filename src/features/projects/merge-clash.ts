/** A part that both versions changed, each in its own way. */
export interface Clash {
  /** "Step 3, The lower spine", "Measure strip width"; the same at every try. */
  readonly where: string;
  readonly mine: string;
  readonly other: string;
  /** Both can stand, one after the other. */
  readonly bothCanStand: boolean;
}
export type Side = 'mine' | 'other' | 'both';
/** What was chosen, by `where`. What is not chosen stands as mine. */
export type Choices = Readonly<Record<string, Side>>;

interface Three<T> {
  readonly base: T | undefined;
  readonly mine: T;
  readonly other: T;
}

export interface Judge {
  /** One value out of three; a clash when both changed it. */
  three<T>(where: string, values: Three<T>, words: (value: T) => string): T;
  /** The same for what may be taken out: changed here and taken out there, it stays as it was changed. */
  kept<T>(where: string, values: Three<T | undefined>, words: (value: T) => string): T | undefined;
  /** Which side was chosen for a clash, which is noted. */
  side(clash: Omit<Clash, 'bothCanStand'> & { readonly bothCanStand?: boolean }): Side;
  clashes(): readonly Clash[];
}

export function createJudge(choices: Choices): Judge {
  const clashes: Clash[] = [];
  const judge: Judge = {
    clashes: () => [...clashes],
    side({ where, mine, other, bothCanStand = false }) {
      // Two parts may bear one name, such as two texts without a title.
      const nth = clashes.filter((clash) => clash.where === where || clash.where.startsWith(`${where} (`)).length;
      const name = nth === 0 ? where : `${where} (${nth + 1})`;
      clashes.push({ where: name, mine, other, bothCanStand });
      return choices[name] ?? 'mine';
    },
    three(where, { base, mine, other }, words) {
      if (same(mine, other) || same(other, base)) return mine;
      if (same(mine, base)) return other;
      return judge.side({ where, mine: words(mine), other: words(other) }) === 'other' ? other : mine;
    },
    kept(where, { base, mine, other }, words) {
      if (mine === undefined) return same(other, base) ? undefined : other;
      if (other === undefined) return same(mine, base) ? undefined : mine;
      return judge.three(where, { base, mine, other }, (value) => (value === undefined ? '' : words(value)));
    },
  };
  return judge;
}

export const same = (a: unknown, b: unknown): boolean => JSON.stringify(a) === JSON.stringify(b);
