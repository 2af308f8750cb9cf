import type { Pattern } from '@/engine';
import { keep, type DemoProject } from '../demo-project';
import {
  caution,
  curveOf,
  cutList,
  forward,
  heading,
  list,
  ordered,
  piece,
  step,
  stepAs,
  tip,
  materials,
  tools,
  writeUp,
} from '../write';

/** The lid swung up to a right angle; its end tab lies flat against the fore edge, where it is glued. */
function opened(pattern: Pattern): Pattern {
  return {
    ...pattern,
    pieces: pattern.pieces.map((one) =>
      one.name === 'Lid' && one.builder === 'grid'
        ? { ...one, lines: [...(one.lines ?? []), { between: ['end', 'lid'], is: 'valley', angle: '0°' }] }
        : one,
    ),
    assembly: pattern.assembly.map((one) => {
      if (one.piece === 'Upper spine')
        return { ...one, at: ['-overhang', 'inside depth - play / 2', 'inside height + inside width'], along: '+x' };
      if (one.piece === 'Lid') return { ...one, at: ['0 mm', 'inside depth - play / 2', 'inside height'], along: '+z' };
      return one;
    }),
  };
}
const inTheMaking = ['Cover', 'Fore edge', 'Floor', 'Lower spine'];
const withoutFirstCover = keep((name, index) => index !== 0 && inTheMaking.includes(name));

