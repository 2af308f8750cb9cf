import { useState } from 'react';

export interface TakeOutProps {
  readonly label?: string;
  /** What would stop reading, in words; asked when it is pressed. */
  readonly usersOf: () => readonly string[];
  readonly onTake: () => void;
}

/** Takes a thing out at once when nothing uses it, and says what does otherwise. */
export function TakeOut({ label = 'Take it out', usersOf, onTake }: TakeOutProps) {
  const [asking, setAsking] = useState<readonly string[] | null>(null);
  if (asking === null) {
    return (
      <button
        type="button"
        className="text-button small"
        onClick={() => {
          const users = usersOf();
          if (users.length === 0) onTake();
          else setAsking(users);
        }}
      >
        {label}
      </button>
    );
  }
  return (
    <p className="take-out" role="alert">
      {asking.slice(0, 3).join(', ')}
      {asking.length > 3 ? ` and ${asking.length - 3} more` : ''} would no longer read.
      <button
        type="button"
        className="btn small-btn danger"
        onClick={() => {
          setAsking(null);
          onTake();
        }}
      >
        Take it out all the same
      </button>
      <button type="button" className="btn small-btn" onClick={() => setAsking(null)}>
        Keep it
      </button>
    </p>
  );
}
