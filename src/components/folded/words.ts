/** What the sliders say of themselves; free of the engine, for the page's first script needs them. */
export function turnWords(turn: number): string {
  const degrees = Math.abs(Math.round(turn));
  if (degrees === 0) return 'from the front';
  if (degrees === 180) return 'from the back';
  return `${degrees} degrees to the ${turn < 0 ? 'left' : 'right'}`;
}
export function foldWords(share: number): string {
  const percent = Math.round(share * 100);
  return percent === 0 ? 'flat' : percent === 100 ? 'closed' : `${percent} percent folded`;
}
