import { defaultGrid, GRIDS, gridsFor, UNITS, type GridId, type Unit } from '@/engine';
import { useStore } from '@nanostores/react';
import type { DeskStore } from './desk-store';

const UNIT_WORDS: Readonly<Record<Unit, string>> = { in: 'inches', mm: 'millimetres', cm: 'centimetres' };

/** The author's own units and cut grid: what readers see first, until they choose theirs. */
export function UnitsAndGrid({ store }: { readonly store: DeskStore }) {
  const { sizing } = useStore(store.$draft);
  return (
    <div className="units">
      <label>
        <span>Shown in</span>
        <select
          className="plain-select"
          value={sizing.units}
          onChange={(event) => {
            const units = event.currentTarget.value as Unit;
            const grid = gridsFor(units).includes(sizing.grid) ? sizing.grid : defaultGrid(units);
            store.editSizing(null, (now) => ({ ...now, units, grid }));
          }}
        >
          {UNITS.map((unit) => (
            <option key={unit} value={unit}>
              {UNIT_WORDS[unit]}
            </option>
          ))}
        </select>
      </label>
      <label>
        <span>cut to</span>
        <select
          className="plain-select"
          value={sizing.grid}
          onChange={(event) => {
            const grid = event.currentTarget.value as GridId;
            store.editSizing(null, (now) => ({ ...now, grid }));
          }}
        >
          {gridsFor(sizing.units).map((grid) => (
            <option key={grid} value={grid}>
              {GRIDS[grid].says}
            </option>
          ))}
        </select>
      </label>
    </div>
  );
}
