import type { Pattern } from '@/engine';
import { INCH, type DemoProject } from '../demo-project';
import { caution, cutList, heading, list, materials, ordered, piece, step, tip, writeUp } from '../write';

/** Seen from behind: the bars stand up round the window. */
const fromBehind = 148;
/** A sheet with a flower on it, laid in from behind, on the rebate. */
const withFlower = (pattern: Pattern): Pattern => ({
  ...pattern,
  pieces: [
    ...pattern.pieces,
    {
      name: 'Sheet',
      stock: 'patterned paper',
      builder: 'grid',
      look: 'pages',
      columns: [{ name: 'wide', size: 'picture width' }],
      rows: [{ name: 'tall', size: 'picture height' }],
      cells: [['panel sheet']],
    },
    {
      name: 'Stem',
      stock: 'card',
      builder: 'grid',
      columns: [{ name: 'wide', size: '1.6 mm' }],
      rows: [{ name: 'tall', size: 'window height * 0.5' }],
      cells: [['panel stem']],
    },
    {
      name: 'Flower',
      stock: 'patterned paper',
      builder: 'fan',
      centre: 'eye',
      sides: '11',
      side: 'window width / 14',
      flap: { name: 'petal', shape: 'triangle', height: 'window width / 5', angle: '0°' },
    },
  ],
  assembly: [
    ...pattern.assembly,
    {
      piece: 'Sheet',
      root: 'sheet',
      at: ['(front width + picture width) / 2', '2 mm', '(front height + picture height) / 2'],
      across: '-x',
      along: '-z',
    },
    {
      piece: 'Stem',
      root: 'stem',
      at: ['front width / 2', '1.4 mm', 'front height / 2 + window height * 0.08'],
      across: '-x',
      along: '-z',
    },
    {
      piece: 'Flower',
      root: 'eye',
      at: ['front width / 2', '0.8 mm', 'front height / 2 + window height * 0.14'],
      across: '-x',
      along: '-z',
    },
  ],
});

