import { useEffect, useRef, useState } from 'react';
import { Icon } from '@/components/Icon';

export interface Deleted {
  readonly id: string;
  readonly title: string;
  readonly published: boolean;
}
export interface UndoDeleteProps {
  readonly deleted: Deleted | null;
  readonly onUndo: (id: string) => Promise<void>;
  readonly onDismiss: () => void;
}

/** Says what was deleted and offers to bring it back, for as long as it takes: it does not go away by itself. */
export function UndoDelete({ deleted, onUndo, onDismiss }: UndoDeleteProps) {
  const undo = useRef<HTMLButtonElement>(null);
  const [busy, setBusy] = useState(false);
  useEffect(() => {
    if (deleted !== null) undo.current?.focus();
  }, [deleted]);
  return (
    <div className="undo-place" role="status">
      {deleted === null ? null : (
        <div className="undo-toast">
          <span>
            “{deleted.title || 'Untitled'}” is deleted.{deleted.published ? ' Readers cannot open it any more.' : ''}
          </span>
          <button
            ref={undo}
            type="button"
            className="btn small-btn"
            disabled={busy}
            onClick={() => {
              setBusy(true);
              void onUndo(deleted.id).finally(() => setBusy(false));
            }}
          >
            <Icon name="undo" /> Undo
          </button>
          <button type="button" className="btn small-btn" onClick={onDismiss}>
            <Icon name="close" label="Close this message" />
          </button>
        </div>
      )}
    </div>
  );
}
