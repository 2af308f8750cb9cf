/** Why a formula that reads has no answer at these sizes. */
export const CANNOT = {
  arc: (chord: string, diameter: string) => `a line of ${chord} does not fit across a circle of ${diameter}`,
  root: (value: string) => `the square root of ${value} does not exist`,
  arcRadius: (chord: string, height: string) => `no circle has a chord of ${chord} and a height of ${height}`,
  divide: () => 'it divides by nothing',
  ratio: (name: string, value: string) => `${name} needs a number from −1 to 1, and was given ${value}`,
  grid: (value: string) => `a grid of ${value} has no steps`,
  other: () => 'it has no answer',
};
