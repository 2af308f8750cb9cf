import { useId, useState } from 'react';
import { readHref } from '../links';

export interface LinkFieldProps {
  readonly href: string;
  readonly onTake: (href: string) => void;
  readonly onRemove: () => void;
}

export function LinkField({ href, onTake, onRemove }: LinkFieldProps) {
  const id = useId();
  const [typed, setTyped] = useState(href);
  const [refused, setRefused] = useState(false);
  return (
    <form
      className="field link-field"
      onSubmit={(event) => {
        event.preventDefault();
        event.stopPropagation();
        const read = readHref(typed);
        if (read === null) setRefused(true);
        else onTake(read);
      }}
    >
      <label htmlFor={id}>Where the link goes</label>
      <input
        id={id}
        className="input"
        autoFocus
        autoComplete="off"
        inputMode="url"
        placeholder="https://…"
        value={typed}
        aria-invalid={refused || undefined}
        aria-describedby={refused ? `${id}-error` : undefined}
        onChange={(event) => {
          setTyped(event.target.value);
          setRefused(false);
        }}
      />
      <div aria-live="polite">
        {refused ? (
          <p className="error" id={`${id}-error`}>
            Not an address that can be linked. Give one that begins with https, an e-mail address, or a place on this
            site such as /handbook.
          </p>
        ) : null}
      </div>
      <div className="link-field-actions">
        <button type="submit" className="btn small-btn">
          Link
        </button>
        {href === '' ? null : (
          <button type="button" className="btn small-btn" onClick={onRemove}>
            Take the link away
          </button>
        )}
      </div>
    </form>
  );
}
