import { INCH, type DemoProject } from '../demo-project';
import { cutList, heading, piece, step, writeUp } from '../write';

/** Half written, as drafts are: no summary, a photo without words, a measure that does not read. */
export const pottingBenchTray: DemoProject = {
  title: 'Potting-bench packet tray',
  summary: '',
  minutes: null,
  pattern: 'tray',
  values: { 'inside length': 10 * INCH, 'inside width': 7 * INCH, 'inside height': 1.5 * INCH },
  createdDaysAgo: 3,
  savedDaysAgo: 0.2,
  hero: null,
  pictures: {
    bench: {
      alt: '',
      scene: (build) => ({ things: [{ type: 'folded', tilt: 32, ...build() }], card: 'green', words: 'Packet tray' }),
    },
  },
  editions: [],
  draft: (show) =>
    writeUp(
      'For the packets that are open this week. It stands on the bench, gets wet, and is cheap enough to make again in autumn.',
      cutList,
      heading('Cut and score'),
      step(
        'Cut the card',
        'Cut one piece, [[tray.across|bare]] × [[tray.along]]. Kraft card does not show the soil.',
        piece('Tray'),
      ),
      step(
        'Score and slit',
        'Score [[inside height]] in from all four sides. Slit the corners from the top and bottom edges of the drawing, as far as the crossing.',
      ),
      heading('Put it together'),
      step('Glue the corners', show('bench', 'The tray is [[inside heigth]] tall. Take a better photo, on the bench.')),
      step('Wax the floor | optional', 'Candle? Ask Bram what he used on his.'),
    ),
};
