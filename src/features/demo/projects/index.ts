import { bookBox } from './book-box';
import { packetSleeve } from './packet-sleeve';
import { pottingBenchTray } from './potting-bench-tray';
import { swapDayBox } from './swap-day-box';

/** Oldest first, as they were made. */
export const DEMO_PROJECTS = [packetSleeve, swapDayBox, bookBox, pottingBenchTray] as const;