export const flowerFrame: DemoProject = {
  title: 'Frame for a pressed flower',
  summary:
    'A deep frame rolled from one sheet, with hollow bars and mitred corners, for what the garden left between two pages.',
  minutes: 120,
  pattern: 'frame-box',
  values: {
    'picture width': 3.5 * INCH,
    'picture height': 4.5 * INCH,
    depth: 0.75 * INCH,
    border: 1.125 * INCH,
  },
  createdDaysAgo: 18,
  hero: 'front',
  pictures: {
    front: {
      alt: 'A deep green frame stands upright. In its window a flower with pointed petals shows on a cream sheet, and the side of the frame is as deep as a thick book’s back.',
      scene: (build) => ({ things: [{ type: 'folded', tilt: 16, ...build(withFlower) }], card: 'green', whole: true }),
    },
    flat: {
      alt: 'The sheet lies flat: a large field with a window in the middle and, on each of its four sides, four strips one beyond the other. Where neighbours meet, their third strips end in slanting cuts.',
      scene: (build) => ({
        things: [{ type: 'flat', pieces: ['Frame'], ...build() }],
        card: 'green',
        words: 'One sheet, from the inside',
      }),
    },
    rolling: {
      alt: 'The frame from behind, three times: its walls just lifting, half rolled with the hooks turning in, and closed, with hollow bars that meet in mitres at the corners.',
      scene: (build) => ({
        things: [0.35, 0.7, 1].map((share) => ({ type: 'folded', share, turn: fromBehind, tilt: 24, ...build() })),
        card: 'green',
        words: 'From behind: the bars roll up',
      }),
    },
  },
  editions: [
    {
      daysAgo: 12,
      writeUp: (show) =>
        writeUp(
          'A pressed flower is thicker than it looks, and behind glass it breaks. This frame is a box without a lid: four hollow bars, rolled from the same sheet as the front, hold the picture a good way behind the window and never touch the petals.',
          'It is drawn from the picture outwards. Ours is for one of [[picture width|bare]] × [[picture height]]; the frame covers [[rebate]] of it all round, so what you see is [[window width|bare]] × [[window height]]. Set the size of yours beside this text.',
          materials(
            '**Card for the frame**, 220 to 270 g/m² (80 to 100 lb cover), the same colour on both sides: [[frame.across|bare]] × [[frame.along]], in one piece. Look at the sheet plan; this is a project that outgrows its sheet.',
            '**Card to mount the flower on**, [[picture width|bare]] × [[picture height]], and a piece of greyboard as large, for behind it.',
            'The figures are for card [[card thickness]] thick. Each bar folds four times, so tell us if yours is not.',
            'White glue and a scrap to spread it with; a few clothes pegs; two strips of paper tape.',
            'Knife, metal ruler and mat for the window; trimmer; scissors; scoring board; bone folder; pencil.',
          ),
          caution(
            'The window takes a knife, and a knife in a corner slips. Follow the maker’s instructions for it and for the trimmer, put in a fresh blade, and keep the hand that holds the ruler behind its raised edge. Children press the flower and roll the bars; you cut the window.',
          ),
          cutList,
          heading('Score and cut'),
          step(
            'Cut the sheet square',
            'Cut it [[frame.across|bare]] × [[frame.along]]. Measure both diagonals. Everything that follows is measured from the edges, and a sheet that is not square makes a frame that is not.',
          ),
          step(
            'Four scores from every side',
            'From the edge inwards: the foot, the inner wall, the back, the outer wall. That puts the scores at [[foot]], [[foot + inner wall]], [[foot + inner wall + hollow]] and [[foot + inner wall + hollow + depth]]. Set the stop, score all four sides, and only then set the next.',
            'The inner wall is a card’s thickness lower than the outer one, because it stands on its own foot. No ruler shows that little: score its line on the near side of your mark.',
            piece('Frame'),
            'In the middle there is now a field of [[front width|bare]] × [[front height]], the front. If it is not, the sheet was not.',
          ),
          step(
            'The window, while the sheet is flat',
            'Rule it on the inside, [[border]] in from every edge of the front. It should come out [[window width|bare]] × [[window height]]. Cut it in light passes, from each corner towards the middle of the side, and let the blade stop in the corner by itself.',
            tip(
              'Put a pin upright into each corner first and cut from pinhole to pinhole. The corner is then clean even if the blade runs on by a hair.',
            ),
          ),
          step(
            'Cut away the corners',
            ordered(
              'Outside the scores of the outer walls, the four corners of the sheet are waste, but for four **corner tabs**: on the left and right outer walls, at both ends, each [[corner tab]] wide.',
              'The four backs end in **mitres**: cut them from the corners of the front’s outer walls inwards at half a right angle. The corner of a square of paper, folded once, is your gauge.',
              'The inner walls and feet are as long as the mitres leave them. Those on the left and right are a card’s thickness shorter at each end, for they stand between the other two. Trim the ends of all feet slantwise.',
            ),
            'The corner tabs fold a card’s thickness inside the ends of the front, so that the top and bottom walls lie flat over them.',
            show(
              'flat',
              'Cut and scored. From the front outwards: outer wall [[depth]], back [[hollow]], inner wall, and a foot of [[foot]].',
            ),
          ),
          heading('Roll it up'),
          step(
            'Fold every score',
            'Fold each to a right angle, all the same way, towards you. Press it flat, rub it down, open it. Sixteen folds in all: it is dull, and it is why the bars come out straight.',
          ),
          step(
            'Stand up the outer walls',
            'Glue on the four corner tabs. Stand the left wall up and the top wall beside it, and press the tab **inside** the top wall. Peg it. Go round all four corners, and check each with the corner of a book.',
            'You have a shallow tray with a hole in its floor, and wings.',
          ),
          step(
            'Roll the top and bottom bars',
            ordered(
              'Fold foot and inner wall of the top to a hook.',
              'Fold the back down, so that the hook goes into the tray. The foot comes to lie on the back of the front, pointing to the outer wall.',
              'Check that the inner wall stands upright, [[hollow]] from the outer wall. Then glue the foot and press it down with a ruler until it holds.',
              'The same at the bottom.',
            ),
            'The foot hides in the bar. If glue comes out under the inner wall, wipe it off now: it would show beside the picture.',
          ),
          step(
            'Roll the left and right bars',
            'They go between the other two. The mitres close as the backs come down, and there is no room to spare: if one rides up on its neighbour, shave the mitre and not the wall.',
            show(
              'rolling',
              'From behind. Closed, the bars leave a recess of [[recess width|bare]] × [[recess height]] for the picture.',
            ),
          ),
          step(
            'Look it over',
            list(
              'The mitres close at the back, all four.',
              'The recess measures [[recess width|bare]] × [[recess height]], at both ends.',
              'Laid on its face it does not rock.',
            ),
            '**A bar leans in?** Its foot was glued too far out. Wet the glue along the foot with a brush, wait a minute, and push it back.',
          ),
          heading('The picture'),
          step(
            'Mount the flower',
            'Cut the mount and the greyboard [[picture width|bare]] × [[picture height]]. Keep everything that should be seen within [[window width|bare]] × [[window height]] in the middle. Fix the flower with three small dots of glue, one under the stem, and leave it under a book overnight.',
            caution(
              'Some garden plants make skin itch or are poisonous, dried as well as fresh. Know what you press, wash your hands after it, and keep berries and seed heads away from small children.',
            ),
          ),
          step(
            'Drop it in',
            'Turn the frame on its face. Lay in the mount, then the greyboard. They have [[recess width - picture width]] of room, so they fall into place, and [[rebate]] of card all round holds them. Two strips of paper tape across the back, from bar to bar, keep them there; next year’s flower comes in the same way.',
            show(
              'front',
              'Finished: [[outside width]] wide, [[outside height]] tall and [[outside depth]] deep. The frame covers [[rebate]] of the picture on every side.',
            ),
          ),
          step(
            'A clear front | optional',
            'To keep dust off, cut clear film [[picture width|bare]] × [[picture height]] and lay it in before the mount, with narrow strips of card between the two to hold it off the petals.',
            caution('Film, not glass. A cut pane has edges that go through card, and through fingers.'),
          ),
          step(
            'Stand it or hang it',
            'Being [[outside depth]] deep, it stands by itself on either side. To hang it, pierce the upper bar twice from behind, [[outside width / 2]] apart, and knot a thread through: the bar is hollow, and the knots vanish in it.',
          ),
        ),
    },
  ],
};
