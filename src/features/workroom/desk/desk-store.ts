import { atom, computed, type ReadableAtom } from 'nanostores';
import {
  cleanName,
  compilePattern,
  evaluate,
  keyOf,
  renamedBack,
  type Model,
  type Pattern,
  type Rename,
  type Result,
  type Sizing,
} from '@/engine';
import { litBy, type Lit } from '@/features/projects/followers';
import { begin, edit, rebase, redo, settle, undo, type History } from '@/features/projects/history';
import { mergeParts } from '@/features/projects/merge';
import type { OpenProject, ProjectState } from '@/features/projects/project';
import { proofList, type ProofItem } from '@/features/projects/proof';
import { renameInProject, type RenamedPlaces } from '@/features/projects/rename';
import type { WriteUp } from '@/writeup/document';
import type { LiveFigures } from '@/writeup/live';
import { renameInWriteUp } from '@/writeup/rename';
import { sameState } from '../saving/same-state';

/** Everything but the write-up, which has an undo of its own. */
export type Draft = Omit<ProjectState, 'writeUp'>;

export interface Work {
  readonly compiled: Result<Model>;
  /** At the author's size; the last good figures while the pattern does not read, null when there never were any. */
  readonly live: LiveFigures | null;
  /** `live` is older than what is typed. */
  readonly stale: boolean;
}

export interface DeskStore {
  readonly $history: ReadableAtom<History<Draft>>;
  readonly $draft: ReadableAtom<Draft>;
  readonly $writeUp: ReadableAtom<WriteUp>;
  readonly $state: ReadableAtom<ProjectState>;
  readonly $work: ReadableAtom<Work>;
  /** What the editor shows its figures from. */
  readonly $live: ReadableAtom<LiveFigures | null>;
  readonly $proof: ReadableAtom<readonly ProofItem[]>;
  /** A size that is only shown, as when a slider plays; null while the author's own is. */
  readonly $played: ReadableAtom<Sizing | null>;
  readonly $selected: ReadableAtom<string | null>;
  readonly $lit: ReadableAtom<Lit | null>;
  /** The same as names: the selected one, then its followers. */
  readonly $litNames: ReadableAtom<readonly string[]>;
  /** Raised when the whole state was replaced and the editor must begin anew. */
  readonly $generation: ReadableAtom<number>;
  /** The write-up after names in it were last changed from outside the editor, which takes them over. */
  readonly $renamed: ReadableAtom<WriteUp | null>;
  /** The write-up after another's changes came into it from outside the editor, which takes them over. */
  readonly $merged: ReadableAtom<WriteUp | null>;
  /** Edits of one `field` in a row are one step back. */
  edit(field: string | null, change: (draft: Draft) => Draft): void;
  editPattern(field: string | null, change: (pattern: Pattern) => Pattern): void;
  editSizing(field: string | null, change: (sizing: Sizing) => Sizing): void;
  /** Renames in the pattern, the author's size and the write-up at once; undone and done again in all three too. */
  rename(rename: Rename): Result<RenamedPlaces>;
  /** Shows a size without changing the author's own; the next edit ends it. */
  play(sizing: Sizing | null): void;
  settle(): void;
  undo(): void;
  redo(): void;
  setWriteUp(writeUp: WriteUp): void;
  replace(state: ProjectState): void;
  /** Takes over a state that holds what is here and another's changes: undo goes on taking back only what was done here. */
  takeMerged(state: ProjectState): void;
  select(name: string | null): void;
}

const draftOf = ({ title, summary, minutes, hero, pattern, sizing }: ProjectState): Draft => ({
  title,
  summary,
  minutes,
  hero,
  pattern,
  sizing,
});

