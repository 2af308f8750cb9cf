import type { Figures } from '@/engine';
import { amountsOf, showAmount } from '../amounts';
import { usualPlan } from '../usual-plan';
import { PickList } from './PickList';

/** What the box takes, to be put into the text: each amount follows the size and the reader's sheets. */
export function AmountList({
  figures,
  onTake,
}: {
  readonly figures: Figures | null;
  readonly onTake: (of: string) => void;
}) {
  if (!figures) return <p className="hint">Amounts can be put in once the pattern reads.</p>;
  const plan = usualPlan(figures);
  return (
    <PickList
      items={amountsOf(figures, plan).map(({ of, label }) => ({
        key: of,
        label,
        small: showAmount(figures, plan, of) ?? 'none',
        take: () => onTake(of),
      }))}
    />
  );
}
