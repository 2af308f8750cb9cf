import { keyOf, type ChoiceDef, type Sizing } from '@/engine';

/** The sizing with another answer for one measure; null takes the answer back, and the usual value follows again. */
export function withValue(sizing: Sizing, measure: string, value: number | null): Sizing {
  const { [keyOf(measure)]: _, ...others } = sizing.values;
  return { ...sizing, values: value === null ? others : { ...others, [keyOf(measure)]: value } };
}

/** The answer for a measure; null when there is none and the usual value follows from the pattern. */
export const valueIn = (sizing: Sizing, measure: string): number | null => sizing.values[keyOf(measure)] ?? null;

export function withChoice(sizing: Sizing, choice: string, option: string): Sizing {
  return { ...sizing, choices: { ...sizing.choices, [keyOf(choice)]: option } };
}

/** The option in force; an answer that is no option counts as none. */
export function chosenOption(sizing: Sizing, choice: ChoiceDef): string {
  const said = sizing.choices[keyOf(choice.name)];
  return said !== undefined && choice.options.includes(said) ? said : choice.usual;
}
