import { PickList } from './PickList';
import type { ListedStep } from './step-numbers';

export interface StepListProps {
  readonly steps: readonly ListedStep[];
  readonly onTake: (step: ListedStep) => void;
}

/** The steps that a text can speak of. */
export function StepList({ steps, onTake }: StepListProps) {
  if (steps.length === 0) return <p className="hint">There are no steps yet to speak of.</p>;
  return (
    <PickList
      items={steps.map((step) => ({
        key: String(step.pos),
        label: step.number === null ? 'Step left out at this size' : `Step ${step.number}`,
        small: step.title || 'without a title',
        take: () => onTake(step),
      }))}
    />
  );
}
