import {
  GRIDS,
  UNITS,
  defaultGrid,
  keyOf,
  nearestName,
  readValue,
  same,
  snap,
  type Fault,
  type GridId,
  type Model,
  type Sizing,
  type Unit,
} from '@/engine';

/** Names in an address: `inside-width` for “inside width”. */
export const slugOf = (name: string): string => keyOf(name).replaceAll(' ', '-');

export interface ReadSizing {
  readonly sizing: Sizing;
  /** What could not be read, by measure; everything else counts all the same. */
  readonly faults: readonly Fault[];
}

/**
 * A sizing from an address: `?inside-width=200mm&units=mm&cut=1mm&spine=straight`. What is not said is as in `usual`. A
 * number without a unit is in the sizing's units. Parameters that name nothing of the pattern are left alone.
 */
export function readSizing(model: Model, params: URLSearchParams, usual: Sizing): ReadSizing {
  const faults: Fault[] = [];
  const units = readUnits(params, usual, faults);
  const grid = readGrid(params, units, usual, faults);
  const values = { ...usual.values };
  const choices = { ...usual.choices };
  for (const { def, kind } of model.measures) {
    const typed = def.ask ? params.get(slugOf(def.name)) : null;
    if (typed === null || typed.trim() === '') continue;
    const measureKind = def.kind ?? (kind.type === 'angle' ? 'angle' : 'length');
    const read = readValue({ kind: measureKind, ...(def.unit ? { unit: def.unit } : {}) }, typed, { units });
    if (read.ok) values[keyOf(def.name)] = read.value;
    else faults.push(...read.faults.map((fault) => ({ ...fault, where: def.name })));
  }
  for (const { def } of model.choices) {
    const typed = params.get(slugOf(def.name));
    if (typed === null || typed.trim() === '') continue;
    const option = def.options.find((one) => slugOf(one) === slugOf(typed));
    if (option !== undefined) choices[keyOf(def.name)] = option;
    else faults.push(notOneOf('choice unknown', def.name, typed, def.options));
  }
  return { sizing: { values, choices, units, grid }, faults };
}

function notOneOf(code: string, where: string, typed: string, options: readonly string[]): Fault {
  const nearest = nearestName(typed, options);
  return {
    code,
    where,
    found: `“${typed}”`,
    expected: options.join(' or '),
    hint: nearest ? `Did you mean ${nearest}?` : `It can be ${options.join(' or ')}.`,
  };
}
function readUnits(params: URLSearchParams, usual: Sizing, faults: Fault[]): Unit {
  const typed = params.get('units');
  if (typed === null || typed === '') return usual.units;
  const unit = UNITS.find((one) => one === typed.toLowerCase());
  if (!unit) faults.push(notOneOf('units unknown', 'units', typed, UNITS));
  return unit ?? usual.units;
}
/** The grid that was said, or the usual one of the author when it suits the units, or the units' own. */
function readGrid(params: URLSearchParams, units: Unit, usual: Sizing, faults: Fault[]): GridId {
  const system = units === 'in' ? 'in' : 'mm';
  const fallback = GRIDS[usual.grid].unit === system ? usual.grid : defaultGrid(units);
  const typed = params.get('cut');
  if (typed === null || typed === '') return fallback;
  const key = typed.toLowerCase().replace(/\s+/g, '');
  const found = Object.keys(GRIDS).find((id) => id === key) as GridId | undefined;
  if (!found) faults.push(notOneOf('cut grid unknown', 'cut', typed, Object.keys(GRIDS)));
  return found ?? fallback;
}

/** The shortest address of a sizing: only what differs from `usual`. Reading it back gives the same sizing, to the nanometre. */
export function writeSizing(model: Model, sizing: Sizing, usual: Sizing): string {
  const params: string[] = [];
  for (const { def } of model.measures) {
    const value = sizing.values[keyOf(def.name)];
    const before = usual.values[keyOf(def.name)];
    if (!def.ask || value === undefined || (before !== undefined && same(value, before))) continue;
    params.push(`${slugOf(def.name)}=${writeValue(value, def.kind ?? 'length', sizing.units)}`);
  }
  for (const { def } of model.choices) {
    const option = sizing.choices[keyOf(def.name)];
    if (option !== undefined && option !== (usual.choices[keyOf(def.name)] ?? def.usual))
      params.push(`${slugOf(def.name)}=${slugOf(option)}`);
  }
  if (sizing.units !== usual.units) params.push(`units=${sizing.units}`);
  const fallback =
    GRIDS[usual.grid].unit === (sizing.units === 'in' ? 'in' : 'mm') ? usual.grid : defaultGrid(sizing.units);
  if (sizing.grid !== fallback) params.push(`cut=${sizing.grid}`);
  return params.join('&');
}
/** Inches when the value is a whole number of sixty-fourths and the reader thinks in inches; else millimetres, exactly. */
function writeValue(value: number, kind: string, units: Unit): string {
  if (kind !== 'length') return `${snap(value)}`;
  const parts = snap((value * 64) / 25.4);
  return units === 'in' && Number.isInteger(parts) ? `${parts / 64}in` : `${snap(value)}mm`;
}
