import { explain, type Fault } from '@/engine';
import { curedText } from './cured-text';

export interface FaultWordsProps {
  readonly id?: string;
  readonly faults: readonly Fault[];
  readonly value: string;
  /** Said beside the cure: what is shown until it reads. */
  readonly meanwhile?: string;
  readonly onCure: (value: string) => void;
}

/** What does not read, in a sentence, with the cure as a button. */
export function FaultWords({ id, faults, value, meanwhile, onCure }: FaultWordsProps) {
  const fault = faults[0];
  if (fault === undefined) return null;
  const cured = curedText(fault, value);
  return (
    <div className="fault" id={id}>
      <p className="fault-words">{explain(fault)}</p>
      {cured === null && !meanwhile ? null : (
        <p className="fault-cure">
          {cured === null ? null : (
            <button type="button" className="btn small-btn" onClick={() => onCure(cured)}>
              Use {fault.cure}
            </button>
          )}
          {meanwhile ? <span className="soft">{meanwhile}</span> : null}
        </p>
      )}
    </div>
  );
}
