import { decimal } from '../measure';
import { distance, lengthOf, pointAt } from '../net';
import type { Curve, Panel, Sentence } from '../types';
import { cuttingOut } from './cut-words';
import { fanSizes } from './fan-sizes';
import { holes, scoring, slits } from './line-words';
import { panelOf } from './panel-of';
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
      return [...scoring(options), ...cuttingOut(options), ...slits(options), ...holes(options)];
    case 'grid':
    case 'layer':
      return [];
  }
}
const degrees = (angle: number): string => `${decimal(angle, 1)}°`;

function fan({ net, def, figure }: WordsOptions): Sentence[] {
  if (def.builder !== 'fan') return [];
  const fan = fanSizes(net, def);
  if (!fan) return [];
  const [tab] = net.panels.filter((one) => one.role === 'tab').map(tabSizes);
  const [hole] = net.holes.flatMap((loop) => loop.flatMap((curve) => (curve.type === 'arc' ? [curve] : [])));
  const turnOf = (name: string) => net.folds.find((fold) => fold.panels.includes(name))?.angle ?? 0;
  const flaps = `${def.flap.name}s`;
  return [
    [
      'Draw a circle of ',
      figure(distance(fan.middle, fan.side.from)),
      ' radius, its middle ',
      figure(fan.middle.x),
      ' from the left edge and ',
      figure(fan.middle.y),
      ` from the top; mark it every ${degrees(360 / fan.sides)}, beginning ${degrees(180 / fan.sides)} beside the lowest point, and join the ${fan.sides} marks: sides of `,
      figure(lengthOf(fan.side)),
      ', each ',
      figure(distance(fan.middle, pointAt(fan.side, 0.5))),
      ' from the middle.',
    ],
    def.flap.shape === 'triangle'
      ? ['On every side draw a triangle, its tip ', figure(fan.height), ' out from the middle of the side.']
      : ['On every side draw a rectangle ', figure(fan.height), ' tall.'],
    ...(tab
      ? [
          [
            `On the left edge of every ${def.flap.name}, seen from the middle, draw a glue tab `,
            figure(tab.width),
            ` wide; its ends stand at ${degrees(tab.low)} to that edge on the inner side and ${degrees(tab.high)} on the outer.`,
          ],
        ]
      : []),
    ...(hole
      ? [
          [
            'In every tip punch a hole of ',
            figure(2 * hole.radius),
            ' diameter on the middle line, its middle ',
            figure(fan.tipOf(hole.centre)),
            ' from the tip.',
          ],
        ]
      : []),
    [
      `Score the ${fan.sides} sides${tab ? ' and the edges with tabs' : ''}: the ${flaps} turn by ${degrees(turnOf(def.centre.toLowerCase()))}${tab ? `, the tabs by ${degrees(turnOf('tab 1'))}` : ''}.`,
    ],
  ];
}

/** A tab on an edge: how far it stands out and the angles of its ends to the edge. */
function tabSizes({ loop }: Panel) {
  const [hinge, first] = loop as [Curve, Curve];
  const last = loop.at(-1) as Curve;
  const width = Math.abs(
    ((hinge.to.x - hinge.from.x) * (first.to.y - hinge.to.y) -
      (hinge.to.y - hinge.from.y) * (first.to.x - hinge.to.x)) /
      lengthOf(hinge),
  );
  const lean = (end: Curve) => (Math.asin(Math.min(1, width / lengthOf(end))) * 180) / Math.PI;
  return { width, low: lean(first), high: lean(last) };
}

function disc({ net, def, figure }: WordsOptions): Sentence[] {
  if (def.builder !== 'disc') return [];
  const arc = panelOf(net, def.disc)?.loop.find((curve) => curve.type === 'arc');
  if (arc?.type !== 'arc') return [];
  const teeth = net.panels.filter((one) => one.tooth);
  const [root, , tip] = teeth[0]?.loop ?? [];
  if (!root || !tip) return [['Draw a circle of ', figure(2 * arc.radius), ' diameter and cut it out.']];
  return [
    [
      'Draw a circle of ',
      figure(2 * arc.radius),
      ' diameter and score it; the rim outside it is ',
      figure(distance(arc.centre, pointAt(tip, 0.5)) - arc.radius),
      ' deep.',
    ],
    [
      `Cut the rim into ${teeth.length} teeth, one every ${degrees(360 / teeth.length)}, each `,
      figure(distance(root.from, root.to)),
      ' wide at the score and ',
      figure(lengthOf(tip)),
      ' at the tip, a V between each two, down to the score.',
    ],
  ];
}

function sector({ net, def, figure }: WordsOptions): Sentence[] {
  if (def.builder !== 'sector') return [];
  const body = panelOf(net, def.body);
  const radii = [...new Set((body?.loop ?? []).flatMap((curve) => (curve.type === 'arc' ? [curve.radius] : [])))].sort(
    (a, b) => b - a,
  );
  const [outer = 0, inner] = radii;
  const seam = net.panels.find((one) => one.role === 'tab');
  const { apex, angle } = body?.cone ?? { apex: { x: 0, y: 0 }, angle: 0 };
  const tab = seam && tabSizes(seam);
  return [
    [
      'From one point draw an arc of ',
      figure(outer),
      ' radius',
      ...(inner === undefined ? [] : [' and one of ', figure(inner), ' radius']),
      ` over ${degrees(angle)}, which is `,
      figure(2 * outer * Math.sin((angle * Math.PI) / 360)),
      ' straight across the outer one, and join their ends by straight lines.',
    ],
    [
      'That point lies ',
      figure(apex.x),
      ' from the left edge and ',
      figure(Math.abs(apex.y)),
      ` ${apex.y < 0 ? 'above' : 'below'} the top one; the piece hangs straight down from it.`,
    ],
    ...(tab
      ? [
          [
            'Outside the left straight edge draw a glue tab ',
            figure(tab.width),
            ` wide; its ends stand at ${degrees(tab.low)} to that edge at the outer arc and ${degrees(tab.high)} at the ${inner === undefined ? 'point' : 'inner one'}.`,
          ],
        ]
      : []),
    ['Cut it out. Roll the piece, do not fold it.'],
  ];
}
