import { INCH, type DemoProject } from '../demo-project';
import { caution, cutList, heading, list, materials, ordered, piece, step, tip, writeUp } from '../write';

export const beanPillow: DemoProject = {
  title: 'Pillow for a handful of beans',
  summary:
    'One piece of card, one seam, and two curved ends that push in and hold: a first box, made in an evening’s talk.',
  minutes: 25,
  pattern: 'pillow-box',
  values: { width: 3.5 * INCH, length: 5 * INCH, depth: 1 * INCH },
  createdDaysAgo: 58,
  hero: 'closed',
  pictures: {
    closed: {
      alt: 'A pillow box of terracotta card lies on the table. Its two faces bulge, and the end that looks at us is closed by a flap curved inwards like a lens.',
      scene: (build) => ({ things: [{ type: 'folded', tilt: 34, ...build() }], card: 'clay', whole: true }),
    },
    flat: {
      alt: 'The piece lies flat, seen from the inside: two faces side by side and a narrow tab on the right. At both ends of each face a dashed curve bows inwards and the cut edge bows outwards.',
      scene: (build) => ({
        things: [{ type: 'flat', pieces: ['Pillow'], ...build() }],
        card: 'clay',
        words: 'Four curves scored, four cut',
      }),
    },
  },
  editions: [
    {
      daysAgo: 54,
      writeUp: (show) =>
        writeUp(
          'Whoever comes to the circle for the first time goes home with a handful of beans, and this is what they go home in. There is no lid and no catch: the ends are curved, a curved fold pulls the faces apart, and the faces hold the ends shut.',
          'Ours is [[width]] wide while it lies flat, [[length]] long and [[depth]] deep. Once the faces bulge it is narrower, [[finished width]], and a ruler will not tell you that beforehand. Set your own size beside this text.',
          materials(
            '**Card**, 200 to 250 g/m² (75 to 90 lb cover): [[pillow.area]] in one piece. Heavier card does not want to bend.',
            'A scrap of stiff card for a template, a little longer than [[width]].',
            'White glue and a scrap to spread it with, or strong double-sided tape: the one seam is [[length]] long.',
            'Trimmer, or knife, metal ruler and mat; scissors; a ruler and a blunt point, or a scoring board; bone folder; pencil; a pin.',
            'A compass that opens to [[radius]], or something round that measures [[2 * radius]] across.',
            'For a band, if you like one: a strip of paper.',
          ),
          caution(
            'Use trimmer and knife as their makers tell you, with the guards on and your fingers off the line. Children can score, fold and glue this box by themselves; somebody sits beside them for the cutting and for the pin.',
          ),
          cutList,
          heading('Cut and score'),
          step(
            'Find the grain, then cut',
            'Bend the sheet gently both ways. The faces have to bow, and they bow about lines that run along the box, so the grain should run that way too: along the side that measures [[pillow.along]].',
            'Cut one piece, [[pillow.across|bare]] × [[pillow.along]].',
          ),
          step(
            'Six marks',
            'Lay the card with its inside up, the grain running away from you. On the left edge, make a mark [[rise]] from each end. Make the same two marks [[width]] further to the right, and once more at [[2 * width]]. What remains on the right, [[tab]], will be the seam tab.',
            'All curves begin and end at these six marks. Prick them through with the pin, so that you find them on the other side.',
            piece('Pillow'),
          ),
          step(
            'Score the two straight lines',
            'Score from mark to mark at [[width]] and at [[2 * width]], and no further: beyond the marks the card is cut away, and a score in a flap makes it buckle.',
          ),
          step(
            'One template for every curve',
            ordered(
              'On the scrap, rule a line [[width]] long.',
              'Set the compass to [[radius]]. From both ends of the line, swing a short arc on the same side; the point where they cross is the centre.',
              'From there, draw the curve from one end of the line to the other, and cut along line and curve.',
            ),
            'Lay a ruler across the middle to check: the curve stands [[rise]] off the line, half as far as the box is deep.',
            tip(
              'No compass? Any plate or pot lid that measures [[2 * radius]] across will do, and if yours is a little different, the box will not mind, so long as **all** curves come from the same one.',
            ),
          ),
          step(
            'Score the curves from outside',
            'Turn the card over. On each face, at each end, lay the template’s line from prick to prick with its curve **towards the middle**, and draw the blunt point along it. Twice, lightly: a curve scored hard in one go wanders.',
            'Four curves, each [[arc]] long. The two of one face look at each other, [[length - 2 * rise]] apart in the middle.',
          ),
          step(
            'Cut the ends',
            'Turn the template over on the same pricks, its curve **towards the end**. It just touches the edge of the card. Draw it, four times, and cut along the lines with scissors, turning the card and not the scissors.',
            'Last, cut both ends of the seam tab off slantwise, from the mark outwards, half a right angle. Its outer edge is then [[length - 2 * tab]] long.',
            show(
              'flat',
              'Cut and scored, from the inside. Between the scored curve and the cut one lies the flap, [[depth]] wide in the middle.',
            ),
          ),
          heading('Put it together'),
          step(
            'Make the faces willing',
            'Draw each face over the edge of the table, lengthwise, until it stays a little bowed with the outside out. Fold both straight lines over, rub them down, and open them again.',
            'Bend each flap inwards along its curve with both thumbs, only a little, from the middle to the ends. You want the card to know where it will give.',
          ),
          step(
            'Glue the seam, lying flat',
            'Glue on the tab, thin, right to its edges. Fold the card along the middle and lay the free edge of the first face on the tab’s fold, exactly. The tab is **inside**. Press it flat under a book for about 15 minutes.',
            'Flat is the word. If it dries while it is open, the two faces set at different lengths, and one end never closes.',
          ),
          step(
            'Push in the ends',
            ordered(
              'Press the two long edges towards each other until the box opens.',
              'With a thumb, push in one flap of an end; it snaps.',
              'Push the second in over it. The second holds the first.',
            ),
            '**It crumples?** The score is too faint: open the end, flatten the box, and go over the curve again. **It springs open?** The seam tab stands in the way at the corner: trim its end a little more.',
            show(
              'closed',
              'Closed: [[length]] from point to point, [[finished width]] wide, [[depth]] deep. The straight lines no longer look straight, and they are.',
            ),
          ),
          heading('Give it away'),
          step(
            'Fill it from one end',
            'Close one end, drop the beans in, close the other. In the middle, where it is shortest, there is room for [[length - 2 * rise]].',
            caution(
              'Beans go into small noses and ears, and many kinds make people ill when they are eaten raw. Keep the pillow out of the reach of small children, and say on the band what is in it and that it is for sowing.',
            ),
          ),
          step(
            'A band with the name | optional',
            'Cut a strip of paper [[2 * width + 1/2 in|bare]] × [[length / 4]]. Bulging has changed the width, but not the way round: it is still twice a face, and the rest is for the glue. Glue the band to itself and not to the box, and it slides off.',
          ),
          'Before you make twelve of them, look over the first:',
          list(
            'Both ends of both straight folds come to a point, and nothing gapes there.',
            'It lies on either face without rocking.',
            'Shaken, it stays shut.',
          ),
        ),
    },
  ],
};