export const bookBox: DemoProject = {
  title: 'Seed keeper’s book box',
  summary: 'Looks like a closed book standing; the top of the pages lifts, and inside stands a season of seed packets.',
  minutes: 120,
  pattern: 'book-box',
  createdDaysAgo: 16,
  hero: 'closed',
  pictures: {
    closed: {
      alt: 'The finished box stands like a thick closed book. Plum covers stand out beyond the cream pages at the top and the fore edge, and the spine is gently round.',
      scene: (build) => ({ things: [{ type: 'folded', ...build() }], card: 'plum', whole: true }),
    },
    pieces: {
      alt: 'The pieces lie side by side above a ruler: a plain cover, then fore edge and floor with tabs, the lower spine with teeth at its foot, the short upper spine, and the lid with teeth round its curve.',
      scene: (build) => ({
        things: [
          { type: 'flat', pieces: ['Cover', 'Fore edge', 'Floor', 'Lower spine', 'Upper spine', 'Lid'], ...build() },
        ],
        card: 'plum',
        words: 'Every piece, flat, from the inside',
      }),
    },
    skeleton: {
      alt: 'The half-made box with its near cover still off. The far cover stands upright; in front of it the cream fore edge on the left, the floor at the foot and the round lower spine on the right make a frame.',
      scene: (build) => ({
        things: [{ type: 'folded', turn: -32, ...build(withoutFirstCover) }],
        card: 'plum',
        words: 'One cover still off',
      }),
    },
    open: {
      alt: 'The box twice. On the left it is closed. On the right its lid is swung up: the cream lid stands on the fore edge with the upper part of the spine at its end, and the lower spine ends below the tops of the covers.',
      scene: (build) => ({
        things: [
          { type: 'folded', ...build() },
          { type: 'folded', ...build(opened) },
        ],
        card: 'plum',
        words: 'Closed, and open',
      }),
    },
  },
  editions: [
    {
      daysAgo: 4,
      writeUp: (show) =>
        writeUp(
          'On the shelf it is a book. Lift the top of the pages and it is a box, with a season of seed packets standing in it like pages. The upper part of the spine is glued to the lid and comes up with it, and a band of paper hides the joint.',
          'We drew it for our own packets; yours may be another size. The figures below are for an inside [[inside height]] tall, [[inside width]] wide and [[inside depth]] deep. Set your own beside this text, and every figure that stands on a tab follows.',
          materials(
            '**Card for covers and spine**, about 270 g/m² (100 lb cover): [[2 * cover.area + lower spine.area + (if lid is flip then upper spine.area else 0 mm * 0 mm)]] of it. Take a colour that you would like to see on a shelf.',
            '**Card for the pages**, cream, about 216 g/m² (80 lb cover): [[fore edge.area + floor.area + (if lid is flip then lid.area else top.area)]].',
            'Together that is [=sheets card]; the sheet plan shows which pieces share one. The figures are for card [[card thickness]] thick; measure yours if it feels different, and change it among the finer points.',
            'White glue that dries clear, and a scrap of card to spread it with. Glue sticks let go when the spine pulls.',
            'If you want one: ribbon, [[ribbon width]] wide, and paper to cover the boards with.',
          ),
          tools(
            'Trimmer, or knife, metal ruler and mat',
            'Scoring board or a blunt point; bone folder',
            'Pencil, a few clothes pegs',
            '{spine is curved: A compass, or something round that measures [[circle]] across}',
          ),
          caution(
            'Knives and trimmers cut fingers as readily as card. Follow the maker’s instructions for yours, keep its guards on, hold the ruler behind its raised edge, and cut beside you rather than towards you. Children cut only with somebody next to them.',
          ),
          cutList,
          heading('Cut and score'),
          step(
            'The covers',
            'Find the grain before you cut anything: bend the sheet both ways, and it gives more easily along the grain. On a cover the grain should run **up and down**, along the side that measures [[cover.along]]. Covers cut across it bow outwards within a week.',
            'Cut two, [[cover.across|bare]] × [[cover.along]]. Lay one on the other and look at the light along all four edges. If one is a hair larger, trim them together: the box takes its squareness from these two.',
            piece('Cover'),
            show(
              'pieces',
              'All the pieces of ours. Cut yours to your own figures; only the covers are needed twice, [[cover.across|bare]] × [[cover.along]] each.',
            ),
          ),
          step(
            'The fore edge',
            'This is the edge of the pages that you see opposite the spine. Between its two tabs it is [[fore edge.deep]] wide, exactly as deep as the box. Score from the same end of the board both times, so that a board that is a little out is out the same way twice.',
            piece('Fore edge'),
            'The feet of the tabs are cut off slantwise. Do not skip it. Two tabs meet in that corner later, and where they overlap the cover gets a bump that shows for ever.',
          ),
          step(
            'The floor and its curve',
            'The floor is a strip with a tab on three sides. {spine is curved: On the fourth it runs on into a curve, and that curve is what the whole spine will follow. Take your time with this one.}{spine is straight: On the fourth it simply ends where its side tabs end, and the spine stands straight across.}',
            piece('Floor'),
            '{spine is curved: Draw the curve between the ends of the side tabs, [[inside depth]] apart. It is part of a circle [[circle]] across, so set a compass to [[radius]] and put its point on the middle line of the floor, where the pencil just reaches both ends. At its middle the curve stands out by [[bulge]]. Cut round it in one slow pass with scissors, turning the card and not the scissors.}',
            curveOf('Floor'),
            tip(
              'No compass? Find something round, measure across it, and put that in as the circle. The spine follows. A jar lid gives a round back, a dinner plate a flat one.',
            ),
          ),
          step(
            'The lower spine',
            'Between its tabs this strip is [[lower spine.strip]] wide. On a curved spine it has to be as wide as the curve is **long**, and that is more than the straight way across, [[inside depth]]. People get this number wrong when they lay a ruler across the box. The grain runs up and down here too, or the strip cracks when it is rolled.',
            piece('Lower spine'),
            '{spine is curved: Check it before you cut the teeth. Lay a strip of paper on edge round the curve of your floor and mark both ends: flat again, the marks should be [[floor.curve length]] apart. What your trimmer can cut comes near enough to it. If your own curve came out longer, trust the paper and score the second tab there.}',
            '{spine is curved: Then cut the foot into narrow teeth, [[teeth]] of them, from the edge almost to the score. A cut **past** the score opens a hole at the foot of the spine; one that stops a hair short does no harm.}{spine is straight: The foot of a straight spine stays whole.}',
          ),
          stepAs(
            { when: 'lid is flip', key: 'upper' },
            'The upper spine',
            'The short strip on top rides on the lid and has to slip between the covers, so it is [[arc - upper strip]] narrower than the lower one: [[upper spine.strip]] between its tabs, and [[upper spine.tall]] tall.',
            piece('Upper spine'),
            forward(
              'hang',
              'Turn it to its inside and rule a pencil line [[lid drop]] above the lower edge, right across. The lid will be glued along that line. Write “top” on the other edge now; once it is rolled, both edges look the same.',
            ),
          ),
          stepAs(
            { when: 'lid is flip' },
            'The lid',
            'The lid is the floor once more, a little narrower: [[lid.deep]] between its tabs, so that it passes between the covers without rubbing. On a curved spine its curve is a **score**, and the teeth, [[lid teeth]] of them, stand outside it.',
            piece('Lid'),
            'Score the curve with a blunt point along the edge of your own floor: it is the same circle. Go over it twice, lightly; a curve scored hard in one go tears when the teeth are turned.',
            tip(
              'We turn the sides of the lid down because a flat lid twists. If you chose **plain** sides, there is nothing to turn down, and the upper spine has no tabs either.',
            ),
          ),
          stepAs(
            { when: 'lid is flip', optional: true, key: 'ribbon' },
            'A ribbon to lift it by',
            'Cut a slot [[ribbon width + 1 mm]] long across the middle line of the lid, [[inside width - tab]] from the fold of its end tab. If you chose the ribbon among the options, the lid’s drawing shows it.',
            'Push both ends of the ribbon down through the slot until a loop for one finger stands out. Turn the ends back in opposite directions and glue them under the lid for at least [[max(tab, 15 mm)]].',
            caution(
              'A ribbon loop is the right handle for a box that small children will use. Beads, knobs and magnets come off and are swallowed; magnets are the worst of them. Leave them away, or follow what their maker says about age.',
            ),
          ),
          heading('Put it together'),
          step(
            'Fold everything first',
            'Fold every score to a right angle, then press it flat and rub it down with the folder. Open it again to the angle it will have in the box. A fold that has been flat once stays where you put it, and glue has nothing to fight.',
            'Roll both spines over the edge of the table, or round a bottle that is thinner than the curve, until they stay round on their own. If the strip cracks instead of bending, the grain runs the wrong way: cut it again, turned. Glue will not save it.',
          ),
          step(
            'Fore edge and floor on the first cover',
            'Lay a cover in front of you with its inside up. Rule a line [[overhang]] in from its fore side: the fore edge stands on that line, so that the cover shows a rim beyond it.',
            ordered(
              'Glue one tab of the fore edge to the cover, its fold on the line, flush with the cover **at the foot**. At the top the cover stands [[overhang]] higher.',
              'Glue the floor’s side tab along the foot of the cover, and its end tab inside the fore edge. Its straight part ends exactly at the cover’s rear edge.',
              'Set a box or a block against the corner while it dries. A corner that dries out of square stays out of square.',
            ),
          ),
          step(
            'The lower spine, tooth by tooth',
            'Turn all the teeth to the inside. They are glued **on top of** the floor. Begin with the middle tooth on the middle of the curve and hold it until it stays. Then work outwards, one left, one right. What is left over lands at the two ends in halves, where a fold hides it.',
            show(
              'skeleton',
              'Everything but the second cover. The spine is [[lower spine.tall]] tall; the floor is [[inside width]] from the fore edge to the ends of its tabs, and its curve stands out another [[bulge]].',
            ),
            'When the foot holds, glue the spine’s side tab to the cover’s rear edge. Run a fingernail round the foot from outside. Where you feel a step, lift the tooth and ease it while you still can. There is more about this in [Gluing, and gluing curves](/handbook/gluing-and-curves).',
            caution(
              'Do not reach for hot glue to speed this up. It sets before a curve can be eased, it leaves a ridge, and nozzle and glue burn skin. If you use it elsewhere, follow its maker’s instructions and keep it away from children.',
            ),
          ),
          step(
            'The second cover',
            'Try it dry. All tabs must reach it together. If the spine’s tab stands off, the strip is too long for the curve: let the surplus go into that tab with a fresh fold.',
            'Then glue on every tab at once, set the cover on, and stand the box on its feet on the table before you press. The table makes both covers flush. Pegs along the edges; about 20 minutes before you touch it again.',
          ),
          stepAs(
            { when: 'lid is flip', key: 'hang' },
            'Hang the lid',
            ordered(
              'Glue the lid’s teeth to the inside of the upper spine, along the pencil line from [#upper], from the middle outwards. They point down.',
              'Turn the lid’s side tabs down and wrap the spine’s tabs round them (plain sides have none). Glue them to each other and **never to the covers**.',
              'When this is dry, set it on: the upper spine stands on the edge of the lower one, all the way round. Lid closed, glue its end tab to the inside of the fore edge, the fold level with the top.',
              'Leave it closed until the glue is dry. Only then swing it.',
            ),
            show(
              'open',
              'Open. The upper spine comes up with the lid, because it is glued to nothing else; [[play]] of room in all keeps it from rubbing on the covers.',
            ),
            'It rubs on one side? The lid was glued a little skew. Slide a strip of card between lid and cover to find the place, and shave that edge of the upper spine. It falls shut and springs up again? The end tab’s fold is stiff: open it all the way a few times.',
          ),
          stepAs(
            { when: 'lid is none' },
            'A fixed top in place of the lid',
            'With a top the box is closed for good, or, if you leave the top away, an open holder. Turn all tabs of the top **up**, into the recess between the covers, where a finger can press them, and its teeth up along the spine.',
            piece('Top'),
          ),
          stepAs(
            { optional: true },
            'Paper and band',
            'Cover papers look best with a border of card round them: cut two, [[cover.across - 1/4 in|bare]] × [[cover.along - 1/4 in]]. On the spine, a band hides the joint. Glue it to the **upper** spine alone and let it hang a little below, [[if lid is flip then upper spine.strip else lower spine.strip]] long, and no longer: it must not turn on to the covers.',
          ),
          step(
            'Look it over before you fill it',
            list(
              'The covers stand square, and both feet touch the table.',
              'The upper spine sits on the lower one all round, and together they end level with the covers.',
              'The lid falls shut by its own weight and opens without touching anything.',
            ),
            'Packets up to [[inside width - 1/8 in]] wide and [[inside height - 1/4 in]] tall stand in it one behind another, faces to the cover. Write the year on the fore edge, in pencil: next year you will want another volume.',
            caution(
              'Card, glue and inks are not made to touch food unless their maker says so. Seed that somebody may eat stays in its own bag.',
            ),
          ),
        ),
    },
  ],
};
