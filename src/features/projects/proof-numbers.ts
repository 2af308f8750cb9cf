import type { WriteUp } from '@/writeup/document';
import type { LiveFigures } from '@/writeup/live';
import type { Match } from '@/writeup/numbers/match-numbers';
import { strayNumbers } from '@/writeup/numbers/stray';
import type { ProofItem } from './proof';
import type { PlaceAt } from './proof-place';

/**
 * Typed lengths that are a measure at the size shown first, and would stay behind at every other. What is certainly one keeps
 * the project from being published; what only has the same size, or is said of material, is worth a look.
 */
export function typedNumberItems({ doc }: WriteUp, live: LiveFigures, at: PlaceAt): readonly ProofItem[] {
  return strayNumbers(doc, live).flatMap(({ text, matches, certain, ofMaterial, step }, nth): ProofItem[] => {
    const [first] = matches;
    if (first === undefined || first.off > 0 || ofMaterial) return [];
    return [
      {
        code: 'typed number',
        blocking: certain,
        title: `“${text}” is typed, not live`,
        detail: `It ${certain ? 'is' : 'may be'} ${nameOf(first)}: it would stay as it is at another size. Make it live, or leave it as typed.`,
        place: at(step, nth),
      },
    ];
  });
}

const nameOf = ({ formula, says }: Match): string => (formula === says ? formula : `${formula} (${says})`);
