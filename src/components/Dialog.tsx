import { useEffect, useId, useRef, type ReactNode } from 'react';
import { Icon } from './Icon';

export interface DialogProps {
  readonly open: boolean;
  readonly title: string;
  /** Called when it is closed by Escape, by its own button or by a form inside it. */
  readonly onClose: () => void;
  readonly children: ReactNode;
}

/** The browser's own modal dialog: focus goes in and comes back, Escape closes. */
export function Dialog({ open, title, onClose, children }: DialogProps) {
  const dialog = useRef<HTMLDialogElement>(null);
  const titleId = useId();

  useEffect(() => {
    const element = dialog.current;
    if (!element) return;
    if (open && !element.open) element.showModal();
    if (!open && element.open) element.close();
  }, [open]);

  return (
    <dialog ref={dialog} className="dialog" aria-labelledby={titleId} onClose={onClose}>
      <div className="dialog-head">
        <h2 id={titleId} className="text-xl">
          {title}
        </h2>
        <button type="button" className="btn small-btn" onClick={onClose}>
          <Icon name="close" label="Close" />
        </button>
      </div>
      <div className="dialog-body">{open ? children : null}</div>
    </dialog>
  );
}
