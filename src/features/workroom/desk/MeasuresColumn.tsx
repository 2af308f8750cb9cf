import { useStore } from '@nanostores/react';
import { useState } from 'react';
import { Icon } from '@/components/Icon';
import type { MeasureDef } from '@/engine';
import { namesOf } from '@/features/projects/formula-names';
import { fieldOfFault } from '@/features/projects/proof-place';
import { AddMeasure } from './AddMeasure';
import { Choices } from './Choices';
import { ColumnHead } from './ColumnHead';
import type { DeskStore, Draft } from './desk-store';
import { cutText } from './figure-text';
import { FitList } from './FitList';
import { MeasureRow } from './MeasureRow';
import { PatternPart } from './PatternPart';
import { RangeTrial } from './RangeTrial';
import { FormulaPattern } from './use-completion';
import { UnitsAndGrid } from './UnitsAndGrid';

/** Measures asked and worked, choices, and fits at the size shown. */
export function MeasuresColumn({ store }: { readonly store: DeskStore }) {
  const draft = useStore(store.$draft);
  const work = useStore(store.$work);
  const lit = useStore(store.$lit);
  const names = namesOf(draft.pattern);
  const faults = work.compiled.ok ? [] : work.compiled.faults;
  const figures = new Map(work.live?.figures.measures.map((figure) => [figure.name, figure]));
  const follow = lit === null ? '' : lit.followers.length === 1 ? '1 follows it' : `${lit.followers.length} follow it`;
  const [said, setSaid] = useState<{ readonly name: string; readonly words: string; readonly draft: Draft } | null>(
    null,
  );
  const renamed = said?.draft === draft ? said : null;
  const rows = (measures: readonly MeasureDef[]) =>
    measures.map((measure) => (
      <MeasureRow
        key={measure.name}
        store={store}
        measure={measure}
        names={names}
        faults={faults}
        figure={figures.get(measure.name)}
        lit={lit}
        stale={work.stale}
        sizing={draft.sizing}
        renamed={renamed?.name === measure.name ? renamed.words : null}
        onRenamed={(name, words) => setSaid({ name, words, draft: store.$draft.get() })}
      />
    ));
  const finer = draft.pattern.measures.filter((measure) => measure.ask?.finer);
  const [finerOpen, setFinerOpen] = useState(false);
  // What is selected or does not read is never folded away.
  const needsFiner = finer.some(
    (measure) => lit?.selected === measure.name || faults.some((fault) => fieldOfFault(fault, measure.name) !== null),
  );
  const finerShown = finerOpen || needsFiner;

  const inShort = (measure: MeasureDef) => {
    const figure = figures.get(measure.name);
    return figure ? `${measure.name} ${cutText(figure, draft.sizing)}` : measure.name;
  };

  return (
    <FormulaPattern.Provider value={draft.pattern}>
      <section className="desk-column" data-column="measures" aria-label="Measures" tabIndex={-1}>
        <ColumnHead title="Measures" shortcut="Alt 1" lit={lit === null ? null : `${lit.selected}: ${follow}`} />
        <div className="desk-scroll">
          <UnitsAndGrid store={store} />
          <table className="measures">
            <thead>
              <tr>
                <th scope="col">Name</th>
                <th scope="col">Question or formula</th>
                <th scope="col" className="figures">
                  Exact
                </th>
                <th scope="col" className="figures">
                  As cut
                </th>
                <th scope="col">Rounds</th>
              </tr>
            </thead>
            <tbody>
              <GroupRow words="Asked" rest="of the reader" />
              {rows(draft.pattern.measures.filter((measure) => measure.ask && !measure.ask.finer))}
            </tbody>
            {finer.length === 0 ? null : (
              <tbody>
                <tr className="measure-finer">
                  <td colSpan={5}>
                    <button type="button" aria-expanded={finerShown} onClick={() => setFinerOpen(!finerShown)}>
                      <Icon name={finerShown ? 'chevron-down' : 'chevron-right'} />
                      <b>Finer points</b>
                      <span>{finerShown ? 'asked, but set apart' : finer.map(inShort).join(' · ')}</span>
                    </button>
                  </td>
                </tr>
                {finerShown ? rows(finer) : null}
              </tbody>
            )}
            <tbody>
              <GroupRow words="Worked" rest="out by formulas" />
              {rows(draft.pattern.measures.filter((measure) => !measure.ask))}
            </tbody>
          </table>
          <p className="visually-hidden" role="status">
            {renamed?.words}
          </p>
          <AddMeasure store={store} pattern={draft.pattern} />
          <Choices store={store} draft={draft} lit={lit} names={names} faults={faults} />
          <FitList store={store} work={work} draft={draft} lit={lit} names={names} />
          <RangeTrial store={store} draft={draft} work={work} />
          <PatternPart store={store} />
        </div>
      </section>
    </FormulaPattern.Provider>
  );
}

const GroupRow = ({ words, rest }: { readonly words: string; readonly rest: string }) => (
  <tr className="measure-group">
    <th scope="rowgroup" colSpan={5}>
      {words} <span>{rest}</span>
    </th>
  </tr>
);
