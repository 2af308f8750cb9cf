import type { DiscPieceDef, FanPieceDef, SectorPieceDef } from '@/engine';
import { NamePlate } from '../NamePlate';
import { OptionField, orNothing } from '../fields';
import { PieceFormula } from './PieceFormula';
import { usePiece, usePieceDesk } from './piece-context';

/** The panel that a form piece is made of, renamed wherever it is spoken of. */
function CellName({ name, what }: { readonly name: string; readonly what: string }) {
  const { store, piece } = usePieceDesk();
  return (
    <div className="desk-field">
      <span className="small soft">{what}</span>
      <NamePlate store={store} named={{ what: 'cell', piece: piece.name, from: name }} what={what} />
    </div>
  );
}
const Toggle = ({ label, on, onChange }: { label: string; on: boolean; onChange: (on: boolean) => void }) => (
  <label className="check tight">
    <input type="checkbox" checked={on} onChange={(event) => onChange(event.currentTarget.checked)} />
    <span>{label}</span>
  </label>
);

/** A regular polygon, its flaps, and the tabs and holes that they may have. */
export function FanForm() {
  const { piece, edit } = usePiece('fan');
  const { flap, tab } = piece;
  const set = (key: 'sides' | 'side', value: string) => edit(key, (now) => ({ ...now, [key]: value }));
  const setFlap = (key: string | null, part: Partial<FanPieceDef['flap']>) =>
    edit(key, (now) => ({ ...now, flap: { ...now.flap, ...part } }));
  const setTab = (key: keyof NonNullable<FanPieceDef['tab']>, value: string | undefined) =>
    edit(`tab.${key}`, (now) => (now.tab ? { ...now, tab: { ...now.tab, [key]: value } } : now));
  return (
    <div className="shape-form">
      <div className="field-row">
        <CellName name={piece.centre} what="Middle" />
        <PieceFormula label="Sides" value={piece.sides} at="sides" onChange={(value) => set('sides', value)} />
        <PieceFormula label="Length of a side" value={piece.side} at="side" onChange={(value) => set('side', value)} />
      </div>
      <h4>Flaps</h4>
      <div className="field-row">
        <CellName name={flap.name} what="Each flap" />
        <OptionField
          label="Shape"
          value={flap.shape}
          options={[{ value: 'rectangle' }, { value: 'triangle' }]}
          onChange={(shape) => setFlap(null, { shape })}
        />
        <PieceFormula
          label="Stands out"
          value={flap.height}
          at="flap height"
          onChange={(height) => setFlap('height', { height })}
        />
        <PieceFormula
          label="Turn"
          value={flap.angle}
          at="flap angle"
          onChange={(angle) => setFlap('angle', { angle })}
        />
      </div>
      <Toggle
        label="A hole in every flap"
        on={flap.hole !== undefined}
        onChange={(on) => setFlap(null, { hole: on ? { diameter: '1/4 in', 'from tip': '1/2 in' } : undefined })}
      />
      {flap.hole ? (
        <div className="field-row">
          {(
            [
              ['diameter', 'Diameter', 'hole'],
              ['from tip', 'From the tip', 'hole'],
              ['when', 'Only when', 'hole, when'],
            ] as const
          ).map(([key, label, at]) => (
            <PieceFormula
              key={key}
              label={label}
              of="hole"
              value={flap.hole?.[key]}
              at={at}
              shared={key !== 'when'}
              onChange={(value) =>
                setFlap(`hole.${key}`, {
                  hole: flap.hole && { ...flap.hole, [key]: key === 'when' ? orNothing(value) : value },
                })
              }
            />
          ))}
        </div>
      ) : null}
      <Toggle
        label="A tab on every flap"
        on={tab !== undefined}
        onChange={(on) =>
          edit(null, ({ tab: _, ...now }) =>
            on ? { ...now, tab: { width: '1/4 in', low: '45°', high: '75°', angle: '60°' } } : now,
          )
        }
      />
      {tab ? (
        <div className="field-row">
          {(
            [
              ['width', 'Wide', 'tab width'],
              ['low', 'Angle at the side', 'tab, low end'],
              ['high', 'Angle at the tip', 'tab, high end'],
              ['angle', 'Turn', 'tab angle'],
              ['when', 'Only when', 'tab, when'],
            ] as const
          ).map(([key, label, at]) => (
            <PieceFormula
              key={key}
              label={label}
              of="tab"
              value={tab[key]}
              at={at}
              onChange={(value) => setTab(key, key === 'when' ? orNothing(value) : value)}
            />
          ))}
        </div>
      ) : null}
    </div>
  );
}

/** A circle, and the teeth that may stand round it. */
export function DiscForm() {
  const { piece, edit } = usePiece('disc');
  const setRim = (key: keyof NonNullable<DiscPieceDef['rim']>, value: string | undefined) =>
    edit(`rim.${key}`, (now) => (now.rim ? { ...now, rim: { ...now.rim, [key]: value } } : now));
  return (
    <div className="shape-form">
      <div className="field-row">
        <CellName name={piece.disc} what="Circle" />
        <PieceFormula
          label="Diameter"
          value={piece.diameter}
          at="diameter"
          onChange={(diameter) => edit('diameter', (now) => ({ ...now, diameter }))}
        />
      </div>
      <Toggle
        label="Teeth round the rim"
        on={piece.rim !== undefined}
        onChange={(on) =>
          edit(null, ({ rim: _, ...now }) =>
            on ? { ...now, rim: { teeth: '24', depth: '3/8 in', 'tooth angle': '15°', angle: '90°' } } : now,
          )
        }
      />
      {piece.rim ? (
        <div className="field-row">
          {(
            [
              ['teeth', 'Teeth', 'teeth'],
              ['depth', 'Depth', 'tooth depth'],
              ['tooth angle', 'Half the gap', 'tooth angle'],
              ['angle', 'Turn', 'angle of the rim'],
              ['when', 'Only when', 'rim, when'],
            ] as const
          ).map(([key, label, at]) => (
            <PieceFormula
              key={key}
              label={label}
              of="rim"
              value={piece.rim?.[key]}
              at={at}
              onChange={(value) => setRim(key, key === 'when' ? orNothing(value) : value)}
            />
          ))}
        </div>
      ) : null}
    </div>
  );
}

/** Part of a ring, and its seam. */
export function SectorForm() {
  const { piece, edit } = usePiece('sector');
  const setSeam = (key: keyof SectorPieceDef['seam'], value: string) =>
    edit(`seam.${key}`, (now) => ({ ...now, seam: { ...now.seam, [key]: value } }));
  return (
    <div className="shape-form">
      <div className="field-row">
        <CellName name={piece.body} what="Wall" />
        {(
          [
            ['inner radius', 'Inner radius'],
            ['outer radius', 'Outer radius'],
            ['angle', 'Angle'],
          ] as const
        ).map(([key, label]) => (
          <PieceFormula
            key={key}
            label={label}
            value={piece[key]}
            at={key}
            onChange={(value) => edit(key, (now) => ({ ...now, [key]: value }))}
          />
        ))}
      </div>
      <h4>Seam</h4>
      <div className="field-row">
        {(
          [
            ['width', 'Wide', 'seam width'],
            ['low', 'Angle at the inner end', 'seam, low end'],
            ['high', 'Angle at the outer end', 'seam, high end'],
          ] as const
        ).map(([key, label, at]) => (
          <PieceFormula
            key={key}
            label={label}
            of="seam"
            value={piece.seam[key]}
            at={at}
            onChange={(value) => setSeam(key, value)}
          />
        ))}
      </div>
    </div>
  );
}
