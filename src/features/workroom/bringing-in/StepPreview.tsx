import { useEffect, useRef, type ReactNode } from 'react';
import { fillerIn } from '@/features/bringing-in/filler';
import type { Decision, PreparedNumber, PreparedParagraph, PreparedStep } from '@/features/bringing-in/prepare';
import { showLive, type LiveFigures } from '@/writeup/live';
import { momentText } from '@/writeup/video-moment';
import type { BringingIn } from './use-bringing-in';

export interface StepPreviewProps {
  readonly bringing: BringingIn;
  readonly live: LiveFigures;
  readonly onPick: (id: number) => void;
}

/** The steps as they would stand in the write-up, every number marked with what was decided of it. */
export function StepPreview({ bringing, live, onPick }: StepPreviewProps) {
  const { steps, draft, decisions, current, trimFiller } = bringing;
  const here = useRef<HTMLButtonElement>(null);
  useEffect(() => {
    // What it gives back is no clean-up: browsers differ in it.
    void here.current?.scrollIntoView({ block: 'nearest' });
  }, [current?.id]);
  const number = (one: PreparedNumber) => (
    <button
      key={one.id}
      ref={one.id === current?.id ? here : undefined}
      type="button"
      tabIndex={-1}
      className="brought-number"
      data-is={stateOf(one, decisions.get(one.id))}
      aria-current={one.id === current?.id ? true : undefined}
      onClick={() => onPick(one.id)}
    >
      {shown(one, decisions.get(one.id), live)}
    </button>
  );
  return (
    <ol className="brought-steps" aria-label="Steps">
      {steps.map((step, n) => (
        <li key={n}>
          <StepHead step={step} />
          {step.paragraphs.map((paragraph, p) => (
            <p key={p}>{marked(paragraph, number)}</p>
          ))}
          {trimFiller ? <LeftOut paragraphs={draft[n]?.paragraphs ?? []} /> : null}
        </li>
      ))}
    </ol>
  );
}

function StepHead({ step: { title, moment } }: { readonly step: PreparedStep }) {
  return (
    <h3>
      {title === '' ? <span className="soft">No title yet</span> : title}
      {moment === null ? null : <span className="brought-moment"> {momentText(Math.floor(moment))}</span>}
    </h3>
  );
}

function marked({ text, numbers }: PreparedParagraph, show: (number: PreparedNumber) => ReactNode): ReactNode[] {
  const parts: ReactNode[] = [];
  let at = 0;
  for (const number of numbers) {
    parts.push(text.slice(at, number.from), show(number));
    at = number.to;
  }
  return [...parts, text.slice(at)];
}

/** What trimming takes away, struck through in its sentence. */
function LeftOut({ paragraphs }: { readonly paragraphs: readonly string[] }) {
  const cuts = paragraphs.flatMap((text) =>
    fillerIn(text).map(({ from, to }) => ({
      before: text.slice(Math.max(0, from - 12), from),
      gone: text.slice(from, to),
    })),
  );
  if (cuts.length === 0) return null;
  return (
    <p className="brought-cuts">
      Left out:{' '}
      {cuts.map(({ before, gone }, n) => (
        <span key={n}>
          {before === '' ? '' : `…${before}`}
          <del>{gone}</del>{' '}
        </span>
      ))}
    </p>
  );
}

type NumberState = 'live' | 'plain' | 'certain' | 'open' | 'doubtful' | 'unmatched';
export function stateOf(number: PreparedNumber, decision: Decision | undefined): NumberState {
  if (decision === 'plain') return 'plain';
  if (decision !== undefined) return 'live';
  if (number.doubtful) return 'doubtful';
  if (number.certain) return 'certain';
  return number.matches.length === 0 ? 'unmatched' : 'open';
}

function shown({ text, from, hasUnit }: PreparedNumber, decision: Decision | undefined, live: LiveFigures): ReactNode {
  if (decision === undefined || decision === 'plain') return text;
  const { formula, reading } = decision.take;
  const figure = showLive(live, { formula, bare: !hasUnit });
  return (
    <>
      {text.slice(0, reading.from - from)}
      <span className="measure">{figure?.typeset ?? formula}</span>
    </>
  );
}
