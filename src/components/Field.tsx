import { useId, type ReactNode } from 'react';

export interface FieldProps {
  readonly label: string;
  /** What to know before typing. */
  readonly hint?: ReactNode;
  /** What was found and what to do; also read out when it appears. */
  readonly error?: string;
  /** Gives the control: it must take the id, `aria-describedby` and `aria-invalid` it is given. */
  readonly children: (control: {
    readonly id: string;
    readonly 'aria-describedby': string | undefined;
    readonly 'aria-invalid': true | undefined;
  }) => ReactNode;
}

/** A label, its control, and the words that belong to it. */
export function Field({ label, hint, error, children }: FieldProps) {
  const id = useId();
  const described = [hint ? `${id}-hint` : '', error ? `${id}-error` : ''].filter(Boolean).join(' ');
  return (
    <div className="field">
      <label htmlFor={id}>{label}</label>
      {children({ id, 'aria-describedby': described || undefined, 'aria-invalid': error ? true : undefined })}
      {hint ? (
        <p className="hint" id={`${id}-hint`}>
          {hint}
        </p>
      ) : null}
      <div aria-live="polite">
        {error ? (
          <p className="error" id={`${id}-error`}>
            {error}
          </p>
        ) : null}
      </div>
    </div>
  );
}
