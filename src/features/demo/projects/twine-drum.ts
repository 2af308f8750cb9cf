import type { Pattern } from '@/engine';
import { INCH, keep, type DemoProject } from '../demo-project';
import { caution, cutList, heading, list, materials, ordered, piece, step, tip, writeUp } from '../write';

const stripAlone = keep((name) => name === 'Strip');

/** The lid held up, high enough to see into the drum. */
const liftedLid = (pattern: Pattern): Pattern => ({
  ...pattern,
  assembly: pattern.assembly.map((one) => {
    const [x, y] = one.at;
    if (one.piece === 'Lid strip') return { ...one, at: [x, y, 'wall height + 1.1 * lid height'] };
    if (one.piece === 'Top') return { ...one, at: [x, y, 'wall height + 2.1 * lid height'] };
    return one;
  }),
});

export const twineDrum: DemoProject = {
  title: 'Twine drum',
  summary:
    'A round box for the ball of garden twine. The end comes out of the lid, so the ball stays clean and never rolls away.',
  minutes: 100,
  pattern: 'drum-box',
  values: { 'inside diameter': 3.5 * INCH, 'inside height': 3.25 * INCH },
  createdDaysAgo: 50,
  hero: 'closed',
  pictures: {
    closed: {
      alt: 'A round blue box with its lid half on. The lid is a little wider than the drum, and its edge runs level all the way round.',
      scene: (build) => ({ things: [{ type: 'folded', ...build() }], card: 'dusk', whole: true }),
    },
    parts: {
      alt: 'The long strip lies flat with a row of teeth along its foot and a seam tab at its right end; beside it lies the round bottom.',
      scene: (build) => ({
        things: [{ type: 'flat', pieces: ['Strip', 'Bottom'], ...build() }],
        card: 'dusk',
        words: 'Strip and bottom, from the inside',
      }),
    },
    rolled: {
      alt: 'The strip twice: on the left half rolled, its teeth bending in; on the right closed to a tube, with the teeth turned in flat at the foot.',
      scene: (build) => ({
        things: [0.6, 1].map((share) => ({ type: 'folded', share, tilt: 30, ...build(stripAlone) })),
        card: 'dusk',
        words: 'Half rolled, and closed',
      }),
    },
    lifted: {
      alt: 'The drum with its lid held above it. One looks past the lid’s edge on to the open rim of the drum.',
      scene: (build) => ({
        things: [{ type: 'folded', tilt: 22, ...build(liftedLid) }],
        card: 'dusk',
        words: 'Drum and lid',
      }),
    },
  },
  editions: [
    {
      daysAgo: 46,
      writeUp: (show) =>
        writeUp(
          'Twine rolls under the bench, picks up straw and is never where the beans are. In a drum it turns on the spot, and the end looks out of a hole in the lid.',
          'The drum is [[inside diameter]] across inside and [[inside height]] tall. Measure your ball the thick way and give it a finger’s room. Everything else follows, the strip first of all: for a drum of this width it has to be [[circumference]] long, and not a ruler’s guess at three times the width.',
          materials(
            '**Card for strips and discs**, about 220 g/m² (80 lb cover): [[strip.area + lid strip.area]] for the two strips and [[bottom.area + outer bottom.area + lid lining.area + top.area]] for the four discs. Card that is heavier than this kinks where it should curve.',
            'The figures are for card [[card thickness]] thick. Round boxes are touchy about it: stack ten layers, measure, and set yours among the finer points.',
            'White glue and a scrap to spread it with; a jar or tin that fits into the drum, to press with.',
            'Trimmer, or knife, metal ruler and mat; small sharp scissors; scoring board; bone folder; clothes pegs.',
            'A compass, opened to at most [[top diameter / 2]], and a scrap of tape to put under its point.',
            'For the hole: a punch or an awl and, if you like, an eyelet.',
          ),
          caution(
            'Blades cut fingers as readily as card. Follow the makers’ instructions for trimmer and knife, keep the guards on, and cut beside you, not towards you. Children roll, glue and press; they use the scissors with somebody next to them.',
          ),
          cutList,
          heading('The drum'),
          step(
            'Cut the strip',
            'A strip rolls willingly one way only. The grain has to run up and down the finished drum, along the side that measures [[strip.along]]; across it, the card breaks into facets.',
            'Cut one piece, [[strip.across|bare]] × [[strip.along]]. Of its length, [[circumference]] goes round, and the last [[seam tab]] is the seam.',
          ),
          step(
            'Score the foot, mark the seam',
            'Score one line, [[wall height]] from the upper edge, all along. Below it is the foot, [[tooth depth]] deep, which becomes teeth. Where the seam tab begins, rule a **pencil** line and do not score it: a score would show as a corner in the round wall.',
            piece('Strip'),
            'Cut the foot away under the seam tab, and take a sliver off both ends of the tab, so that it cannot peep out.',
          ),
          step(
            'Cut the teeth',
            'There are [[teeth]] of them, and the notes under the drawing say how wide one is at the score. Set a pair of dividers to that and walk along the line. If you come out with one more or one fewer, nobody will count them; they only have to be alike.',
            'Between each two, cut a narrow V from the edge up to the score and not through it. Without the V the teeth would lie on each other once they are turned in, and the bottom would sit on a hill.',
            show(
              'parts',
              'The strip, [[strip.across]] long with its seam tab, and the disc that it will go round, [[bottom diameter]] across.',
            ),
            tip(
              'Snip all teeth once down the middle of each V first, then come back and trim one side of every cut. It is quicker than cutting out so many small wedges.',
            ),
          ),
          step(
            'Cut two discs',
            'The bottom drops inside and is [[bottom diameter]] across; the outer bottom hides the teeth and is [[outer bottom diameter]] across. The difference is the wall.',
            'A compass wants half of that. Do not work it out: mark the width along the edge of a strip of paper, fold mark on mark, and open the compass from the fold to a mark. A bit of tape under its point keeps it from making a hole.',
            piece('Bottom'),
            piece('Outer bottom'),
          ),
          step(
            'Roll the strip',
            'Draw the strip over the edge of the table, outside up, again and again, a little more each time, until it curls by itself into a ring smaller than the drum. Let the teeth stay straight for now.',
            'Do not fold, do not hurry. Every kink you make here will be there for good.',
          ),
          step(
            'Close it round the bottom',
            ordered(
              'Stand the bottom inside the strip, a little above the teeth, and pull the strip tight round it. The edge should come to the pencil line.',
              '**Short of the line, or past it?** The disc and the strip disagree. Trust the strip and trim the disc: the tube decides.',
              'Glue the seam tab inside the other end, edge on the line, and peg it at the top and the foot. Rub the middle with the folder against the jar.',
            ),
            show(
              'rolled',
              'Half rolled, and closed. The wall is [[wall height]] tall, two cards more than the inside: room for the bottom and the teeth.',
            ),
          ),
          step(
            'Teeth, bottom, outer bottom',
            'Turn the teeth in square, all round, with the folder. Glue on the teeth, drop the bottom in from above and press it down with the jar. When that holds, glue the outer bottom underneath, over the teeth.',
            'Leave the jar standing in it for about 15 minutes. Then run a fingernail round the foot and trim what stands out.',
          ),
          heading('The lid'),
          step(
            'Measure the drum, then cut the strip',
            'Measure across the finished drum: [[outer bottom diameter]], and a card more where the seam is. If yours is larger by more than that, its seam is slack. Set the inside diameter beside this text to what you have made, and the lid follows.',
            'The lid’s strip is [[lid circumference - circumference]] longer than the drum’s. That little is two walls, two laps and [[play]] of air. Cut it [[lid strip.across|bare]] × [[lid strip.along]], score it [[lid height]] from the upper edge, rule the seam’s line at [[lid circumference]], and cut [[lid teeth]] teeth as before.',
            piece('Lid strip'),
          ),
          step(
            'Two more discs, and the hole',
            'The lining drops inside the lid, the top lies over its teeth. The lining is [[lid lining diameter]] across and the top [[top diameter]]; set the compass with the strip of paper, as before.',
            piece('Lid lining'),
            piece('Top'),
            'Punch a hole for the twine through the middle of both **now**, while they are flat. Twice as wide as the twine is about right.',
            caution(
              'Press a punch or an awl down on the mat and never towards your palm. Eyelets are small parts: they come loose and are swallowed, so leave them out where small children will play with the box.',
            ),
          ),
          step(
            'Roll the lid round the drum',
            ordered(
              'Wrap the drum once in thin paper. That is the air.',
              'Roll the lid’s strip as you rolled the first, put it round the paper with its teeth up, its score level with the rim, and its seam **opposite** the drum’s. Two seams over one another make a bump that no play allows for.',
              'Glue the seam, peg it, let it dry, and slide the ring off.',
              'Turn the teeth in. Glue the lining to them from inside and the top over them from outside, hole over hole.',
            ),
          ),
          step(
            'Try it on',
            list(
              'It slides down slowly, pushed by its own weight. Good.',
              '**It sticks in one place.** That is a seam: turn the lid until it lets go, and rub the seam inside down with the folder.',
              '**It wobbles.** Glue a strip of thin paper, [[lid height / 2]] wide, once round the inside of the lid.',
            ),
            show(
              'lifted',
              'The lid comes [[lid height]] down over the drum. Closed, all together is [[outside height]] tall and [[top diameter]] across.',
            ),
          ),
          step(
            'Thread it',
            'Take the end from the **middle** of the ball if yours lets you: it then unwinds without turning. Pull it up through both discs and knot it loosely, or it will be back inside by morning.',
            caution(
              'A long end of twine round a neck is dangerous. Cut it short, and do not leave the drum where small children play.',
            ),
          ),
        ),
    },
  ],
};
