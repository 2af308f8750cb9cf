import { useEffect, useRef } from 'react';
import { Icon } from '@/components/Icon';
import { blocking, type ProofItem } from '@/features/projects/proof';

export interface ProofStripProps {
  readonly items: readonly ProofItem[];
  readonly open: boolean;
  readonly onOpen: (open: boolean) => void;
  readonly onGo: (item: ProofItem) => void;
  /** The cure as a button's words, and what it does; null when the item has none. */
  readonly cureOf: (item: ProofItem) => { readonly label: string; readonly apply: () => void } | null;
}
const SHOWN = 3;

/** What keeps the project from being published, at the foot of the desk; opened, with what is worth a look. */
export function ProofStrip({ items, open, onOpen, onGo, cureOf }: ProofStripProps) {
  const stops = blocking(items);
  const advice = items.filter((item) => !item.blocking);
  const list = useRef<HTMLDivElement>(null);
  useEffect(() => {
    if (open) list.current?.focus();
  }, [open]);
  return (
    <footer className="proof" aria-label="Proof list">
      <div className="ruled" aria-hidden="true" />
      {open ? (
        <div
          className="proof-open"
          ref={list}
          tabIndex={-1}
          onKeyDown={(event) => {
            if (event.key === 'Escape') onOpen(false);
          }}
        >
          <ProofGroup
            title="Keeps it from being published"
            tone="bad"
            items={stops}
            empty="Nothing keeps this from being published."
            onGo={onGo}
            cureOf={cureOf}
          />
          <ProofGroup
            title="Worth a look"
            tone="warn"
            items={advice}
            empty="Nothing else to look at."
            onGo={onGo}
            cureOf={cureOf}
          />
        </div>
      ) : null}
      <div className="proof-row">
        <p className={stops.length > 0 ? 'proof-count bad' : 'proof-count good'}>
          <b>{stops.length}</b>
          <span>
            {stops.length === 0
              ? 'nothing in the way of publishing'
              : stops.length === 1
                ? 'thing before you can publish'
                : 'things before you can publish'}
          </span>
        </p>
        <ul className="proof-first">
          {open
            ? null
            : stops.slice(0, SHOWN).map((item, i) => <ProofLine key={i} item={item} onGo={onGo} cure={cureOf(item)} />)}
        </ul>
        <p className="proof-more">
          <button type="button" className="text-button small" aria-expanded={open} onClick={() => onOpen(!open)}>
            {open ? 'Close the proof list' : 'Open the proof list'} <Icon name={open ? 'chevron-down' : 'chevron-up'} />
          </button>
          <span className="small soft">
            {advice.length === 0 ? '' : `and ${advice.length} worth a look `}
            <kbd>Alt P</kbd>
          </span>
        </p>
      </div>
    </footer>
  );
}

interface ProofGroupProps extends Pick<ProofStripProps, 'items' | 'onGo' | 'cureOf'> {
  readonly title: string;
  readonly tone: 'bad' | 'warn';
  readonly empty: string;
}
function ProofGroup({ title, tone, items, empty, onGo, cureOf }: ProofGroupProps) {
  return (
    <section>
      <h2>
        {title} <span className="soft">{items.length}</span>
      </h2>
      {items.length === 0 ? (
        <p className="state good">
          <Icon name="check" /> {empty}
        </p>
      ) : (
        <ul className={`proof-list ${tone}`}>
          {items.map((item, i) => (
            <ProofLine key={i} item={item} detailed onGo={onGo} cure={cureOf(item)} />
          ))}
        </ul>
      )}
    </section>
  );
}

interface ProofLineProps {
  readonly item: ProofItem;
  readonly detailed?: boolean;
  readonly onGo: (item: ProofItem) => void;
  readonly cure: ReturnType<ProofStripProps['cureOf']>;
}
function ProofLine({ item, detailed, onGo, cure }: ProofLineProps) {
  return (
    <li className="proof-item">
      <Icon name={item.blocking ? 'warning' : 'question'} className={item.blocking ? 'bad' : 'warn'} />
      <span>
        <b>{item.title}</b>
        <span className="soft">{item.place.label}</span>
        {detailed ? <span>{item.detail}</span> : null}
      </span>
      <span className="proof-deeds">
        {cure === null ? null : (
          <button type="button" className="btn small-btn" onClick={cure.apply}>
            {cure.label}
          </button>
        )}
        <button type="button" className="btn small-btn" onClick={() => onGo(item)}>
          Go there
        </button>
      </span>
    </li>
  );
}
