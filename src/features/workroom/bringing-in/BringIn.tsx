import { useStore } from '@nanostores/react';
import { useState } from 'react';
import type { StepNode } from '@/writeup/document';
import type { FiguresStore } from '@/writeup/figures-store';
import { BringInDialog } from './BringInDialog';
import { Originals } from './Originals';
import './bringing-in.css';

export interface BringInProps {
  readonly projectId: string;
  readonly figures: FiguresStore;
  readonly onSteps: (steps: readonly StepNode[]) => void;
}

/** Above the write-up: bring a text in, and what was brought in, to read beside it. */
export function BringIn({ projectId, figures, onSteps }: BringInProps) {
  const live = useStore(figures);
  const [open, setOpen] = useState<'dialog' | 'originals' | null>(null);
  return (
    <>
      <div className="bring-in-bar">
        <button type="button" className="text-button" onClick={() => setOpen('dialog')}>
          Bring text in
        </button>
        <button
          type="button"
          className="text-button"
          aria-expanded={open === 'originals'}
          onClick={() => setOpen(open === 'originals' ? null : 'originals')}
        >
          Originals
        </button>
      </div>
      <BringInDialog
        open={open === 'dialog'}
        projectId={projectId}
        live={live}
        onClose={() => setOpen(null)}
        onSteps={onSteps}
      />
      {open === 'originals' ? <Originals projectId={projectId} onClose={() => setOpen(null)} /> : null}
    </>
  );
}
