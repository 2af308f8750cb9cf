/*
 * A mailing is compiled once; what is personal is left open as slots. A slot is its name between two characters of the
 * private use area, which nobody can type into a mailing (`withoutSlots`) and which React and HTML leave as they are.
 */
const OPEN = '\uE000';
const CLOSE = '\uE001';
const SLOT = /\uE000([a-z-]+)\uE001/g;

export type SlotName =
  | 'greeting'
  | 'address'
  | 'confirmed-on'
  | 'leave-url'
  | 'preferences-url'
  | 'project-url'
  | 'inside'
  | 'outside';

export const slot = (name: SlotName): string => `${OPEN}${name}${CLOSE}`;

/** Text from outside, with nothing in it that could be taken for a slot. */
export const withoutSlots = (text: string): string => text.replace(/[\uE000\uE001]/g, '');

/**
 * Puts the values in. They must be right for where the slots stand: escaped for HTML (text and quoted attributes alike),
 * or plain. Throws for a slot without a value: a mail with a hole must not go out.
 */
export function fillSlots(template: string, values: Readonly<Partial<Record<SlotName, string>>>): string {
  return template.replace(SLOT, (_, name: string) => {
    const value = values[name as SlotName];
    if (value === undefined) throw new Error(`no value for the slot "${name}"`);
    return value;
  });
}
