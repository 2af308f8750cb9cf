import { esc } from '@/exports/escape';
import { dayWords } from '@/features/editions/dates';
import { preferencesUrl, unsubscribeUrl } from '../sender';
import { greet } from './greeting';
import { fillSlots, type SlotName } from './slots';
import type { UnitPart } from './unit-parts';

export interface Recipient {
  readonly address: string;
  readonly name: string | null;
  readonly units: 'in' | 'mm' | 'cm';
  readonly leaveToken: string;
  readonly confirmedAt: number | null;
}
export interface CopyParts {
  readonly html: string;
  readonly text: string;
  readonly greeting: string;
  readonly unitParts: Readonly<Record<'in' | 'mm' | 'cm', UnitPart>>;
  readonly siteUrl: string;
}

/** One recipient's copy: the slots filled, escaped where they stand in HTML. */
export function fillCopy(
  { html, text, greeting, unitParts, siteUrl }: CopyParts,
  recipient: Recipient,
): { html: string; text: string } {
  const { address, name, units, leaveToken, confirmedAt } = recipient;
  const part = unitParts[units];
  const plain: Readonly<Record<Exclude<SlotName, 'inside' | 'outside'>, string>> = {
    greeting: greet(greeting, name),
    address,
    'confirmed-on': dayWords(new Date(confirmedAt ?? 0)),
    'leave-url': unsubscribeUrl(siteUrl, leaveToken),
    'preferences-url': preferencesUrl(siteUrl, leaveToken),
    'project-url': part.projectUrl,
  };
  const escaped = Object.fromEntries(Object.entries(plain).map(([slot, value]) => [slot, esc(value)]));
  return {
    html: fillSlots(html, { ...escaped, inside: part.insideHtml, outside: part.outsideHtml }),
    text: fillSlots(text, { ...plain, inside: part.insideText, outside: part.outsideText }),
  };
}
