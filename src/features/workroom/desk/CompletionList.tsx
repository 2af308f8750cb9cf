import { useEffect, useRef } from 'react';
import type { Completion } from '@/features/projects/completions';
import type { Offer } from './use-completion';

const WORDS: Readonly<Record<Completion['what'], string>> = {
  asked: 'asked',
  worked: 'worked out',
  choice: 'choice',
  option: 'option',
  size: 'size of a piece',
  function: 'function',
};

export interface CompletionListProps {
  readonly id: string;
  readonly label: string;
  readonly offer: Offer;
  readonly onTake: (item: Completion) => void;
}

/** What the letters typed may stand for, under a formula. */
export function CompletionList({ id, label, offer, onTake }: CompletionListProps) {
  const list = useRef<HTMLUListElement>(null);
  useEffect(() => {
    void list.current?.scrollIntoView({ block: 'nearest' });
  }, []);
  return (
    <ul ref={list} id={id} className="completions" role="listbox" aria-label={`Names for ${label}`}>
      {offer.items.map((item, i) => (
        <li
          key={item.text}
          id={`${id}-${i}`}
          role="option"
          aria-selected={i === offer.active}
          // Before the field loses the focus, which would close the list.
          onPointerDown={(event) => {
            event.preventDefault();
            onTake(item);
          }}
        >
          <b>{item.text}</b>
          <span>{WORDS[item.what]}</span>
        </li>
      ))}
    </ul>
  );
}
