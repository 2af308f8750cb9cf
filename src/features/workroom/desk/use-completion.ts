import { createContext, useContext, useId, useState, type KeyboardEvent, type RefObject } from 'react';
import type { Pattern } from '@/engine';
import { completionsAt, type Completion } from '@/features/projects/completions';

/** The pattern whose names formulas may use; null where nothing is offered. */
export const FormulaPattern = createContext<Pattern | null>(null);

export interface Offer {
  readonly items: readonly Completion[];
  /** −1 while none is chosen: then Enter leaves the field as it does without a list. */
  readonly active: number;
}
export interface Completing {
  readonly listId: string;
  readonly offer: Offer | null;
  typed(text: string, caret: number): void;
  take(item: Completion): void;
  close(): void;
  /** Whether the key was meant for the list. */
  press(event: KeyboardEvent<HTMLTextAreaElement>): boolean;
}

/** Names offered while a formula is typed: arrows choose, Enter or Tab takes, Escape closes, Ctrl Space shows what there is. */
export function useCompletion(
  field: RefObject<HTMLTextAreaElement | null>,
  value: string,
  onChange: (value: string) => void,
): Completing {
  const pattern = useContext(FormulaPattern);
  const listId = useId();
  const [offer, setOffer] = useState<Offer | null>(null);
  const show = (text: string, caret: number, all = false) => {
    const items = pattern === null ? [] : completionsAt(text, caret, pattern, { all });
    setOffer(items.length === 0 ? null : { items, active: -1 });
  };
  const take = ({ text, from, to }: Completion) => {
    onChange(value.slice(0, from) + text + value.slice(to));
    setOffer(null);
    const caret = from + text.length;
    requestAnimationFrame(() => field.current?.setSelectionRange(caret, caret));
  };
  return {
    listId,
    offer,
    typed: (text, caret) => show(text, caret),
    take,
    close: () => setOffer(null),
    press(event) {
      const { selectionStart } = event.currentTarget;
      if (event.key === ' ' && event.ctrlKey) {
        show(value, selectionStart, true);
        return true;
      }
      if (offer === null) return false;
      const { items, active } = offer;
      const move = { ArrowDown: 1, ArrowUp: -1 }[event.key];
      if (move !== undefined) {
        // One stop more than there are items: the field itself.
        const stops = items.length + 1;
        setOffer({ items, active: ((active + 1 + move + stops) % stops) - 1 });
        return true;
      }
      if (event.key === 'Escape') {
        setOffer(null);
        return true;
      }
      const chosen = items[active];
      if (chosen === undefined || (event.key !== 'Enter' && event.key !== 'Tab')) return false;
      take(chosen);
      return true;
    },
  };
}
