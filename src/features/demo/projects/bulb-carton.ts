import type { Pattern } from '@/engine';
import { INCH, type DemoProject } from '../demo-project';
import { caution, cutList, heading, list, materials, ordered, piece, step, tip, writeUp } from '../write';

/** Floor closed, roof panels and gables still upright. */
const openRoof = (pattern: Pattern): Pattern => ({
  ...pattern,
  pieces: pattern.pieces.map((one) =>
    one.builder === 'outline'
      ? {
          ...one,
          lines: one.lines?.map((line) =>
            line.is === 'mountain' || line.angle === 'roof turn'
              ? { ...line, angle: '0°', shown: '0°' }
              : line.angle === '180°'
                ? { ...line, angle: '90°', shown: '90°' }
                : line,
          ),
        }
      : one,
  ),
});

export const bulbCarton: DemoProject = {
  title: 'Bulb carton with a roof',
  summary: 'A little house of one piece of card: bulbs go home in it, and a clothes peg on the ridge keeps them there.',
  minutes: 90,
  pattern: 'gable-carton',
  values: { width: 3 * INCH, depth: 2.5 * INCH, height: 4 * INCH, 'roof height': 1.75 * INCH },
  choices: { window: 'in the front' },
  createdDaysAgo: 31,
  hero: 'closed',
  pictures: {
    closed: {
      alt: 'A carton of brown card stands like a small house. Its front has a window, its roof slopes up on two sides to an upright strip along the ridge, and its gable is folded inwards.',
      scene: (build) => ({ things: [{ type: 'folded', turn: 52, ...build() }], card: 'kraft', whole: true }),
    },
    flat: {
      alt: 'The whole carton lies flat, seen from the inside: four panels in a row with a tab on the left, above them the sloping roof and the ridge strip, below them the flaps of the floor. The first panel has a window.',
      scene: (build) => ({
        things: [{ type: 'flat', pieces: ['Carton'], ...build() }],
        card: 'kraft',
        words: 'One piece, from the inside',
      }),
    },
    closing: {
      alt: 'The carton twice: on the left open at the top, its four roof panels standing straight up; on the right closed, with the gables folded in and the ridge strip upright.',
      scene: (build) => ({
        things: [openRoof, undefined].map((change) => ({ type: 'folded', turn: 52, tilt: 28, ...build(change) })),
        card: 'kraft',
        words: 'Open to be filled, and closed',
      }),
    },
  },
  editions: [
    {
      daysAgo: 27,
      writeUp: (show) =>
        writeUp(
          'At the autumn meeting the bulbs are shared out, and people carried them home in their pockets. Now they carry a house. It comes from one piece of card, it is glued along one side and underneath, and the roof is closed with nothing but folds and a peg.',
          'Ours is [[width]] wide, [[depth]] deep and [[height]] tall to the eaves, and its roof rises by [[roof height]] more. With the strip on the ridge it stands [[height + ridge height + seal strip]] tall. Set your own size beside this text. One rule of geometry comes with it: it must be at least as wide as it is deep, or the two gables meet inside.',
          materials(
            '**Card**, 220 to 270 g/m² (80 to 100 lb cover): [[carton.area]] of it, in one piece. The figures are for card [[card thickness]] thick.',
            'For the window, if you chose one: clear film, a little larger than the window.',
            'White glue and a scrap to spread it with; double-sided tape for the film.',
            'Trimmer, or knife, metal ruler and mat; scissors; a ruler and a blunt point, or a scoring board; bone folder.',
            'A pencil, an eraser, and a clothes peg for the ridge.',
          ),
          caution(
            'Trimmer and knife: as their makers say, guards on, hand behind the ruler, the blade in when you put it down. The window is cut with a free blade; that is not for children, who have enough to do with the folding.',
          ),
          cutList,
          heading('Draw, score and cut'),
          step(
            'Cut the blank and mark the columns',
            'Cut one piece, [[carton.across|bare]] × [[carton.along]], the grain running along the side that measures [[carton.along]], up the walls. Lay it with the inside up.',
            'Measure from the **left** edge, every time from the same end, and rule faint lines from top to bottom at [[tab]], [[tab + width]], [[tab + width + depth]] and [[tab + 2 * width + depth]]. That makes a tab, the front, a side, the back and the other side. Score the last line on the far side of your pencil mark: the back is a card’s thickness wider than the front, because the tab lies under it.',
            show(
              'flat',
              'The whole carton, from the inside. Dash-dot lines fold away from you: the gables, and the strip along the ridge. The walls are [[height]] tall, the roof [[slope]] along the slope.',
            ),
          ),
          step(
            'Mark the rows',
            'From the **top** edge, rule lines at [[seal strip]], which is the ridge, at [[seal strip + slope]], which are the eaves, and at [[seal strip + slope + height]], which is the foot of the walls.',
            'Ridge and eaves lie [[slope]] apart although the roof is only [[roof height]] high, because it slopes. It is the number that people take from the wrong ruler.',
          ),
          step(
            'The gable lines',
            'On both sides, mark the middle of the **ridge line**, [[depth / 2]] from either column. From each of the two lower corners, at the eaves, rule a line up to that mark. They make a tall triangle on each side.',
            'Rule one more short line from each mark straight up to the top edge: there the strip folds in two.',
            tip(
              'If the two lines of a triangle do not meet **on** the ridge line, find out why before you score. A gable that stops short leaves a hole in the ridge, and one that goes past it tears.',
            ),
          ),
          step(
            'The flaps of the floor',
            ordered(
              'Under both sides, a dust flap, [[dust flap]] long, its corners cut off slantwise by [[dust corner]].',
              'Under the back, the floor, [[depth - card thickness]] long, scored a card’s thickness **below** the line.',
              'Under the front, the outer flap, [[outer flap]] long, scored two cards’ thickness below it.',
            ),
            'These three lie on one another in this order, and the hair between their scores is what keeps the floor flat. All flaps are a card’s thickness narrower than their panels, but for the floor.',
          ),
          step(
            'The tab, in two parts',
            'The lower part runs up the wall and is cut off slantwise by [[taper]] at both ends. The upper part belongs to the roof: from the eaves it rises as steeply as the gable lines do, so that it can turn in with them. Beside the strip on the ridge there is none.',
          ),
          step(
            'Score everything, then cut out',
            'Score every line that you have ruled. Then cut round the outside, and slit between the flaps up to the foot of the walls. Erase the pencil now; inside a glued carton you will not get at it.',
            'If you would rather work from figures, every corner and every fold stands below, measured from the left and the top edge. It is long, and the full-size template is shorter: it says the same without a word.',
            piece('Carton'),
          ),
          step(
            'A window | if you chose one',
            'It sits in the middle of the front, [[window width|bare]] × [[window height]]. Cut it from the inside on a mat, from each corner towards the middle of the side. Behind it goes a piece of film [[1/4 in]] larger on every side, with tape or very little glue, while the card is flat.',
            caution(
              'Use a fresh blade and several light passes. A blunt one needs force, and force is what slips in a corner.',
            ),
          ),
          heading('Put it together'),
          step(
            'Fold the gable lines both ways',
            'Fold every score, burnish it, and open it again. Most go towards you. The two long lines of each gable, the ridge line along front and back, and the short line in the middle of each strip go **away** from you.',
            'Then fold the gable lines the other way as well, and back. In a moment they have to give while you hold a carton full of bulbs, and you have no third hand to persuade them.',
          ),
          step(
            'Glue the side, lying flat',
            'Fold the carton in half along two of its corners. Glue on the lower tab and press it inside the last wall, edges level; glue on the upper tab and press it to the last roof triangle. None of it may reach the ridge.',
            'Leave it flat under a book for about 15 minutes. Then open it and push it square.',
          ),
          step(
            'The floor',
            'Turn it upside down. Fold the dust flaps in, spread glue on them, and fold the floor down on to them. Glue on the floor, and the outer flap down on that. Reach in through the roof and press from inside, on the table, until it holds.',
            'Look at the diagonals of the open top. If they are not equal, lean on the longer one while the glue still moves.',
          ),
          step(
            'Close the roof, first of all empty',
            ordered(
              'With a finger on each side, push both gables in.',
              'Let front and back roof come towards each other. The gables fold under them and lie flat.',
              'Bring the strips together. Both gable points should reach the ridge, and the strips end level.',
            ),
            show(
              'closing',
              'Open, and closed. At the eaves the card turns by [[roof turn]], at the gable lines by [[gable turn]]; nothing has to stretch.',
            ),
            list(
              '**The gable bulges out?** Its lines were not folded both ways. Open it and crease them again.',
              '**The ridge stands in a curve?** The gable points stop short. Push them up from inside with the end of a spoon.',
            ),
          ),
          step(
            'Fill it and peg it',
            'There is room up to the eaves: [[width|bare]] × [[depth|bare]] × [[height]]. A bed of dry leaves under the bulbs is warmer than paper. Close the roof and put the peg in the middle of the ridge, where only two layers lie; at its ends there are four. For a carton that stays shut, glue the [[seal strip]] of the strip instead.',
            caution(
              'Many flower bulbs are poisonous and look like onions. Write on the front what is in it and **not for eating**, and keep it where neither children nor dogs can get at it.',
            ),
            caution(
              'Plain card is not made for food, and not for wet things. Damp bulbs rot in it, and damp card opens at the seam: dry them first.',
            ),
          ),
          step(
            'A name under the eaves | optional',
            'A label [[width / 2|bare]] × [[height / 5]] fits above or below the window. Say what it is, how deep it goes, and which end is up.',
          ),
        ),
    },
  ],
};
