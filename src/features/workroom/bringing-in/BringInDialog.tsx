import { useState } from 'react';
import { Dialog } from '@/components/Dialog';
import type { StepNode } from '@/writeup/document';
import type { LiveFigures } from '@/writeup/live';
import { call } from '../desk/project-api';
import { Chooser } from './Chooser';
import { Review } from './Review';
import { useBringingIn } from './use-bringing-in';

export interface BringInDialogProps {
  readonly open: boolean;
  readonly projectId: string;
  readonly live: LiveFigures | null;
  readonly onClose: () => void;
  readonly onSteps: (steps: readonly StepNode[]) => void;
}

/** A text becomes steps: read, looked through, put into the write-up; its original is kept first. */
export function BringInDialog({ open, projectId, live, onClose, onSteps }: BringInDialogProps) {
  const bringing = useBringingIn(live);
  const [busy, setBusy] = useState(false);
  const [refusal, setRefusal] = useState<string | null>(null);
  const { original } = bringing;

  const putIn = async (steps: readonly StepNode[], keep: boolean) => {
    if (keep && original !== null) {
      setBusy(true);
      const kept = await call(`/api/projects/${projectId}/sources`, { method: 'POST', body: original });
      setBusy(false);
      if (!kept.ok) return setRefusal(kept.refusal.sentence);
    }
    setRefusal(null);
    onSteps(steps);
    bringing.forget();
    onClose();
  };

  return (
    <Dialog open={open} title={original === null ? 'Bring text in' : original.name} onClose={onClose}>
      <div className="bringing-in" data-page={original === null ? 'choose' : 'review'}>
        {original === null || live === null ? (
          <Chooser bringing={bringing} ready={live !== null} />
        ) : (
          <Review
            bringing={bringing}
            live={live}
            busy={busy}
            refusal={refusal}
            onPutIn={(steps, keep) => void putIn(steps, keep)}
          />
        )}
      </div>
    </Dialog>
  );
}
