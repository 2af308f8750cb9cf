/**
 * Basis weight of cover stock: the weight in pounds of 500 sheets of 20 × 26 in.
 * One pound is 0.45359237 kg and one inch 0.0254 m exactly (international yard and pound agreement of 1959).
 *
 * @example gramsPerSquareMetre(100) // 270.4…
 */
export function gramsPerSquareMetre(coverPounds: number): number {
  const grams = coverPounds * 453.59237;
  const squareMetres = 500 * (20 * 0.0254) * (26 * 0.0254);
  return grams / squareMetres;
}

/** Weights that cover stock is commonly sold in, in pounds. */
export const COVER_POUNDS = [65, 80, 100, 110, 130] as const;
