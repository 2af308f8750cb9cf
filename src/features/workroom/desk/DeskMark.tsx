/** The logo's mark, alone: a square of card with one corner folded in. */
export const DeskMark = () => (
  <svg width="26" height="26" viewBox="0 0 26 26" aria-hidden="true">
    <path className="mark-paper" d="M2 2H24V15L15 24H2Z" strokeWidth="2" strokeLinejoin="round" />
    <path className="mark-fold" d="M24 15H15V24" strokeWidth="2" strokeLinejoin="round" />
    <path className="mark-line" d="M2 9H24" strokeWidth="1.8" strokeDasharray="3.4 2.6" />
  </svg>
);
