import { useStore } from '@nanostores/react';
import { useEffect, useMemo, useState } from 'react';
import type { Planned } from '@/features/projects/planned';
import type { OpenProject } from '@/features/projects/project';
import { stageOf, type Stage } from '@/features/projects/project-stage';
import { blocking, type ProofItem } from '@/features/projects/proof';
import { ConflictBanner } from './ConflictBanner';
import { DeskHeader } from './DeskHeader';
import { DeskMark } from './DeskMark';
import { cureFor } from './cures';
import { createDeskStore } from './desk-store';
import { FactsDialog } from './FactsDialog';
import { DeskFinder, type FinderDialog } from './find/DeskFinder';
import { FoldGrip } from './FoldGrip';
import { goToPlace } from './go-to-place';
import { MeasuresColumn } from './MeasuresColumn';
import { PiecesColumn } from './PiecesColumn';
import { PlannedNote } from './PlannedNote';
import { ProofStrip } from './ProofStrip';
import { PublishDialog } from './PublishDialog';
import { ShareDialog } from './ShareDialog';
import { useDeskKeys } from './use-desk-keys';
import { useRangeCheck } from './use-range-check';
import { useSaving } from './use-saving';
import { WriteUpColumn } from './WriteUpColumn';

export type Column = 'measures' | 'pieces' | 'write-up';
const COLUMNS: readonly { readonly id: Column; readonly label: string }[] = [
  { id: 'measures', label: 'Measures' },
  { id: 'pieces', label: 'Pieces' },
  { id: 'write-up', label: 'Write-up' },
];

interface DeskProps {
  readonly project: OpenProject;
  readonly planned: Planned | null;
}

