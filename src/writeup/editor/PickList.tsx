import type { ReactNode } from 'react';

export interface PickItem {
  readonly key: string;
  readonly label: ReactNode;
  readonly small?: string;
  readonly take: () => void;
}

/** A list of buttons that arrows go along; the first has the focus when it opens. */
export function PickList({ items }: { readonly items: readonly PickItem[] }) {
  return (
    <ul
      className="pick-list"
      onKeyDown={(event) => {
        if (event.key !== 'ArrowDown' && event.key !== 'ArrowUp') return;
        event.preventDefault();
        const buttons = [...event.currentTarget.querySelectorAll('button')];
        const at = buttons.findIndex((button) => button === document.activeElement);
        buttons[(at + (event.key === 'ArrowDown' ? 1 : -1) + buttons.length) % buttons.length]?.focus();
      }}
    >
      {items.map(({ key, label, small, take }, n) => (
        <li key={key}>
          <button type="button" autoFocus={n === 0} onClick={take}>
            <span>{label}</span>
            {small === undefined ? null : <small>{small}</small>}
          </button>
        </li>
      ))}
    </ul>
  );
}
