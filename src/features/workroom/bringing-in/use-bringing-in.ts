import { useMemo, useState } from 'react';
import type { Result } from '@/engine';
import {
  acceptCertain,
  numbersOf,
  prepareSteps,
  type Decision,
  type Decisions,
  type PreparedNumber,
  type PreparedStep,
} from '@/features/bringing-in/prepare';
import { kindOf, readSource } from '@/features/bringing-in/read-source';
import { sayFault, type SourceKind } from '@/features/bringing-in/source';
import { splitIntoSteps, type DraftStep } from '@/features/bringing-in/split-steps';
import type { LiveFigures } from '@/writeup/live';
import { stepsOfHtml } from './html-steps';

export interface Original {
  readonly name: string;
  readonly kind: SourceKind;
  readonly text: string;
}
export interface BringingIn {
  readonly original: Original | null;
  readonly steps: readonly PreparedStep[];
  readonly draft: readonly DraftStep[];
  readonly numbers: readonly PreparedNumber[];
  readonly decisions: Decisions;
  /** The number that keys speak of; null when there is none. */
  readonly current: PreparedNumber | null;
  readonly trimFiller: boolean;
  /** Why the text was not read. */
  readonly trouble: string | null;
  read(text: string, name?: string, kind?: SourceKind): void;
  forget(): void;
  setTrimFiller(on: boolean): void;
  goTo(id: number): void;
  step(by: 1 | -1): void;
  /** Decides on the current number and goes on to the next one that nothing is decided of. */
  decide(decision: Decision): void;
  undecide(): void;
  takeCertain(): void;
}

/** A text being brought in: read, split, its numbers matched, and what the author says of each of them. */
export function useBringingIn(live: LiveFigures | null): BringingIn {
  const [original, setOriginal] = useState<Original | null>(null);
  const [draft, setDraft] = useState<readonly DraftStep[]>([]);
  const [decisions, setDecisions] = useState<Decisions>(new Map());
  const [at, setAt] = useState(0);
  const [trimFiller, setTrim] = useState(false);
  const [trouble, setTrouble] = useState<string | null>(null);
  const steps = useMemo(() => (live ? prepareSteps(draft, { live, trimFiller }) : []), [draft, live, trimFiller]);
  const numbers = useMemo(() => numbersOf(steps), [steps]);
  const current = numbers[Math.min(at, numbers.length - 1)] ?? null;

  const begin = (next: Original | null, read: readonly DraftStep[]) => {
    setOriginal(next);
    setDraft(read);
    setDecisions(new Map());
    setAt(0);
  };
  const goTo = (id: number) => setAt(Math.min(Math.max(id, 0), Math.max(numbers.length - 1, 0)));
  const change = (decision: Decision | null) => {
    if (!current) return decisions;
    const next = new Map(decisions);
    if (decision === null) next.delete(current.id);
    else next.set(current.id, decision);
    setDecisions(next);
    return next;
  };

  return {
    original,
    steps,
    draft,
    numbers,
    decisions,
    current,
    trimFiller,
    trouble,
    read(text, name = 'Pasted text', kind = kindOf(text, name)) {
      const found = stepsIn(text, kind, live);
      if (!found.ok) return setTrouble(found.faults.map(sayFault).join(' '));
      const read = found.value;
      setTrouble(read.length === 0 ? 'No text was found in it. Choose another file, or paste the text.' : null);
      if (read.length > 0) begin({ name, kind, text }, read);
    },
    forget: () => begin(null, []),
    setTrimFiller(on) {
      // The same numbers stay decided; should there be others now, they are asked for anew.
      const next = live ? numbersOf(prepareSteps(draft, { live, trimFiller: on })) : [];
      if (next.length !== numbers.length) setDecisions(new Map());
      setTrim(on);
    },
    goTo,
    step: (by) => current && goTo(current.id + by),
    decide(decision) {
      const next = change(decision);
      const open = numbers.filter(({ id }) => !next.has(id));
      const following = open.find(({ id }) => current !== null && id > current.id) ?? open[0];
      if (following) goTo(following.id);
    },
    undecide: () => void change(null),
    takeCertain() {
      const next = acceptCertain(steps, decisions);
      setDecisions(next);
      const open = numbers.find(({ id }) => !next.has(id));
      if (open) goTo(open.id);
    },
  };
}

function stepsIn(text: string, kind: SourceKind, live: LiveFigures | null): Result<readonly DraftStep[]> {
  if (kind === 'html') return { ok: true, value: stepsOfHtml(text) };
  const cues = readSource(text, kind);
  const pieces = live?.figures.pieces.map(({ name }) => name) ?? [];
  return cues.ok ? { ok: true, value: splitIntoSteps(cues.value, { pieces }) } : cues;
}
