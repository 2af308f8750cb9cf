import { Icon } from '@/components/Icon';
import { keyOf, panelNames, readCell, type PieceDef } from '@/engine';
import { removedAt, replacedAt } from '@/features/projects/list-edits';
import { OptionField } from '../fields';
import { PieceFormula } from './PieceFormula';
import { usePiece, usePieceDesk } from './piece-context';

/** What a layer lies on, and how far it stays from the edges. */
export function LayerForm() {
  const { pattern } = usePieceDesk();
  const { piece, edit } = usePiece('layer');
  const hosts = pattern.pieces.filter((one) => one.builder !== 'layer');
  const host = hosts.find((one) => keyOf(one.name) === keyOf(piece.of));
  const faces = host === undefined ? [] : facesOf(host);
  const also = piece.also ?? [];
  return (
    <div className="shape-form">
      <div className="field-row">
        <OptionField
          label="Glued on"
          value={host?.name ?? ''}
          options={[...(host ? [] : [{ value: '', label: piece.of }]), ...hosts.map(({ name }) => ({ value: name }))]}
          onChange={(of) => {
            const [first = ''] = facesOf(hosts.find((one) => one.name === of));
            edit(null, ({ also: _, ...now }) => ({ ...now, of, panels: [first] }));
          }}
        />
        <PieceFormula
          label="In from the edges"
          value={piece.margin}
          at="margin"
          onChange={(margin) => edit('margin', (now) => ({ ...now, margin }))}
        />
      </div>
      <Faces
        legend="On the face of"
        faces={faces}
        chosen={piece.panels}
        onChange={(panels) => edit(null, (now) => ({ ...now, panels }))}
      />
      {also.map((face, index) => (
        <div key={index}>
          <Faces
            legend={`Copy ${index + 2} on`}
            faces={faces}
            chosen={face}
            onChange={(panels) => edit(null, (now) => ({ ...now, also: replacedAt(also, index, panels) }))}
          />
          <button
            type="button"
            className="text-button small"
            onClick={() => edit(null, (now) => ({ ...now, also: removedAt(also, index) }))}
          >
            Take this face out
          </button>
        </div>
      ))}
      <div className="measure-deeds">
        <button
          type="button"
          className="text-button small"
          onClick={() =>
            edit(null, (now) => ({
              ...now,
              also: [
                ...also,
                [faces.find((name) => ![...piece.panels, ...also.flat()].includes(name)) ?? faces[0] ?? ''],
              ],
            }))
          }
        >
          <Icon name="plus" /> Another face of the same shape
        </button>
      </div>
    </div>
  );
}

interface FacesProps {
  readonly legend: string;
  readonly faces: readonly string[];
  readonly chosen: readonly string[];
  readonly onChange: (panels: readonly string[]) => void;
}
function Faces({ legend, faces, chosen, onChange }: FacesProps) {
  const keys = chosen.map(keyOf);
  return (
    <fieldset className="faces">
      <legend className="small soft">{legend}</legend>
      {[...new Set([...faces, ...keys])].map((name) => (
        <label key={name} className="check tight">
          <input
            type="checkbox"
            checked={keys.includes(name)}
            onChange={(event) =>
              onChange(event.currentTarget.checked ? [...chosen, name] : chosen.filter((one) => keyOf(one) !== name))
            }
          />
          <span>{name}</span>
        </label>
      ))}
    </fieldset>
  );
}

/** Panels that a layer may go on: all but tabs, and the first flap of a fan for all of them. */
function facesOf(host: PieceDef | undefined): readonly string[] {
  if (host === undefined) return [];
  if (host.builder === 'fan') return panelNames(host).slice(0, 2);
  if (host.builder === 'outline') return host.panels.flatMap(({ name, role }) => (role === 'tab' ? [] : [keyOf(name)]));
  if (host.builder !== 'grid') return panelNames(host);
  const hanging = new Set(
    host.cells.flat().flatMap((text) => {
      const cell = readCell(text, 0, 0);
      return cell?.kind === 'tab' ? [cell.name] : [];
    }),
  );
  return [...new Set(panelNames(host))].filter((name) => !hanging.has(name));
}
