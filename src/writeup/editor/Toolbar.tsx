import { useRef } from 'react';
import { Icon } from '@/components/Icon';
import type { IconName } from '@/components/icons';

export interface Tool {
  readonly id: string;
  readonly icon: IconName;
  readonly label: string;
  /** As a person reads it: `Ctrl B`. */
  readonly keys: string;
  /** For assistive technology: `Control+B`. */
  readonly ariaKeys: string;
  readonly on?: boolean;
  readonly off?: boolean;
  readonly act: () => void;
}

export interface ToolbarProps {
  readonly label: string;
  readonly tools: readonly Tool[];
  /** Words under the icons, or icons alone with a name. */
  readonly words: boolean;
}

/** One stop for Tab; arrows go along it. Buttons never take the caret out of the text by a click. */
export function Toolbar({ label, tools, words }: ToolbarProps) {
  const bar = useRef<HTMLDivElement>(null);
  const current = useRef(0);
  const go = (to: number) => {
    const buttons = [...(bar.current?.querySelectorAll('button') ?? [])];
    const n = (to + buttons.length) % buttons.length;
    current.current = n;
    buttons.forEach((button, i) => (button.tabIndex = i === n ? 0 : -1));
    buttons[n]?.focus();
  };
  return (
    <div
      ref={bar}
      role="toolbar"
      aria-label={label}
      className={words ? 'writeup-tools' : 'writeup-tools writeup-tools-plain'}
      onKeyDown={(event) => {
        const to = { ArrowRight: current.current + 1, ArrowLeft: current.current - 1, Home: 0, End: tools.length - 1 }[
          event.key
        ];
        if (to === undefined) return;
        event.preventDefault();
        go(to);
      }}
    >
      {tools.map(({ id, icon, label: name, keys, ariaKeys, on, off, act }, n) => (
        <button
          key={id}
          type="button"
          tabIndex={n === current.current ? 0 : -1}
          title={keys === '' ? name : `${name} (${keys})`}
          aria-label={words ? undefined : name}
          aria-keyshortcuts={ariaKeys || undefined}
          aria-pressed={on === undefined ? undefined : on}
          aria-disabled={off || undefined}
          onMouseDown={(event) => event.preventDefault()}
          onFocus={() => (current.current = n)}
          onClick={() => {
            if (!off) act();
          }}
        >
          <Icon name={icon} />
          {words ? <span>{name}</span> : null}
        </button>
      ))}
    </div>
  );
}
