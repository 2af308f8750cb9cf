/** The words that tell the finder what a number is. Lower case. */
const listed = (words: string): ReadonlySet<string> => new Set(words.trim().split(/\s+/));

/** What stands below the line of a fraction, by how it is said or typed: `eighths`, `16ths`. */
export const PARTS: Readonly<Record<string, number>> = {
  half: 2,
  halves: 2,
  third: 3,
  thirds: 3,
  quarter: 4,
  quarters: 4,
  fourth: 4,
  fourths: 4,
  '4th': 4,
  '4ths': 4,
  eighth: 8,
  eighths: 8,
  '8th': 8,
  '8ths': 8,
  sixteenth: 16,
  sixteenths: 16,
  '16th': 16,
  '16ths': 16,
  '32nd': 32,
  '32nds': 32,
  '64th': 64,
  '64ths': 64,
};
/** What a ruler has below the line. */
export const RULER_PARTS: ReadonlySet<number> = new Set([2, 4, 8, 16, 32, 64]);

export const NUMBER_WORDS = listed(`
  zero one two three four five six seven eight nine ten eleven twelve thirteen fourteen fifteen sixteen seventeen eighteen
  nineteen twenty thirty forty fifty sixty seventy eighty ninety hundred`);

/** Numbers that speech recognition writes as another word; only before "and a half" and the like. */
export const MISHEARD: Readonly<Record<string, string>> = {
  for: 'four',
  fore: 'four',
  to: 'two',
  too: 'two',
  ate: 'eight',
  won: 'one',
  tree: 'three',
  sex: 'six',
};

/** Millimetres in a unit as it is said, and the unit that it is shown in. */
export const UNITS: Readonly<Record<string, { readonly mm: number; readonly unit: 'in' | 'mm' | 'cm' }>> = {
  ...named('in inch inches "', 25.4, 'in'),
  ...named('ft foot feet', 304.8, 'in'),
  ...named('yd yard yards', 914.4, 'in'),
  ...named('mm millimetre millimetres millimeter millimeters', 1, 'mm'),
  ...named('cm centimetre centimetres centimeter centimeters', 10, 'cm'),
  ...named('m metre metres meter meters', 1000, 'cm'),
};
function named(names: string, mm: number, unit: 'in' | 'mm' | 'cm') {
  return Object.fromEntries(names.split(' ').map((name) => [name, { mm, unit }]));
}

/** Said behind a size: "4 wide". */
export const DIRECTIONS = listed('wide tall long high deep across thick square');

/** What a number before it counts, so that it is no length. */
export const COUNTED = listed(`
  second seconds minute minutes min mins hour hours day days week weeks month months year years o'clock am pm
  degree degrees percent pound pounds lb lbs gsm g gram grams kg oz ounce ounces gallon volts watts dpi
  time times copy copies step steps page pages turn turns way ways star stars point points
  dozen people cup cups pack packs colour colours color colors dollar dollars cent cents euro euros`);

/** The same, but a pair of numbers before it is its size: "a 12 by 12 sheet". */
export const THINGS = listed('piece pieces sheet sheets');

/** What gives the number after it a name: "step 3", "page 4". */
export const NUMBERED = listed(`
  step steps page pages number numbers no nr chapter part figure fig episode day size version room photo picture row column
  line grade level class section volume issue type box`);

/** Words after which a bare number may end: what follows it is not the thing it counts. */
export const CLOSING = listed(`
  a about across after again all along and another apart around as at away back because before behind below beneath both but by
  deep down each either every exactly for from going he here high i if in inside into is it its just like long off on
  once only onto or out over per please right she so square tall than that the then there these they thick this
  those through to today too toward towards turn two under until up via was we well when where which while wide with
  without x yet you`);

/** Verbs of the bench: after one of them "at 4" is a place on the ruler. */
export const BENCH_VERBS = listed(`
  score scores scored scoring cut cuts cutting mark marks marked marking slit slits fold folds folded folding trim trims
  trimmed trimming crease creases creased draw draws punch notch snip slice line lines set measure measures measured comes`);

/** What a size may be of: "the height is 9". */
export const SIZES = listed(`
  width height depth length diameter radius size thickness side overhang margin gap border drop long wide tall high deep
  across measures`);
