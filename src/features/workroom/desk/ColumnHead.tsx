import { useRef, type ReactNode } from 'react';
import { Icon } from '@/components/Icon';

export interface ColumnHeadProps {
  readonly title: string;
  readonly shortcut: string;
  /** What the selection lights in this column, in words; null when nothing is selected. */
  readonly lit: string | null;
  /** What a lit place looks like in this column. */
  readonly places?: string;
  /** Steps through the lit places in another way than scrolling to them. */
  readonly onStep?: (by: 1 | -1) => void;
  /** What can be begun in this column. */
  readonly action?: ReactNode;
}

/** A column's name, its key, and how many places the selected measure lights in it, with previous and next. */
export function ColumnHead({ title, shortcut, lit, places = '[data-lit]', onStep, action }: ColumnHeadProps) {
  const head = useRef<HTMLElement>(null);
  const at = useRef(-1);
  const step = (by: 1 | -1) => {
    if (onStep !== undefined) return onStep(by);
    const found = [...(head.current?.closest('.desk-column')?.querySelectorAll<HTMLElement>(places) ?? [])];
    if (found.length === 0) return;
    at.current = (Math.max(at.current, by === 1 ? -1 : found.length) + by + found.length) % found.length;
    const place = found[at.current];
    place?.scrollIntoView({ block: 'center', behavior: 'smooth' });
    place?.animate?.([{ outline: '3px solid var(--plum)' }, { outline: '3px solid transparent' }], { duration: 900 });
  };
  return (
    <header className="column-head" ref={head}>
      <h2>{title}</h2>
      <kbd>{shortcut}</kbd>
      <span className="gap" />
      {lit === null ? null : (
        <span className="lit-count">
          <i aria-hidden="true" />
          <span aria-live="polite">{lit}</span>
          <button type="button" onClick={() => step(-1)}>
            <Icon name="chevron-up" label={`Previous lit place in ${title.toLowerCase()}`} />
          </button>
          <button type="button" onClick={() => step(1)}>
            <Icon name="chevron-down" label={`Next lit place in ${title.toLowerCase()}`} />
          </button>
        </span>
      )}
      {action}
    </header>
  );
}
