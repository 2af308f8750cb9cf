import type { Pattern } from '@/engine';
import type { WriteUp } from '@/writeup/document';
import { INCH, keep, type DemoProject, type ShowPicture } from '../demo-project';
import { caution, cutList, heading, list, materials, ordered, piece, step, tip, writeUp } from '../write';

const carcassAlone = keep((name) => name === 'Carcass');
const carcassAndShelves = keep((name) => name === 'Carcass' || name === 'Shelf');
const oneDrawer = (pattern: Pattern): Pattern => ({
  ...pattern,
  assembly: pattern.assembly.filter(({ piece: name }) => name === 'Drawer').slice(0, 1),
});

/** The whole write-up. Edition 1 gave the shelves legs without play; `legs` is the measure that it names. */
const write = (show: ShowPicture, { legs, check }: { readonly legs: string; readonly check: string }): WriteUp =>
  writeUp(
    'One drawer for each season’s sowing, and when a season is over its packets go back to the top. None of the work is hard, and the chest forgives nothing: every drawer has to go into every place. So we make the drawers first, and let them tell us how large the chest must be.',
    'Ours has [[drawers]] drawers, each [[inside width]] wide, [[inside length]] from front to back and [[inside height]] tall inside. The chest around them is [[outside width]] wide, [[outside height]] tall and [[outside depth]] deep. Set your own beside this text, and look at the sheet plan before you buy card.',
    materials(
      '**Card for the drawers**, about 220 g/m² (80 lb cover): [[drawers * drawer.area]].',
      '**Card for carcass and shelves**, 270 to 300 g/m² (100 to 110 lb cover): [[carcass.area + (if shelves > 0 then shelves * shelf.area else 0 mm * 0 mm)]]. The carcass comes out of one piece.',
      'All of it is reckoned with [[card thickness]] for the thickness of a card. There are many layers in this one; measure a stack of ten, and correct it among the finer points.',
      'White glue, a scrap to spread it with, clothes pegs, and a heavy book.',
      'Trimmer, or knife, metal ruler and mat; scoring board; bone folder; scissors; a punch or an awl.',
      'A knob for each drawer: a brad, a bead on a thread, or a loop of string.',
    ),
    caution(
      'There is a lot to cut, and tired hands slip. Follow the makers’ instructions for trimmer and knife, keep the guards on, change the blade when it drags, and stop when you have had enough. Children score, fold and glue; they cut with somebody beside them or not at all.',
    ),
    cutList,
    heading('The drawers'),
    step(
      'Cut and score all drawers at once',
      'Cut [[drawers]] pieces, [[drawer.across|bare]] × [[drawer.along]]. Set the stop to [[inside height]] and score every one of them from all four sides before you touch the stop again. Drawers that were scored together are alike.',
      piece('Drawer'),
    ),
    step(
      'Slit the corners, punch the hole',
      'Lay each as in the drawing. Slit the corners from the **top and bottom edges**, along the score, [[inside height]] deep, to the crossing. The corner squares stay on front and back, and become tabs.',
      'The hole for the knob goes through the front while it is flat: [[inside height / 2]] from its edge, and [[inside width / 2]] from either side score. [[knob hole]] is wide enough for a brad.',
      caution(
        'Punch on the mat, straight down, with the hand that holds the card well to one side. An awl goes into a finger as easily: put a cork on its point when it is laid down.',
      ),
    ),
    step(
      'Fold and glue them',
      'Fold every score, burnish it, and open it again. Glue on the tabs; set them **inside** the long sides, folds in the corners, front first and then back. Peg them for about 10 minutes.',
      show(
        'drawer',
        'A drawer: flat, half folded, and glued. Outside it measures [[drawer outside width]] across and [[drawer outside height]] up.',
      ),
    ),
    step(
      'Find the widest',
      'Measure all drawers across, outside, near the front and near the back. They should be [[drawer outside width]]. What counts is not the average but the **widest**: mark it, it will be your gauge for everything that follows.',
      'Wider than that by more than half of [[play]]? The tabs stand off the sides. Press them down with the folder from inside. If that does not help, your card is thicker than we reckoned; set its thickness now, before the carcass is cut.',
    ),
    heading('The carcass'),
    step(
      'Cut it, score it, lay it on its back',
      'The carcass is one more tray, standing on its side: the floor of it is the back of the chest, and the open face is the front. Cut one piece, [[carcass.across|bare]] × [[carcass.along]], and score [[carcass depth]] in from all four sides.',
      piece('Carcass'),
      'The field in the middle should be [[carcass width|bare]] × [[carcass height]].',
      tip(
        'Too large for your sheet? Cut it in two across the back, and join the halves with a strip of card, glued inside over the cut. Nobody sees it once the drawers are in.',
      ),
    ),
    step(
      'Slit it and trim its tabs',
      'Slit the corners from the top and bottom edges, [[carcass depth]] deep, to the crossing. The corner squares stay on the **left and right** walls. Trim each to a tab [[runner]] wide along its whole length, and take a wedge off both ends.',
      'They look like ordinary tabs, and they are runners as well: the lowest drawer slides on the two at the foot.',
    ),
    step(
      'Glue it with its back on the table',
      'Fold and burnish. Glue the tabs inside the top and the bottom, one wall after the other. Set a book against the corner while it dries, and measure the diagonals of the open front: if they are equal, the drawers will run.',
    ),
    heading('Shelves and knobs'),
    step(
      'Cut the shelves | with shelves',
      `Cut [[shelves]], [[shelf.across|bare]] × [[shelf.along]]. Score ${legs} in from both short ends: these are the legs. ${check}`,
      piece('Shelf'),
      'Each shelf stands on the one beneath, so there is nothing to mark inside the carcass. The legs do the measuring.',
    ),
    step(
      'Build up from the bottom | with shelves',
      ordered(
        'Slide the widest drawer in at the foot.',
        'Fold the legs of a shelf down, glue on their outsides, and slide it in over the drawer, level with the front, until its legs stand on the bottom.',
        'Press the legs to the walls, and draw the drawer **out** before the glue can find it.',
        'Set the drawer on the new shelf, and go on with the next.',
      ),
      show(
        'carcass',
        'The carcass by itself, and with its shelves. Each place is [[cell height]] tall for a drawer of [[drawer outside height]].',
      ),
    ),
    step(
      'Or let them ride on one another | without shelves',
      'If you chose no shelves, there is nothing to build in: the drawers slide on each other, and the carcass was made that much lower. It is quicker, and good for three. With more, the lowest carries so much that it sticks.',
    ),
    step(
      'Every drawer in every place',
      'When the glue has dried, try them all, everywhere. Number each drawer, on its back, for the place where it runs best.',
      list(
        '**Tight at the sides?** Look for glue on a leg first. Then shave the drawer, not the shelf.',
        '**Tight above?** The shelf’s leg was scored short; a strip of card glued under the leg lifts it.',
        '**It stands out in front?** It touches the back. The drawer’s back wall leans: crease it again.',
      ),
      show(
        'chest',
        'The finished chest: [[outside width]] wide, [[outside height]] tall, [[outside depth]] deep, with [[play]] of air round every drawer.',
      ),
    ),
    step(
      'Knobs',
      'Push the brad through from the front and spread its legs inside; cover them with a patch of card, [[inside width / 3|bare]] × [[inside height / 2]], so that no packet catches on them.',
      caution(
        'Brads, beads and above all magnets are swallowed by small children. If any live with you, take a loop of string, knotted inside. And a chest on a shelf tips when all drawers are pulled at once: weight its foot, or fix it.',
      ),
    ),
    step(
      'Labels | optional',
      'A label [[inside width / 2|bare]] × [[inside height / 2]] leaves room for the knob if it sits above it. Write the months in pencil. What you sow in them will change.',
    ),
  );

