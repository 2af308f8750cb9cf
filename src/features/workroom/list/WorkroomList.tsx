import { useEffect, useMemo, useRef, useState } from 'react';
import useSWR from 'swr';
import { Icon } from '@/components/Icon';
import { TabButton } from '@/components/TabButton';
import { matchesSearch, type ProjectList, type ProjectSummary } from '@/features/projects/project';
import { call } from '../desk/project-api';
import { BLANK_START, NewProject, type ShelfPattern } from './NewProject';
import { OwnPatterns } from './OwnPatterns';
import { PatternShelf } from './PatternShelf';
import { ProjectRow } from './ProjectRow';
import { UndoDelete, type Deleted } from './UndoDelete';

export interface WorkroomListProps {
  readonly list: ProjectList;
  readonly patterns: readonly ShelfPattern[];
  /** The author's own. */
  readonly own: readonly ShelfPattern[];
  /** Shows whose project it is, for those who see everybody's. */
  readonly withAuthors: boolean;
  /** Slug of a pattern to begin a project from at once: `/workroom?pattern=tray`. */
  readonly begin: string | null;
  /** When the page was made, in milliseconds: what "today" is until the browser says its own. */
  readonly now: number;
}
const FILTERS = [
  { id: 'all', label: 'All', holds: () => true },
  { id: 'draft', label: 'Drafts', holds: (project: ProjectSummary) => project.stage.stage === 'draft' },
  { id: 'changed', label: 'Changed since', holds: (project: ProjectSummary) => project.stage.stage === 'changed' },
  { id: 'published', label: 'Published', holds: (project: ProjectSummary) => project.stage.stage === 'published' },
] as const;
type Filter = (typeof FILTERS)[number]['id'];

async function fetchList(path: string): Promise<ProjectList> {
  const answer = await call<ProjectList>(path);
  if (!answer.ok) throw new Error(answer.refusal.sentence);
  return answer.value;
}

/** The author's projects: found, filtered, begun, copied, deleted and brought back. */
export function WorkroomList({ list, patterns, own: ownFirst, withAuthors, begin, now }: WorkroomListProps) {
  const {
    data = list,
    error,
    mutate,
  } = useSWR<ProjectList, Error>('/api/projects', fetchList, { fallbackData: list, revalidateOnMount: false });
  const [query, setQuery] = useState('');
  const [filter, setFilter] = useState<Filter>('all');
  const [begun, setBegun] = useState<string | true | null>(() =>
    [BLANK_START, ...ownFirst, ...patterns].some(({ slug }) => slug === begin) ? begin : null,
  );
  const [own, setOwn] = useState(ownFirst);
  const startable = useMemo(() => [BLANK_START, ...own, ...patterns], [own, patterns]);
  const [deleted, setDeleted] = useState<Deleted | null>(null);
  const [trouble, setTrouble] = useState<string | null>(null);
  const find = useSlashKey();

  const found = useMemo(() => data.projects.filter((project) => matchesSearch(project, query)), [data, query]);
  const holds = FILTERS.find((known) => known.id === filter)?.holds ?? (() => true);
  const shown = found.filter(holds);

  const act = async (path: string, method: 'POST' | 'DELETE', body?: unknown) => {
    const answer = await call<{ id?: string }>(path, { method, body });
    setTrouble(answer.ok ? null : answer.refusal.sentence);
    await mutate();
    return answer.ok;
  };

  return (
    <>
      <div className="workroom-head">
        <div>
          <h1>Workroom</h1>
          <p className="soft">{countWords(data.projects)}</p>
        </div>
        <div className="find">
          <label htmlFor="find-project">Find a project, piece or measure</label>
          <Icon name="search" />
          <input
            ref={find}
            id="find-project"
            type="search"
            className="input"
            placeholder="for example: arc"
            value={query}
            onChange={(event) => setQuery(event.currentTarget.value)}
          />
          <kbd>/</kbd>
        </div>
        <TabButton onClick={() => setBegun(true)}>
          <Icon name="plus" /> New project
        </TabButton>
      </div>
      {error || trouble ? (
        <div className="problem" role="alert">
          <p>{trouble ?? error?.message}</p>
        </div>
      ) : null}
      <div className="paper">
        <nav className="project-filter" aria-label="Which projects">
          {FILTERS.map(({ id, label, holds: fits }) => (
            <button
              key={id}
              type="button"
              aria-current={filter === id ? 'true' : undefined}
              onClick={() => setFilter(id)}
            >
              {label} <b>{found.filter(fits).length}</b>
            </button>
          ))}
          <span className="project-order small soft">Last touched first</span>
        </nav>
        <div className="project-columns" aria-hidden="true">
          <FlatScale pixels={data.pixelsAnInch} />
          <span>Folded</span>
          <span>Project</span>
          <span>State</span>
          <span>Last touched</span>
        </div>
        {shown.length === 0 ? <p className="project-none">{noneWords(data.projects.length, query)}</p> : null}
        <ul className="project-list">
          {shown.map((project, i) => (
            <ProjectRow
              key={project.id}
              project={project}
              first={i === 0}
              withAuthor={withAuthors}
              now={now}
              onCopy={() => void act(`/api/projects/${project.id}/duplicate`, 'POST', {})}
              onDelete={() =>
                void act(`/api/projects/${project.id}`, 'DELETE').then((done) => {
                  if (done)
                    setDeleted({ id: project.id, title: project.title, published: project.stage.stage !== 'draft' });
                })
              }
            />
          ))}
        </ul>
      </div>
      <UndoDelete
        deleted={deleted}
        onUndo={async (id) => {
          if (await act(`/api/projects/${id}/restore`, 'POST')) setDeleted(null);
        }}
        onDismiss={() => setDeleted(null)}
      />
      <OwnPatterns patterns={own} onChoose={setBegun} onChange={setOwn} />
      <PatternShelf patterns={patterns} onChoose={setBegun} />
      <NewProject
        patterns={startable}
        open={begun !== null}
        chosen={typeof begun === 'string' ? begun : null}
        onClose={() => setBegun(null)}
      />
    </>
  );
}

