import type { Pattern } from '@/engine';
import { INCH, keep, type DemoProject } from '../demo-project';
import { caution, cutList, heading, list, materials, ordered, piece, step, tip, writeUp } from '../write';

const baseAlone = keep((name) => name === 'Base');

/** Four bases, wall against wall, and a lid on one of them. */
const comb = (pattern: Pattern): Pattern => {
  const [base, lid] = pattern.assembly;
  if (!base || !lid) return pattern;
  const far = 'lid across flats + 4 * card thickness';
  return {
    ...pattern,
    assembly: [
      base,
      { ...base, at: ['0 mm', far, '0 mm'] },
      { ...base, at: [`(${far}) * cos(30°)`, `(${far}) / 2`, '0 mm'] },
      { ...base, at: [`-(${far}) * cos(30°)`, `(${far}) / 2`, '0 mm'] },
      { ...lid, at: [`-(${far}) * cos(30°)`, `(${far}) / 2`, 'inside height + 2 * card thickness'] },
    ],
  };
};

export const honeycombBox: DemoProject = {
  title: 'Honeycomb box',
  summary:
    'Equal walls and a lid, for the flower mix that the bees get. With six sides, boxes stand together without a gap.',
  minutes: 75,
  pattern: 'polygon-box',
  values: { 'inside across flats': 3.5 * INCH, 'inside height': 2 * INCH },
  createdDaysAgo: 45,
  hero: 'closed',
  pictures: {
    closed: {
      alt: 'A six-sided box the colour of honey. Its lid, a little larger all round, is half on, and one corner points towards us.',
      scene: (build) => ({ things: [{ type: 'folded', ...build() }], card: 'honey', whole: true }),
    },
    flat: {
      alt: 'Base and lid lie flat side by side, like two stars: in the middle a six-sided floor, on every side of it a wall, and on one edge of every wall a tapered tab.',
      scene: (build) => ({
        things: [{ type: 'flat', pieces: ['Base', 'Lid'], ...build() }],
        card: 'honey',
        words: 'Base and lid, from the inside',
      }),
    },
    rising: {
      alt: 'The base three times, left to right: flat, with its walls half up and the tabs reaching for each other, and closed to a ring.',
      scene: (build) => ({
        things: [0, 0.6, 1].map((share) => ({ type: 'folded', share, tilt: 36, ...build(baseAlone) })),
        card: 'honey',
        words: 'Flat, half up, closed',
      }),
    },
    comb: {
      alt: 'Four six-sided boxes stand close together like cells of a comb. Three are open and one has its lid on.',
      scene: (build) => ({
        things: [{ type: 'folded', tilt: 40, ...build(comb) }],
        card: 'honey',
        words: 'A comb of four',
      }),
    },
  },
  editions: [
    {
      daysAgo: 41,
      writeUp: (show) =>
        writeUp(
          'The flower mix for the bees is sown broadcast, and it used to travel in an old biscuit tin that dented and would not shut. Now every plot gets its share in a box of its own, and on the shelf the boxes make a comb.',
          'Ours has [[sides]] sides and measures [[ruler across]] straight across inside. From corner to corner it is more, [[across corners]] if the number of sides is even, and that is the size that must fit your shelf. Choose the sides and the size beside this text.',
          materials(
            '**Card**, 220 to 270 g/m² (80 to 100 lb cover): [[base.area]] for the base and [[lid.area]] for the lid.',
            'The figures are for card [[card thickness]] thick.',
            'White glue, a scrap to spread it with, and a few clothes pegs with narrow noses.',
            'Trimmer, or knife, metal ruler and mat; scissors; a ruler and a blunt point to score with; bone folder.',
            'Pencil, set square, and a compass that opens to a little over [[lid across flats / cos(180° / sides) / 2]].',
          ),
          caution(
            'Use knife and trimmer as their makers say: guards on, fingers behind the ruler’s edge, the blade put away between cuts. Let children draw, score and glue, and cut only with somebody beside them.',
          ),
          cutList,
          heading('Draw and cut'),
          step(
            'A circle, and the floor in it',
            'Trim the card to [[base.across|bare]] × [[base.along]]. The drawing in the next step says where the floor’s middle lies and what circle to draw about it. Take that radius to the hair: a compass is not bound to the marks of your trimmer.',
            'On the circle, mark a corner every [[360° / sides]] and join the marks. For six sides you need no protractor: leave the compass as it is and step it round.',
            'Now measure two things. All sides should be alike, and from a side to what lies opposite should be [[ruler across]]. If the last side comes out short, the compass slipped; rub it all out. A box with one short wall never closes.',
            tip(
              'The full-size template saves this step and the next. Lay it on the card, prick every corner through with a pin, and join the pricks.',
            ),
          ),
          step(
            'A wall on every side',
            'With the set square, draw a rectangle on every side, outwards, [[inside height]] tall. The drawing shows them standing round the floor like the petals of a daisy.',
            piece('Base'),
            'On the **left** edge of every wall, seen from the middle, draw a tab [[tab width]] wide. At the floor its end slants by [[low taper]], so that it misses the wall next door while it folds; at the rim it slants just a little. Every wall has one tab, and always on the same hand.',
          ),
          step(
            'Score first, cut after',
            'Score the sides of the floor and the folds of the tabs while there is still a whole sheet to hold on to. Then cut out the star. Between two walls the card falls away as a wedge; stop exactly in the corner of the floor.',
            show(
              'flat',
              'Base and lid, flat. The walls of the base are [[inside height]] tall, those of the lid [[lid height]]; every tab of the base is [[tab width]] wide.',
            ),
          ),
          heading('Put it together'),
          step(
            'Fold the walls square and the tabs less',
            'Fold every wall up to a right angle, rub it down, and open it again. The tabs do **not** turn that far: they turn by [[360° / sides]], and the walls then meet at [[corner angle]]. Fold them over the edge of the table until the tab lies along the next wall by itself.',
          ),
          step(
            'Glue wall to wall, all the way round',
            ordered(
              'Glue on one tab, right to its edges. Stand its wall and the next one up, and set the tab **inside** that next wall, its fold in the corner.',
              'Slide it down until the rims of both walls are level. Peg it, or hold it while you count slowly to sixty.',
              'Go on round, always the same way. At the last corner both walls are held already, so there is no room for a correction: try it dry before the glue goes on.',
            ),
            show(
              'rising',
              'The walls come up together. Closed, the rim is [[ruler across]] straight across, the same from every side.',
            ),
          ),
          step(
            'Measure across the rim',
            'Measure inside, from a side to what lies opposite, all the way round. It should be [[ruler across]] every time. A base that has been pushed out of shape is put right with two fingers now, and not at all tomorrow.',
          ),
          step(
            'The lid, by the same road',
            'A lid is a base that is a little wider and lower. Trim it to [[lid.across|bare]] × [[lid.along]], draw the circle that is named under the drawing, and mark the corners as before. From side to side it is [[lid across flats]] if the sides are even in number; its walls are [[lid height]] tall, and the tabs are [[lid tab width]] wide.',
            piece('Lid'),
            'The two look alike on the bench, and the difference is [[lid side - side]] a side. Write “lid” on it in pencil, inside.',
          ),
          step(
            'Try it every way round',
            'Score, cut, fold and glue the lid as you did the base. Then try it on in all its [[sides]] positions. It may go on more easily in one than in the others: mark that one with a dot inside lid and base.',
            list(
              '**It catches on a corner.** A tab of the base stands off there. Press it with the folder from inside.',
              '**It sticks all round.** Your card is thicker than you told us; measure it, and cut a new lid.',
              '**It drops on and rattles.** Less play, among the finer points, for the next.',
            ),
          ),
          heading('For the shelf'),
          step(
            'A comb of them',
            'Make a second and a third. Boxes with six sides stand wall to wall, and the lids touch before the bases do: allow [[outside across flats]] for each, straight across, and [[outside height]] of height with the lid all the way on.',
            show('comb', 'From wall to opposite wall, each takes [[outside across flats]] of the shelf, lid and all.'),
          ),
          step(
            'A label on the lid | optional',
            'Draw the floor once more on paper, with a circle [[1/4 in]] smaller in radius, and cut it out: [[inside across flats / cos(180° / sides) / 2 - 1/4 in]] from the middle to a corner. Glued on the lid it leaves an even border. Write what is in the mix, and the year.',
            caution(
              'Seed mixes are not food, and some are treated. Keep the box out of the reach of small children and of pets, and copy what the packet says on to the label.',
            ),
          ),
        ),
    },
  ],
};