/** One project on one sheet folded in three: measures, pieces, write-up. What is selected in one lights up in the others. */
export default function Desk({ project, planned: plan }: DeskProps) {
  const store = useMemo(() => createDeskStore(project), [project]);
  const saving = useSaving(store, project);
  const found = useStore(store.$proof);
  const inRange = useRangeCheck(store);
  const proof = useMemo(() => [...found, ...inRange], [found, inRange]);
  const [open, setOpen] = useState<Column>('write-up');
  /** Which of measures and pieces lies beside the write-up where there is room for two. */
  const [side, setSide] = useState<'measures' | 'pieces'>('measures');
  const [piece, setPiece] = useState<string | null>(null);
  const [listOpen, setListOpen] = useState(() => location.hash === '#proof');
  const [dialog, setDialog] = useState<'facts' | 'share' | 'publish' | FinderDialog | null>(null);
  const [planned, setPlanned] = useState(plan);
  const [withdrawn, setWithdrawn] = useState(project.withdrawn);
  const [slug, setSlug] = useState(project.slug);
  const [published, setPublished] = useState<{ readonly edition: number; readonly revision: number | null }>(() =>
    publishedOf(project),
  );

  const show = (column: Column) => {
    setOpen(column);
    if (column !== 'write-up') setSide(column);
  };
  const focusColumn = (column: Column) => {
    show(column);
    requestAnimationFrame(() => document.querySelector<HTMLElement>(`[data-column="${column}"]`)?.focus());
  };
  useDeskKeys({ store, focusColumn, toggleProof: () => setListOpen((was) => !was), find: setDialog });
  useEffect(() => {
    const settle = () => store.settle();
    document.addEventListener('focusout', settle);
    return () => document.removeEventListener('focusout', settle);
  }, [store]);

  const stops = blocking(proof);
  const { revision, status } = saving.state;
  const stage: Stage = stageOf({
    editions: published.edition,
    publishedRevision: published.revision,
    revision: status.kind === 'saved' ? revision : -1,
  });
  const next = published.edition + 1;
  const hindrance =
    stops.length > 0
      ? `${stops.length === 1 ? 'One thing keeps' : `${stops.length} things keep`} this from being published: ${stops.map((item) => item.title).join('; ')}.`
      : stage.stage === 'published'
        ? `Nothing has changed since edition ${published.edition}.`
        : null;

  const go = (to: Pick<ProofItem, 'place'> & Partial<Pick<ProofItem, 'code'>>) => {
    setListOpen(false);
    if (to.place.column === 'facts') {
      if (to.place.name !== 'title') setDialog('facts');
    } else show(to.place.column);
    if (to.place.column === 'pieces' && to.place.name !== undefined) setPiece(to.place.name);
    goToPlace(to, store);
  };
  const publish = () => {
    if (hindrance === null) setDialog('publish');
    else if (stops.length > 0) setListOpen(true);
  };
  const preview = `/workroom/${project.id}/preview`;
  const revisions = `/workroom/${project.id}/revisions`;
  const publishLabel = stage.stage === 'published' ? `Edition ${published.edition} is out` : `Publish edition ${next}`;
  const visit = (address: string) => () => location.assign(address);

  return (
    <div className="desk" data-open={open} data-side={side}>
      <DeskHeader
        store={store}
        saving={saving}
        stage={stage}
        mark={<DeskMark />}
        preview={preview}
        revisions={revisions}
        withdrawn={withdrawn !== null}
        publishLabel={publishLabel}
        hindrance={hindrance}
        mailing={published.edition > 0 && project.standing !== 'co-author' ? `/workroom/${project.id}/mailing` : null}
        onFind={() => setDialog('go to')}
        onFacts={() => setDialog('facts')}
        onShare={() => setDialog('share')}
        onPublish={publish}
      />
      <div className="ruled" aria-hidden="true" />
      <ConflictBanner saving={saving} />
      {planned === null ? null : (
        <div className="desk-planned">
          <PlannedNote projectId={project.id} planned={planned} onPlanned={setPlanned} />
        </div>
      )}
      <div className="desk-switch" role="tablist" aria-label="Parts of the desk">
        {COLUMNS.map(({ id, label }) => (
          <button
            key={id}
            type="button"
            role="tab"
            data-tab={id}
            aria-selected={open === id || (id === side && open === 'write-up')}
            data-alone={open === id ? '' : undefined}
            onClick={() => show(id)}
          >
            {label}
          </button>
        ))}
      </div>
      <div className="desk-sheet">
        <MeasuresColumn store={store} />
        <FoldGrip between="measures" />
        <PiecesColumn store={store} piece={piece} onPiece={setPiece} />
        <FoldGrip between="pieces" />
        <WriteUpColumn store={store} projectId={project.id} />
      </div>
      <ProofStrip
        items={proof}
        open={listOpen}
        onOpen={setListOpen}
        onGo={go}
        cureOf={(item) => cureFor(item, store)}
      />
      <DeskFinder
        store={store}
        open={dialog === 'go to' || dialog === 'keys' ? dialog : null}
        onOpen={setDialog}
        onGo={(place) => go({ place })}
        acts={[
          { label: 'Facts', what: 'summary, time, picture, address', act: () => setDialog('facts') },
          { label: 'People', what: 'co-authors and draft links', act: () => setDialog('share') },
          { label: 'Proof list', what: 'Alt P', act: () => setListOpen(true) },
          { label: 'Undo', what: 'outside the write-up', act: store.undo },
          { label: 'Redo', what: 'outside the write-up', act: store.redo },
          { label: 'See as reader', what: 'preview', act: visit(preview) },
          { label: 'Revisions', what: 'what was kept', act: visit(revisions) },
          { label: publishLabel, what: 'for readers', hindrance, act: publish },
        ]}
      />
      <FactsDialog
        open={dialog === 'facts'}
        store={store}
        projectId={project.id}
        slug={slug}
        published={published.edition > 0}
        standing={project.standing}
        withdrawn={withdrawn}
        onWithdrawn={setWithdrawn}
        onSlug={setSlug}
        onClose={() => setDialog(null)}
      />
      <ShareDialog
        open={dialog === 'share'}
        projectId={project.id}
        standing={project.standing}
        owner={project.author.name}
        onClose={() => setDialog(null)}
      />
      <PublishDialog
        open={dialog === 'publish'}
        projectId={project.id}
        edition={next}
        advice={proof.filter((item) => !item.blocking)}
        flush={saving.flush}
        planned={planned}
        onPlanned={(now) => {
          setPlanned(now);
          if (now !== null) setDialog(null);
        }}
        onClose={() => setDialog(null)}
        onPublished={(done) => {
          setPlanned(null);
          setWithdrawn(null);
          setPublished({ edition: done.n, revision: done.revision });
          setSlug(done.slug);
          setDialog(null);
          saving.say({
            words: `Edition ${done.n} is out.`,
            link: { href: `/projects/${done.slug}`, words: 'See it as readers do' },
          });
        }}
      />
    </div>
  );
}

const publishedOf = ({ stage, revision }: OpenProject) =>
  stage.stage === 'draft'
    ? { edition: 0, revision: null }
    : { edition: stage.edition, revision: stage.stage === 'published' ? revision : null };
