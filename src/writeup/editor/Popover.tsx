import { useLayoutEffect, useRef, type ReactNode, type RefObject } from 'react';

export interface PopoverProps {
  readonly label: string;
  /** Where it belongs, in the window's pixels; it opens below. */
  readonly anchor: () => { readonly left: number; readonly bottom: number };
  /** The positioned element that it lies in. */
  readonly within: RefObject<HTMLElement | null>;
  readonly onClose: () => void;
  readonly children: ReactNode;
}

/** A small field or list below the caret. Escape, or going elsewhere, closes it. */
export function Popover({ label, anchor, within, onClose, children }: PopoverProps) {
  const box = useRef<HTMLDivElement>(null);

  useLayoutEffect(() => {
    const element = box.current;
    const frame = within.current?.getBoundingClientRect();
    if (!element || !frame) return;
    const { left, bottom } = anchor();
    const room = Math.max(0, frame.width - element.offsetWidth);
    // Through the object model: the security policy forbids style attributes in what is sent, not this.
    element.style.left = `${Math.min(Math.max(0, left - frame.left), room)}px`;
    element.style.top = `${bottom - frame.top + 6}px`;
    element.scrollIntoView({ block: 'nearest' });
    // Placed once, where it was asked for: it does not wander while one types in it.
    // eslint-disable-next-line react-hooks/exhaustive-deps
  }, []);

  return (
    <div
      ref={box}
      className="writeup-popover"
      role="dialog"
      aria-label={label}
      onKeyDown={(event) => {
        if (event.key !== 'Escape') return;
        event.preventDefault();
        event.stopPropagation();
        onClose();
      }}
      onBlur={(event) => {
        if (!event.currentTarget.contains(event.relatedTarget) && document.hasFocus()) onClose();
      }}
    >
      {children}
    </div>
  );
}
