import type { OutlineItem } from './outline';
import { PickList } from './PickList';

/** Headings and steps, to go to. */
export function OutlineList({
  items,
  onTake,
}: {
  readonly items: readonly OutlineItem[];
  readonly onTake: (item: OutlineItem) => void;
}) {
  if (items.length === 0) return <p className="hint">No headings and no steps yet.</p>;
  return (
    <PickList
      items={items.map((item) => ({
        key: String(item.pos),
        label:
          item.is === 'heading' ? (
            item.words
          ) : (
            <span className="outline-step">{`${item.number ?? '–'}  ${item.words || 'Step'}`}</span>
          ),
        take: () => onTake(item),
      }))}
    />
  );
}
