import { useEffect, useState } from 'react';
import { Icon } from '@/components/Icon';
import { TabButton } from '@/components/TabButton';
import type { ProjectSummary } from '@/features/projects/project';
import { stageWords } from '@/features/projects/project-stage';
import { touchedWords } from './touched-words';

export interface ProjectRowProps {
  readonly project: ProjectSummary;
  /** The one touched last is offered most plainly. */
  readonly first: boolean;
  readonly withAuthor: boolean;
  readonly now: number;
  readonly onCopy: () => void;
  readonly onDelete: () => void;
}
const LOOK = {
  draft: { icon: 'draft', tone: 'quiet' },
  published: { icon: 'check', tone: 'good' },
  changed: { icon: 'pencil', tone: 'warn' },
} as const;

export function ProjectRow({ project, first, withAuthor, now, onCopy, onDelete }: ProjectRowProps) {
  const { stage } = project;
  const look = LOOK[stage.stage];
  const desk = `/workroom/${project.id}`;
  const title = project.title || 'Untitled';
  return (
    <li className={first ? 'project-row now' : 'project-row'}>
      <div className="project-flat">
        {project.flat.length === 0 ? (
          <p className="no-pieces">Its formulas do not read yet</p>
        ) : (
          project.flat.map((svg, i) => <Svg key={i} svg={svg} />)
        )}
      </div>
      <div className="project-folded">{project.folded === null ? '–' : <Svg svg={project.folded} />}</div>
      <div className="project-name">
        <h3>
          <a href={desk}>{title}</a>
        </h3>
        <p className="small soft">
          {project.patternName}
          {project.size === '' ? '' : ` · ${project.size}`}
        </p>
        {withAuthor ? <p className="small soft">by {project.author.name}</p> : null}
        <p className="project-deeds">
          <button type="button" className="text-button small" onClick={onCopy} aria-label={`Copy ${title}`}>
            <Icon name="copy" /> Copy
          </button>
          <button type="button" className="text-button small" onClick={onDelete} aria-label={`Delete ${title}`}>
            <Icon name="trash" /> Delete
          </button>
        </p>
      </div>
      <div className="project-state">
        <p className={`state ${look.tone}`}>
          <Icon name={look.icon} />
          {stageWords(stage)}
        </p>
        <p className="small soft">
          {stage.stage === 'changed' ? project.difference : stage.stage === 'published' ? 'Nothing changed since' : ''}
        </p>
        <p className="small">
          {project.blocking > 0 ? (
            <a href={`${desk}#proof`}>
              {project.blocking === 1
                ? '1 thing before you can publish'
                : `${project.blocking} things before you can publish`}
            </a>
          ) : stage.stage === 'published' ? (
            <a href={`/projects/${project.slug}`}>See it as readers do</a>
          ) : (
            <span className="soft">Ready to publish</span>
          )}
        </p>
      </div>
      <div className="project-go">
        <p className="small soft">
          <Touched at={project.updatedAt} now={now} />
          <br />
          revision {project.revision}
        </p>
        {first ? (
          <TabButton small href={desk}>
            Open desk
          </TabButton>
        ) : (
          <a className="open-desk" href={desk} aria-label={`Open desk: ${title}`}>
            Open desk <Icon name="arrow-right" />
          </a>
        )}
      </div>
    </li>
  );
}

/** Drawn by the server from the engine's own shapes, with every text escaped. */
const Svg = ({ svg }: { readonly svg: string }) => <div className="drawn" dangerouslySetInnerHTML={{ __html: svg }} />;

/** The server knows no time zone of the reader's: the browser says the time again in its own. */
function Touched({ at, now }: { readonly at: number; readonly now: number }) {
  const [words, setWords] = useState(() => touchedWords(at, { now, timeZone: 'UTC' }));
  useEffect(() => setWords(touchedWords(at, { now: Date.now() })), [at]);
  return <time dateTime={new Date(at).toISOString()}>{words}</time>;
}
