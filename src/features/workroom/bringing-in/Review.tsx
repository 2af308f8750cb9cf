import { useState, type KeyboardEvent } from 'react';
import { Field } from '@/components/Field';
import { stepNodes, type Decision } from '@/features/bringing-in/prepare';
import type { StepNode } from '@/writeup/document';
import { videoHref } from '@/writeup/links';
import type { LiveFigures } from '@/writeup/live';
import { NumberPanel } from './NumberPanel';
import { StepPreview, stateOf } from './StepPreview';
import type { BringingIn } from './use-bringing-in';

export interface ReviewProps {
  readonly bringing: BringingIn;
  readonly live: LiveFigures;
  /** Why the original could not be kept. */
  readonly refusal: string | null;
  readonly busy: boolean;
  readonly onPutIn: (steps: readonly StepNode[], kept: boolean) => void;
}

/** The second page of the dialog: the steps, and one number at a time to accept, choose or keep. */
export function Review({ bringing, live, refusal, busy, onPutIn }: ReviewProps) {
  const { steps, numbers, decisions, current, trimFiller } = bringing;
  const [video, setVideo] = useState('');
  const timed = steps.some(({ moment }) => moment !== null);
  const address = videoHref(video);
  const count = (...states: readonly string[]) =>
    numbers.filter((number) => states.includes(stateOf(number, decisions.get(number.id)))).length;
  const certain = count('certain');
  const decide = (decision: Decision) => bringing.decide(decision);

  const onKey = (event: KeyboardEvent) => {
    const { target, key } = event;
    const typing = target instanceof HTMLInputElement && target.type !== 'checkbox';
    if (typing || event.ctrlKey || event.metaKey || event.altKey) return;
    // A button does its own, but the numbers are only places to be at.
    if (key === 'Enter' && target instanceof HTMLButtonElement && !target.matches('.brought-number')) return;
    const match =
      key === 'Enter' ? current?.matches[0] : /^[1-9]$/.test(key) ? current?.matches[Number(key) - 1] : undefined;
    const act = match ? () => decide({ take: match }) : KEYS[key.length === 1 ? key.toLowerCase() : key];
    if (!act) return;
    event.preventDefault();
    act(bringing);
  };

  return (
    // Keys count wherever the focus is in here, but in fields.
    <div className="bringing-in-review" tabIndex={-1} ref={focusOnce} onKeyDown={onKey}>
      <div className="brought-bar">
        <p aria-live="polite">
          <b>{steps.length === 1 ? '1 step' : `${steps.length} steps`}</b>, {count('live')} live, {certain} certain,{' '}
          {count('open', 'doubtful')} to look at, {count('plain', 'unmatched')} plain
        </p>
        <button type="button" className="btn small-btn" disabled={certain === 0} onClick={bringing.takeCertain}>
          Accept all certain <kbd>A</kbd>
        </button>
        <label className="check">
          <input
            type="checkbox"
            checked={trimFiller}
            onChange={(event) => bringing.setTrimFiller(event.currentTarget.checked)}
          />
          Leave out filler words
        </label>
      </div>
      <div className="brought-columns">
        <StepPreview bringing={bringing} live={live} onPick={bringing.goTo} />
        <div className="brought-side">
          <NumberPanel
            bringing={bringing}
            live={live}
            onTake={(match) => decide({ take: match })}
            onKeep={() => decide('plain')}
          />
          <p className="hint">
            <kbd>Enter</kbd> accept, <kbd>1</kbd>–<kbd>9</kbd> choose, <kbd>K</kbd> keep, <kbd>↓</kbd> next,{' '}
            <kbd>↑</kbd> previous
          </p>
          {timed ? (
            <Field
              label="Address of the video"
              hint="With it, each step leads to its moment; without it, the time stands there alone."
              error={video !== '' && address === null ? 'An address that begins with https:// is needed.' : undefined}
            >
              {(control) => (
                <input
                  {...control}
                  className="input"
                  type="url"
                  value={video}
                  onChange={(event) => setVideo(event.currentTarget.value)}
                />
              )}
            </Field>
          ) : null}
        </div>
      </div>
      {refusal === null ? null : (
        <p className="problem" role="alert">
          The original could not be kept. {refusal}
        </p>
      )}
      <div className="dialog-deeds">
        <button
          type="button"
          className="tab-button"
          disabled={busy || (video !== '' && address === null)}
          onClick={() => onPutIn(stepNodes(steps, decisions, address), refusal === null)}
        >
          {busy ? 'Putting in…' : refusal === null ? 'Put into the write-up' : 'Put in without keeping it'}
        </button>
        <button type="button" className="btn" onClick={bringing.forget}>
          Another text
        </button>
      </div>
    </div>
  );
}

const KEYS: Readonly<Record<string, (bringing: BringingIn) => void>> = {
  k: (bringing) => bringing.decide('plain'),
  a: (bringing) => bringing.takeCertain(),
  n: (bringing) => bringing.step(1),
  p: (bringing) => bringing.step(-1),
  ArrowDown: (bringing) => bringing.step(1),
  ArrowUp: (bringing) => bringing.step(-1),
  Backspace: (bringing) => bringing.undecide(),
};

const focusOnce = (element: HTMLElement | null): void => {
  if (element && !element.contains(document.activeElement)) element.focus({ preventScroll: true });
};
