import { Dialog } from '@/components/Dialog';
import { editorKeys } from '@/writeup/editor/editor-keys';
import { COLUMN_KEYS, DESK_KEYS, WRITING_KEYS, type DeskKeyGroup } from './desk-keys';

const GROUPS: readonly DeskKeyGroup[] = [
  { where: 'Everywhere on the desk', keys: DESK_KEYS },
  { where: 'Measures and pieces', keys: COLUMN_KEYS },
  { where: 'Write-up', keys: [...WRITING_KEYS, ...editorKeys()] },
];

/** The keyboard map of the desk. */
export function KeysDialog({ open, onClose }: { readonly open: boolean; readonly onClose: () => void }) {
  return (
    <Dialog open={open} title="Keys" onClose={onClose}>
      {GROUPS.map(({ where, keys }) => (
        <section key={where} className="key-group">
          <h3>{where}</h3>
          <dl className="key-list">
            {keys.map(({ keys: pressed, does }) => (
              <div key={pressed + does}>
                <dt>
                  <kbd>{pressed}</kbd>
                </dt>
                <dd>{does}</dd>
              </div>
            ))}
          </dl>
        </section>
      ))}
    </Dialog>
  );
}