export const seasonChest: DemoProject = {
  title: 'Chest for four seasons',
  summary: 'A small chest of drawers for a year of sowing. Every drawer goes into every place.',
  minutes: 180,
  pattern: 'drawer-chest',
  values: { drawers: 4, 'inside length': 3.25 * INCH, 'inside width': 4.25 * INCH, 'inside height': 1 * INCH },
  createdDaysAgo: 36,
  hero: 'chest',
  pictures: {
    chest: {
      alt: 'A chest of drawers in terracotta card with four cream drawers. The topmost is pulled out and one looks into it; each front has a hole for its knob.',
      scene: (build) => ({ things: [{ type: 'folded', ...build() }], card: 'clay', whole: true }),
    },
    drawer: {
      alt: 'One drawer three times, left to right: flat with slit corners, half folded, and glued, with the hole for the knob in its front.',
      scene: (build) => ({
        things: [0, 0.55, 1].map((share) => ({ type: 'folded', share, tilt: 34, ...build(oneDrawer) })),
        card: 'clay',
        words: 'Flat, half folded, glued',
      }),
    },
    carcass: {
      alt: 'The carcass twice, seen from the front: on the left empty, a box with one open face; on the right with its shelves inside, dividing it into four equal places.',
      scene: (build) => ({
        things: [carcassAlone, carcassAndShelves].map((change) => ({
          type: 'folded',
          turn: -24,
          tilt: 16,
          ...build(change),
        })),
        card: 'clay',
        words: 'Without shelves, and with',
      }),
    },
  },
  editions: [
    {
      daysAgo: 32,
      writeUp: (show) =>
        write(show, { legs: '[[drawer outside height]]', check: 'Between them the shelf spans the carcass.' }),
    },
    {
      daysAgo: 15,
      note:
        'Step 8 told you to score the shelves’ legs at the height of a drawer. They must be as tall as a drawer’s place, which is the drawer and its play, as the drawing beside it always showed. Scored as we wrote, a shelf is too wide for the carcass, and its legs are too short to let a drawer pass.\n\n' +
        'If you have only scored your shelves, score them again at the right height: the blanks are the right size, and the old lines lie against the walls, where nobody sees them. If you have trimmed the legs to make a shelf go in, cut that shelf again. Drawers and carcass are not affected. Thank you, Tobiah, for asking before you trimmed.',
      writeUp: (show) =>
        write(show, {
          legs: '[[cell height]], which is a drawer’s height **and the play**,',
          check: 'Between them the shelf should measure [[shelf width]], which spans the carcass.',
        }),
    },
  ],
};