/** The one place where the desk's columns meet: what is typed, what follows from it, and what is selected. */
export function createDeskStore(project: OpenProject): DeskStore {
  const $history = atom(begin(draftOf(project.state)));
  const $writeUp = atom(project.state.writeUp);
  const $selected = atom<string | null>(null);
  const $generation = atom(0);
  const $renamed = atom<WriteUp | null>(null);
  const $merged = atom<WriteUp | null>(null);
  /** The drafts that a rename made, each with the one that it was made from. */
  const renames = new WeakMap<Draft, { readonly before: Draft; readonly rename: Rename }>();
  const $draft = computed($history, (history) => history.present);
  const $state = computed([$draft, $writeUp], (draft, writeUp): ProjectState => ({ ...draft, writeUp }));

  const work = createWork();
  // The state that is opened counts as good, whether or not anything has looked at its figures before it is changed.
  work(project.state.pattern, project.state.sizing);
  const $played = atom<Sizing | null>(null);
  const $work = computed([$draft, $played], (draft, played) => work(draft.pattern, played ?? draft.sizing));
  const $live = computed($work, (now) => now.live);
  /** What is wrong is told of the author's own size: while another is played it stands as it was. */
  let proof: readonly ProofItem[] = [];
  const $proof = computed([$state, $work, $played], (state, now, played) => {
    if (played === null)
      proof = proofList(state, { compiled: now.compiled, figures: now.stale ? undefined : now.live?.figures });
    return proof;
  });
  const $lit = computed([$selected, $draft], (selected, draft) =>
    selected === null ? null : litBy(draft.pattern, selected),
  );

  const $litNames = computed($lit, (lit): readonly string[] => (lit === null ? [] : [lit.selected, ...lit.followers]));

  const takeNames = (writeUp: WriteUp, { what, from, to }: Rename) => {
    const selected = $selected.get();
    if ((what === 'measure' || what === 'choice') && selected !== null && keyOf(selected) === keyOf(from))
      $selected.set(to);
    $writeUp.set(writeUp);
    $renamed.set(writeUp);
  };
  /** Undo and redo leave the write-up alone, except that its names go with the pattern's. */
  const step = (move: (history: History<Draft>) => History<Draft>) => {
    const was = $draft.get();
    $history.set(move($history.get()));
    const now = $draft.get();
    const [back, forth] = [renames.get(was), renames.get(now)];
    const rename = back?.before === now ? renamedBack(back.rename) : forth?.before === was ? forth.rename : undefined;
    if (rename === undefined) return;
    const writeUp = $writeUp.get();
    const doc = renameInWriteUp(writeUp.doc, rename);
    takeNames(doc.ok ? { ...writeUp, doc: doc.value } : writeUp, rename);
  };

  const store: DeskStore = {
    $history,
    $draft,
    $writeUp,
    $state,
    $work,
    $live,
    $proof,
    $played,
    $selected,
    $lit,
    $litNames,
    $generation,
    $renamed,
    $merged,
    edit(field, change) {
      $played.set(null);
      $history.set(edit($history.get(), change($history.get().present), field));
    },
    play: (sizing) => $played.set(sizing),
    editPattern: (field, change) => store.edit(field, (draft) => ({ ...draft, pattern: change(draft.pattern) })),
    editSizing: (field, change) => store.edit(field, (draft) => ({ ...draft, sizing: change(draft.sizing) })),
    rename(given) {
      const rename = { ...given, to: cleanName(given.to) };
      const renamed = renameInProject($state.get(), rename);
      if (!renamed.ok) return renamed;
      const { state, places } = renamed.value;
      const [before, after] = [$draft.get(), draftOf(state)];
      renames.set(after, { before, rename });
      $history.set(edit($history.get(), after));
      takeNames(state.writeUp, rename);
      return { ok: true, value: places };
    },
    settle: () => $history.set(settle($history.get())),
    undo: () => step(undo),
    redo: () => step(redo),
    setWriteUp: (writeUp) => $writeUp.set(writeUp),
    replace(state) {
      $history.set(edit($history.get(), draftOf(state)));
      $writeUp.set(state.writeUp);
      $generation.set($generation.get() + 1);
    },
    takeMerged(state) {
      const [base, writeUp] = [$history.get().present, state.writeUp];
      const carry = (draft: Draft) =>
        draftOf(mergeParts({ base: { ...base, writeUp }, mine: { ...draft, writeUp }, other: state }).state);
      if (!sameState(base, draftOf(state))) $history.set(rebase($history.get(), draftOf(state), carry));
      if (sameState($writeUp.get(), writeUp)) return;
      $writeUp.set(writeUp);
      $merged.set(writeUp);
    },
    select: (name) => $selected.set(name),
  };
  return store;
}

/** Works a pattern out, no more often than it changes, and keeps the last figures that were good. */
function createWork(): (pattern: Pattern, sizing: Sizing) => Work {
  let pattern: Pattern | null = null;
  let sizing: Sizing | null = null;
  let last: Work | null = null;
  let good: LiveFigures | null = null;
  return (nextPattern, nextSizing) => {
    if (last !== null && pattern === nextPattern && sizing === nextSizing) return last;
    const compiled = last !== null && pattern === nextPattern ? last.compiled : compilePattern(nextPattern);
    pattern = nextPattern;
    sizing = nextSizing;
    if (compiled.ok) good = { model: compiled.value, figures: evaluate(compiled.value, nextSizing) };
    last = { compiled, live: good, stale: !compiled.ok };
    return last;
  };
}
