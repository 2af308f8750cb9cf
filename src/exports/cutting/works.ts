/** What is done along a line. Valley and mountain are scores; glue areas are drawn, if at all. */
export type Work = 'cut' | 'valley' | 'mountain' | 'glue';

/**
 * The one table from works to layers and colours. Machines are set up by layer or by colour, so both tell the works apart; the
 * colours are those of the index that every DXF reader knows, so that both formats show the same.
 */
export const WORKS: Readonly<
  Record<Work, { readonly layer: 'CUT' | 'SCORE' | 'DRAW'; readonly colour: string; readonly index: number }>
> = {
  glue: { layer: 'DRAW', colour: '#00ff00', index: 3 },
  valley: { layer: 'SCORE', colour: '#0000ff', index: 5 },
  mountain: { layer: 'SCORE', colour: '#ff00ff', index: 6 },
  cut: { layer: 'CUT', colour: '#ff0000', index: 1 },
};
