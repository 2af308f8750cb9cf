import type { Pattern, Placement } from '@/engine';
import { INCH, keep, type DemoProject } from '../demo-project';
import { caution, cutList, heading, list, ordered, piece, step, tip, materials, writeUp } from '../write';

const PACKETS = 9;
/** How far the pattern's picture pulls the drawer out, as a share of its length. */
const DRAWER_OUT = 0.45;

/** The drawer alone, with packets standing in it on their long edges and a finger's room behind the last. */
function filled(pattern: Pattern): Pattern {
  const packets = Array.from(
    { length: PACKETS },
    (_, index): Placement => ({
      piece: 'Packet',
      root: 'front',
      at: [
        `inside length * ${DRAWER_OUT + 0.12 + (0.8 * (PACKETS - index)) / PACKETS}`,
        'inside width - 3 mm',
        `inside height * ${index % 3 === 1 ? 0.86 : 0.94}`,
      ],
      across: '-y',
      along: '-z',
    }),
  );
  return {
    ...pattern,
    pieces: [
      ...pattern.pieces,
      {
        name: 'Packet',
        stock: 'patterned paper',
        builder: 'grid',
        columns: [{ name: 'wide', size: 'inside width - 6 mm' }],
        rows: [{ name: 'tall', size: 'inside height * 0.85' }],
        cells: [['panel front']],
      },
    ],
    assembly: [...pattern.assembly.filter(({ piece: name }) => name === 'Drawer'), ...packets],
  };
}
const sleeveAlone = keep((name) => name === 'Sleeve');

