import { listRevisions, getRevision, type Revision } from '@/features/projects/revisions.server';
import { restoreRevision, type Asker } from '@/features/projects/projects.server';
import type { OpenProject } from '@/features/projects/project';
import { stateChanges, type ChangeGroup } from '@/features/projects/state-diff';
import { compilePattern } from '@/engine';
import { figureChanges, type FigureChanges } from '@/features/editions/figure-changes';
import { differenceWords } from '@/features/projects/project-stage';
import { readForm } from '@/features/http/form';

const A_PAGE = 60;

export interface RevisionLine {
  readonly revision: Revision;
  /** "2 steps differ", since the kept revision before it; empty for the first. */
  readonly words: string;
}
export interface RevisionPage {
  readonly lines: readonly RevisionLine[];
  /** There are older ones: the number to ask before. */
  readonly older: number | null;
  /** The two that are compared; null while there is only one. */
  readonly compared: {
    readonly from: Revision;
    readonly to: Revision;
    readonly groups: readonly ChangeGroup[];
    /** At the size shown first in `to`; null while one of them does not read. */
    readonly figures: FigureChanges | null;
  } | null;
}

/** The kept revisions and two of them compared: those in the address, else the newest with the one before it. */
export function loadRevisionPage(project: OpenProject, asker: Asker, params: URLSearchParams): RevisionPage {
  const before = numberIn(params.get('before'));
  const kept = listRevisions(project.id, asker, { limit: A_PAGE + 1, ...(before === null ? {} : { before }) }) ?? [];
  const shown = kept.slice(0, A_PAGE);
  const to = pick(project.id, asker, { n: numberIn(params.get('to')), among: kept }) ?? kept[0];
  const from =
    pick(project.id, asker, { n: numberIn(params.get('from')), among: kept }) ??
    kept.find(({ n }) => to !== undefined && n < to.n);
  return {
    lines: shown.map((revision, i) => {
      const earlier = kept[i + 1];
      return { revision, words: earlier ? differenceWords(earlier.state, revision.state) : '' };
    }),
    older: kept.length > A_PAGE ? (shown.at(-1)?.n ?? null) : null,
    compared:
      to && from ? { from, to, groups: stateChanges(from.state, to.state), figures: figuresBetween(from, to) } : null,
  };
}

/** A posted wish to restore: the words that say why not, or null when it is done. */
export async function postRestore(request: Request, id: string, asker: Asker): Promise<string | null> {
  const field = await readForm(request);
  const [n, revision] = [numberIn(field?.('n') ?? ''), numberIn(field?.('revision') ?? '')];
  if (n === null || revision === null) return 'Choose a revision to restore.';
  const saved = restoreRevision(id, asker, { n, revision });
  if (saved.ok) return null;
  return saved.code === 'changed meanwhile'
    ? `Revision ${saved.revision} was saved meanwhile. Look at what it changed, then restore once more.`
    : 'This revision is not kept any more, or its first picture is gone.';
}

function pick(
  id: string,
  asker: Asker,
  { n, among }: { readonly n: number | null; readonly among: readonly Revision[] },
): Revision | undefined {
  if (n === null) return undefined;
  return among.find((revision) => revision.n === n) ?? getRevision(id, n, asker) ?? undefined;
}

function figuresBetween(from: Revision, to: Revision): FigureChanges | null {
  const [was, is] = [compilePattern(from.state.pattern), compilePattern(to.state.pattern)];
  if (!was.ok || !is.ok) return null;
  return figureChanges(
    { model: was.value, writeUp: from.state.writeUp },
    { model: is.value, writeUp: to.state.writeUp },
    to.state.sizing,
  );
}

const numberIn = (text: string | null): number | null => (/^[1-9]\d{0,14}$/.test(text ?? '') ? Number(text) : null);
