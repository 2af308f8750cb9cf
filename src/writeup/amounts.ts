import { showValue, type Figures, type SheetPlan } from '@/engine';
import { besides } from '@/exports/material-rows';

/**
 * What a box takes, by the names that the text keeps: `sheets` in all, `sheets card`, `area card`, `tape` along the tabs,
 * `glued` all over, and `extra ribbon` for what the pattern names. Null when there is nothing of it at this size.
 */
export function showAmount(figures: Figures, plan: SheetPlan, of: string): string | null {
  const [kind = '', ...rest] = of.split(' ');
  const name = rest.join(' ');
  const { materials, sizing } = figures;
  const none = { stocks: [], seams: 0, glued: 0, extras: [] };
  const only = (part: Partial<Figures['materials']>) =>
    besides({ materials: { ...none, ...part }, sizing })[0]?.amount ?? null;
  switch (kind) {
    case 'sheets':
      return sheets(plan, name);
    case 'area': {
      const found = materials.stocks.find(({ stock }) => stock === name);
      return found ? showValue(found.area, 'area', sizing).typeset : null;
    }
    case 'tape':
      return only({ seams: materials.seams });
    case 'glued':
      return only({ glued: materials.glued });
    case 'extra':
      return only({ extras: materials.extras.filter((extra) => extra.name === name) });
    default:
      return null;
  }
}

/** `3 sheets of 12 × 12 in`; of one material when it is named. */
function sheets({ takes, tooLarge }: SheetPlan, material: string): string | null {
  if (tooLarge.length > 0) return null;
  const counted = takes.filter((take) => material === '' || take.material === material);
  const bySize = new Map<string, number>();
  for (const { stock, used } of counted) bySize.set(stock.name, (bySize.get(stock.name) ?? 0) + used);
  const words = [...bySize].map(([size, used]) => `${used} ${used === 1 ? 'sheet' : 'sheets'} of ${size}`);
  return words.length === 0 ? null : words.join(' and ');
}

/** Every amount that there is at this size, with the words that a list of them begins with. */
export function amountsOf({ materials }: Figures, { takes }: SheetPlan): readonly { of: string; label: string }[] {
  const capital = (words: string) => words.charAt(0).toUpperCase() + words.slice(1);
  return [
    ...(takes.length > 1 ? [{ of: 'sheets', label: 'Sheets in all' }] : []),
    ...takes.map(({ material }) => ({ of: `sheets ${material}`, label: capital(material) })),
    ...materials.stocks.map(({ stock }) => ({ of: `area ${stock}`, label: `${capital(stock)}, once cut` })),
    ...(materials.seams > 0 ? [{ of: 'tape', label: 'Glue or tape along tabs' }] : []),
    ...(materials.glued > 0 ? [{ of: 'glued', label: 'Glued all over' }] : []),
    ...materials.extras.map(({ name }) => ({ of: `extra ${name}`, label: capital(name) })),
  ];
}