export const packetSleeve: DemoProject = {
  title: 'Packet sleeve with a drawer',
  summary: 'For seed packets on their edge, sorted by sowing month: a drawer that slides in a sleeve.',
  minutes: 50,
  pattern: 'sleeve-drawer',
  values: { 'inside length': 6 * INCH, 'inside width': 3.5 * INCH, 'inside height': 1.875 * INCH },
  createdDaysAgo: 46,
  hero: 'halfOut',
  pictures: {
    halfOut: {
      alt: 'A brown sleeve lies on the table with its cream drawer pulled halfway out. A half-round notch in the sleeve’s edge leaves room for a thumb.',
      scene: (build) => ({ things: [{ type: 'folded', ...build() }], card: 'kraft', whole: true }),
    },
    filled: {
      alt: 'The cream drawer by itself, seen from above, with nine brown packets standing in it one behind another, a little uneven in height.',
      scene: (build) => ({
        things: [{ type: 'folded', tilt: 34, ...build(filled) }],
        card: 'kraft',
        words: 'The drawer with packets on edge',
      }),
    },
    round: {
      alt: 'The sleeve twice: on the left almost closed, its panels curling under like a hand; on the right closed to a flat tube, with half-round notches in the wide panels at both open ends.',
      scene: (build) => ({
        things: [0.72, 1].map((share) => ({ type: 'folded', share, turn: -52, tilt: 24, ...build(sleeveAlone) })),
        card: 'kraft',
        words: 'The sleeve, nearly closed and closed',
      }),
    },
  },
  editions: [
    {
      daysAgo: 38,
      writeUp: (show) =>
        writeUp(
          'Our packets are folded by hand and no two are quite alike, so a tin with a fixed slot is no use to us. In this drawer they stand on their long edge, one behind another, and you leaf through them with one finger. Push the drawer home and the sleeve keeps light and dust out until the month comes round.',
          'The drawer is [[inside length]] long, [[inside width]] wide and [[inside height]] tall inside. That suits packets up to [[inside width - 1/4 in]] long and [[inside height - 1/8 in]] tall. For others, measure the largest packet, add as much, and set the size beside this text.',
          materials(
            '**Card for the sleeve**, 270 g/m² (100 lb cover) or near it: [[sleeve.area]] in one piece.',
            '**Card for the drawer**, the same weight or a little lighter: [[drawer.area]].',
            'The sums are for card [[card thickness]] thick. Soft, fluffy card is often thicker than its weight suggests: stack ten layers and measure.',
            'White glue, a spreader, clothes pegs, and a ruler or a strip of scrap to press the seam with.',
            'Trimmer, or knife, metal ruler and mat; scoring board; bone folder; scissors.',
            'For the notches: a punch, or something round that measures [[2 * notch radius]] across to draw round.',
          ),
          caution(
            'Trimmer and knife: as their makers say, guards on, hand behind the ruler, blade in when you put it down. A punch bites too; press it on the table, not in your palm.',
          ),
          cutList,
          heading('Cut and score'),
          step(
            'Cut the drawer',
            'Cut one piece, [[drawer.across|bare]] × [[drawer.along]]. Mark the inside with a pencil cross now. Both sides look alike until you have folded the wrong one.',
          ),
          step(
            'Score and slit it',
            'Score [[inside height]] in from all four sides without moving the stop. Then slit the four corners from the top and bottom edges of the drawing, as far as the crossing, and trim the tabs to their taper.',
            piece('Drawer'),
            'The tabs hang on the two **ends**, which are the walls you will pull at. That is on purpose: a tab glued inside the side wall takes the pull along its whole width, where one glued the other way would peel.',
          ),
          step(
            'Cut the sleeve',
            'One long piece, [[sleeve.across|bare]] × [[sleeve.along]]. Look at the sheet plan first: it is the piece that outgrows a sheet. If it does, a shorter or flatter drawer helps more than a narrower tab.',
            'The grain should run **through** the sleeve, along the side that measures [[sleeve.along]]. All its folds run that way.',
          ),
          step(
            'Score it with care',
            'Hold one end against the stop and make all the scores from there. Do not turn the card half way: small errors would meet in the middle.',
            piece('Sleeve'),
            'The panels look like two equal pairs, and they are not. The first wide one is [[sleeve.bottom]]; the one that lies over it is a card’s thickness wider, and the last narrow one a card’s thickness narrower, because the seam tab lies inside. No ruler shows so little. Score that line on the **far** side of your pencil mark and you have it.',
            tip('Cutting from the full-size template, or with a machine? Then this is taken care of, to the hair.'),
          ),
          step(
            'Thumb notches | if you chose them',
            'The drawer is pushed out with a thumb, so both wide panels get a half-round bite, [[notch radius]] deep, in the middle of their open ends. Find the middle of each **panel**, [[sleeve width / 2]] from the score on its left, and not the middle of the whole card.',
            'Draw all four, hold the flat sleeve up, and fold it together loosely. The notches must look at each other. Only then cut.',
          ),
          heading('Put it together'),
          step(
            'Glue the drawer and let it dry',
            ordered(
              'Fold and burnish every score.',
              'Glue on the two tabs of one end, set the end wall up, press the tabs inside the side walls. Peg them.',
              'The same at the other end. Leave it alone for about 10 minutes.',
            ),
            'From now on the drawer is your ruler. It is a little different from the drawing, as everything made by hand is, and the sleeve is made to the drawer.',
          ),
          step(
            'Wrap the sleeve round it, dry',
            'Fold the sleeve round the drawer with no glue, seam underneath. It should close with [[play]] of room in all, across and upwards: enough for a slip of paper on each side.',
            show(
              'round',
              'The sleeve nearly closed, and closed. Closed, it is [[sleeve width]] wide and [[sleeve height]] tall inside.',
            ),
            list(
              '**Tight under the top?** Set the seam tab in a hair less far; the last panel then stands that much taller.',
              '**Tight at the sides?** The scores stand too close. Cut the sleeve again with more play, and keep this one for smaller packets.',
              '**Too loose?** Fold a strip of paper once and glue it along one side of the drawer, outside. That is quicker than a new sleeve.',
            ),
          ),
          step(
            'Glue the seam, drawer out',
            'Take the drawer **out**. Everybody leaves it in once, and then owns a box that does not open. Glue on the seam tab, [[sleeve.seam tab]] wide, right to its edges. Set it inside the last panel, fold line first, and press it with a ruler laid inside.',
            'Squeeze the tube flat one way, then the other, before the glue takes. It will stand square by itself afterwards.',
            caution(
              'Hot glue is too thick for this seam, and its ridge stops the drawer. If you do use it anywhere, mind the nozzle and the melted glue, and do as its maker says.',
            ),
          ),
          step(
            'Try it',
            'Slide the drawer in, seam underneath. Tilt it: it stays. Tilt it further: it begins to move. If it stops half way, the sleeve was glued a little skew. Rub the inside corners with a candle end and work the drawer to and fro.',
            show(
              'halfOut',
              'Half out. Closed, the whole is [[sleeve length]] long, [[outside width]] wide and [[outside height]] tall.',
            ),
          ),
          step(
            'Cards for the months | optional',
            'Cut twelve cards, [[inside width - 1/8 in|bare]] × [[inside height - 1/16 in]], and write a month along the top edge of each. Stagger the words, or you will only ever see January.',
            show(
              'filled',
              'On edge, with a finger’s room behind the last one. Fill all [[inside length]] of it and you can no longer leaf.',
            ),
          ),
          step(
            'A loop to pull by | optional',
            'If you left the notches out, the drawer needs a handle. Glue a loop of ribbon or string between the end wall and a second layer of card, cut [[inside width|bare]] × [[inside height]].',
            caution(
              'No beads, buttons or magnets on a box that small children can reach: they come off and go into mouths.',
            ),
            caution(
              'Glue, ink and card are not meant for food. Keep seed that may be eaten in its own bag, and treated seed out of everybody’s reach, with a label that says so.',
            ),
          ),
        ),
    },
  ],
};
