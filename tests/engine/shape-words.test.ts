import { describe, expect, it } from 'vitest';
import { instructionsOf, say, type DiscPieceDef } from '@/engine';
import { buildDisc, keepMaking } from '@/engine/piece';

describe('the words of a disc', () => {
  const def: DiscPieceDef = { name: 'Foot', stock: 'card', builder: 'disc', disc: 'foot', diameter: '100 mm' };
  const says = (built: ReturnType<typeof buildDisc>) => {
    if (!built.ok) throw new Error(built.reason);
    const scores = { across: [], along: [] };
    keepMaking(built.net, { grid: null, def, scores, step: 1, thickness: 0 });
    return instructionsOf(built).map((sentence) => say(sentence, { units: 'mm' }));
  };
  it('are a circle', () => {
    expect(says(buildDisc({ disc: 'foot', diameter: 100, rim: null, step: 1 }))).toEqual([
      'Cut 100 × 100 mm.',
      'Draw a circle of 100 mm diameter and cut it out.',
    ]);
  });
  it('give the depth of a toothed rim, the angle from tooth to tooth and the width at score and tip', () => {
    // 24 teeth: root 100 × sin 7.5° = 13.05; sides give way by 7.5° over 12 mm: 13.05 − 2 × 12 × tan 7.5° = 9.89.
    const rim = { teeth: 24, depth: 12, toothAngle: 7.5, angle: 90 };
    expect(says(buildDisc({ disc: 'foot', diameter: 100, rim, step: 1 })).slice(1)).toEqual([
      'Draw a circle of 100 mm diameter and score it; the rim outside it is 12 mm deep.',
      'Cut the rim into 24 teeth, one every 15°, each 13.1 mm wide at the score and 9.9 mm at the tip, a V between each two, down to the score.',
      'Fold every score towards you and burnish it.',
    ]);
  });
});