/** "/" puts the caret into the search, unless something is being typed elsewhere. */
function useSlashKey() {
  const field = useRef<HTMLInputElement>(null);
  useEffect(() => {
    const press = (event: KeyboardEvent) => {
      const typing =
        event.target instanceof Element &&
        event.target.closest('input, textarea, select, dialog, [contenteditable]') !== null;
      if (event.key !== '/' || typing || event.ctrlKey || event.metaKey || event.altKey) return;
      event.preventDefault();
      field.current?.focus();
    };
    document.addEventListener('keydown', press);
    return () => document.removeEventListener('keydown', press);
  }, []);
  return field;
}

function FlatScale({ pixels }: { readonly pixels: number }) {
  const every = pixels >= 8 ? 1 : pixels >= 4 ? 2 : 6;
  const ticks = Array.from({ length: Math.floor(144 / (pixels * every)) + 1 }, (_, i) => i * pixels * every);
  return (
    <span className="flat-scale">
      Flat, one scale: a tick is {every} in
      <svg width="148" height="12">
        {ticks.map((x, i) => (
          <line key={x} x1={x + 0.5} x2={x + 0.5} y1={i % 5 === 0 ? 0 : 6} y2="12" />
        ))}
      </svg>
    </span>
  );
}

function countWords(projects: readonly ProjectSummary[]): string {
  if (projects.length === 0)
    return 'No projects yet. Choose a pattern below: it comes with its measures, pieces and making instructions.';
  const waiting = projects.filter((project) => project.stage.stage === 'changed').length;
  const all = projects.length === 1 ? 'One project.' : `${projects.length} projects.`;
  if (waiting === 0) return all;
  return `${all} ${waiting === 1 ? 'One is' : `${waiting} are`} changed since the last edition.`;
}

const noneWords = (all: number, query: string): string =>
  all === 0
    ? 'Nothing here yet. Begin with “New project”.'
    : query.trim() === ''
      ? 'None of your projects is in this state.'
      : `Nothing of yours has “${query.trim()}” in its title, pieces or measures.`;
