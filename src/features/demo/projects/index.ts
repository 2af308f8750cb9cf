import { beanPillow } from './bean-pillow';
import { bookBox } from './book-box';
import { bulbCarton } from './bulb-carton';
import { flowerFrame } from './flower-frame';
import { honeycombBox } from './honeycomb-box';
import { packetSleeve } from './packet-sleeve';
import { pottingBenchTray } from './potting-bench-tray';
import { seasonChest } from './season-chest';
import { swapDayBox } from './swap-day-box';
import { twineDrum } from './twine-drum';

/** Oldest first, as they were made. */
export const DEMO_PROJECTS = [
  beanPillow,
  twineDrum,
  packetSleeve,
  honeycombBox,
  seasonChest,
  swapDayBox,
  bulbCarton,
  flowerFrame,
  bookBox,
  pottingBenchTray,
] as const;
