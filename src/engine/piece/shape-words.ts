import { decimal } from '../measure';
import { lengthOf, pointAt } from '../net';
import type { Net, Sentence } from '../types';
import type { WordsOptions } from './words';

/** The making of a piece that is not a grid, in words. */
export function shapeWords(options: WordsOptions): Sentence[] {
  switch (options.def.builder) {
    case 'fan':
      return fan(options);
    case 'disc':
      return disc(options);
    case 'sector':
      return sector(options);
    case 'outline':
      return outline(options);
    case 'grid':
      return [];
  }
}
const degrees = (angle: number): string => `${decimal(angle, 1)}°`;
const panel = (net: Net, name: string) =>
  net.panels.find((one) => one.name === name.toLowerCase() || one.name === name);

function fan({ net, def, figure }: WordsOptions): Sentence[] {
  if (def.builder !== 'fan') return [];
  const centre = panel(net, def.centre)?.loop ?? [];
  const side = centre[0] ? lengthOf(centre[0]) : 0;
  const flap = panel(net, `${def.flap.name} 1`)?.loop ?? [];
  const height = def.flap.shape === 'triangle' ? 0 : flap[1] ? lengthOf(flap[1]) : 0;
  const middle = {
    x: ((centre[0]?.from.x ?? 0) + (centre[0]?.to.x ?? 0)) / 2,
    y: ((centre[0]?.from.y ?? 0) + (centre[0]?.to.y ?? 0)) / 2,
  };
  const tip = flap[1]?.to ?? middle;
  const tall = def.flap.shape === 'triangle' ? Math.hypot(tip.x - middle.x, tip.y - middle.y) : height;
  const turns = [...new Set(net.folds.map((fold) => degrees(fold.angle)))];
  return [
    [`Draw a regular shape of ${centre.length} sides, each `, figure(side), '.'],
    def.flap.shape === 'triangle'
      ? ['On every side draw a triangle, its point ', figure(tall), ' out from the middle of the side.']
      : ['On every side draw a rectangle ', figure(tall), ' tall.'],
    ...(net.panels.some((one) => one.role === 'tab')
      ? [['On the same-handed end of every one stands a glue tab; taper it as drawn.']]
      : []),
    ...(net.holes.length > 0 ? [['Punch a hole in every point, on its middle line, as drawn.']] : []),
    [`Score every side and every tab; they turn by ${turns.join(' and ')}.`],
  ];
}

function disc({ net, def, figure }: WordsOptions): Sentence[] {
  if (def.builder !== 'disc') return [];
  const arc = panel(net, def.disc)?.loop.find((curve) => curve.type === 'arc');
  const diameter = arc?.type === 'arc' ? 2 * arc.radius : net.across;
  const teeth = net.panels.filter((one) => one.tooth).length;
  if (teeth === 0) return [['Draw a circle of ', figure(diameter), ' diameter and cut it out.']];
  const depth = (net.across - diameter) / 2;
  return [
    ['Draw a circle of ', figure(diameter), ' diameter and score it; the rim outside it is ', figure(depth), ' deep.'],
    [`Cut the rim into ${teeth} teeth, a narrow V between each two, down to the score.`],
  ];
}

function sector({ net, def, figure }: WordsOptions): Sentence[] {
  if (def.builder !== 'sector') return [];
  const body = panel(net, def.body);
  const radii = [...new Set((body?.loop ?? []).flatMap((curve) => (curve.type === 'arc' ? [curve.radius] : [])))].sort(
    (a, b) => b - a,
  );
  const [outer = 0, inner] = radii;
  return [
    [
      'From one point draw an arc of ',
      figure(outer),
      ' radius',
      ...(inner === undefined ? [] : [' and one of ', figure(inner), ' radius']),
      ` over ${degrees(body?.cone?.angle ?? 0)}, and join their ends by straight lines.`,
    ],
    ['Along one straight edge leaves a seam tab; taper it as drawn. Roll the piece, do not fold it.'],
  ];
}

/** Corners of the outline in order, each by how far it lies from the left and from the top edge. */
function outline({ net, figure }: WordsOptions): Sentence[] {
  const corners = net.outline.flatMap(
    (curve): Sentence => [
      figure(curve.from.x, true),
      ' across, ',
      figure(curve.from.y, true),
      curve.type === 'arc' ? ' down (then an arc); ' : ' down; ',
    ],
  );
  return [
    [
      'Mark the corners, each from the left and from the top edge: ',
      ...corners.slice(0, -1),
      ' down. Join them in this order and cut.',
    ],
    ...net.folds
      .filter((fold) => fold.angle !== 0)
      .map((fold): Sentence => {
        const [from, to] = [pointAt(fold.curve, 0), pointAt(fold.curve, 1)];
        return [
          `Score a ${fold.kind} fold from `,
          figure(from.x, true),
          ' across, ',
          figure(from.y, true),
          ' down, to ',
          figure(to.x, true),
          ' across, ',
          figure(to.y, true),
          ' down.',
        ];
      }),
  ];
}
