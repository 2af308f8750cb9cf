import { useStore } from '@nanostores/react';
import type { ReactNode } from 'react';
import { Icon } from '@/components/Icon';
import { TITLE_LIMIT } from '@/features/projects/project';
import { stageWords, type Stage } from '@/features/projects/project-stage';
import type { DeskStore } from './desk-store';
import { SaveWords } from './SaveWords';
import type { Saving } from './use-saving';

export interface DeskHeaderProps {
  readonly store: DeskStore;
  readonly saving: Saving;
  readonly stage: Stage;
  /** The mark that leads home. */
  readonly mark: ReactNode;
  readonly preview: string;
  /** Where the kept revisions are. */
  readonly revisions: string;
  readonly withdrawn: boolean;
  readonly publishLabel: string;
  readonly onFind: () => void;
  readonly onFacts: () => void;
  readonly onShare: () => void;
  readonly onPublish: () => void;
  /** Why it cannot be published now; null when it can. */
  readonly hindrance: string | null;
  readonly mailing: string | null;
}

const STAGE_LOOK = {
  draft: { icon: 'draft', tone: 'quiet' },
  published: { icon: 'check', tone: 'good' },
  changed: { icon: 'pencil', tone: 'warn' },
} as const;

export function DeskHeader({
  store,
  saving,
  stage,
  mark,
  preview,
  revisions,
  withdrawn,
  publishLabel,
  onFind,
  onFacts,
  onShare,
  onPublish,
  hindrance,
  mailing,
}: DeskHeaderProps) {
  const draft = useStore(store.$draft);
  const history = useStore(store.$history);
  const look = STAGE_LOOK[stage.stage];
  return (
    <header className="desk-bar">
      <a className="desk-home" href="/workroom" aria-label="Workroom">
        {mark}
        <span>Workroom</span>
      </a>
      <h1 className="desk-title">
        <input
          aria-label="Title of the project"
          data-place="fact:title"
          value={draft.title}
          maxLength={TITLE_LIMIT}
          placeholder="Title of the project"
          onChange={(event) => {
            const title = event.currentTarget.value;
            store.edit('title', (now) => ({ ...now, title }));
          }}
        />
        <span aria-hidden="true">{draft.title || 'Title of the project'}</span>
      </h1>
      <span className={`state ${withdrawn ? 'warn' : look.tone}`}>
        <Icon name={withdrawn ? 'warning' : look.icon} />
        {withdrawn ? 'Withdrawn from readers' : stageWords(stage)}
      </span>
      <button type="button" className="bar-button" onClick={onFind} title="Alt G">
        <Icon name="search" /> <span className="bar-word">Go to</span>
      </button>
      <button type="button" className="bar-button" onClick={onFacts}>
        <Icon name="info" /> <span className="bar-word">Facts</span>
      </button>
      <button type="button" className="bar-button" onClick={onShare}>
        <Icon name="people" /> <span className="bar-word">People</span>
      </button>
      <span className="bar-undo">
        <button
          type="button"
          className="bar-button"
          disabled={history.past.length === 0}
          onClick={store.undo}
          aria-label="Undo outside the write-up"
          title="Ctrl Z"
        >
          <Icon name="undo" /> <span className="bar-word">Undo</span>
        </button>
        <button
          type="button"
          className="bar-button"
          disabled={history.future.length === 0}
          onClick={store.redo}
          aria-label="Redo outside the write-up"
          title="Ctrl Shift Z"
        >
          <Icon name="redo" /> <span className="bar-word">Redo</span>
        </button>
      </span>
      <span className="gap" />
      <SaveWords state={saving.state} revisions={revisions} />
      {mailing === null ? null : (
        <a className="bar-button" href={mailing}>
          <Icon name="mail" /> <span className="bar-word">Mailing</span>
        </a>
      )}
      <a className="btn small-btn" href={preview} target="_blank" rel="noopener">
        <Icon name="book" /> <span className="bar-word">See as reader</span>
      </a>
      <button
        type="button"
        className="tab-button small-tab"
        aria-disabled={hindrance !== null}
        aria-describedby={hindrance === null ? undefined : 'publish-hindrance'}
        title={hindrance ?? undefined}
        onClick={onPublish}
      >
        {hindrance === null ? null : <Icon name="lock" />}
        {publishLabel}
      </button>
      {hindrance === null ? null : (
        <span id="publish-hindrance" className="visually-hidden">
          {hindrance}
        </span>
      )}
    </header>
  );
}
