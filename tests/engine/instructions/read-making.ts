import { arcPoints, blank, corner, cut, gap, type Card, type Dot, type Kind, type Stop, type Stroke } from './card';

/** Counts as the sentences write them. */
const COUNTS =
  'zero one two three four five six seven eight nine ten eleven twelve thirteen fourteen fifteen sixteen seventeen eighteen nineteen'.split(
    ' ',
  );
const CARDS = 'a card’s thickness|two card thicknesses|three card thicknesses|four card thicknesses';
const NUMBER = '−?(?:\\d+ \\d+/\\d+|\\d+/\\d+|\\d+(?:\\.\\d+)?)';
const FIGURE = new RegExp(`(?:(${NUMBER})([+−]*)(?: (?:in|mm)\\b)?(?: (plus|less) (${CARDS}))?|(${CARDS}))`, 'g');
type Side = 'top' | 'right' | 'bottom' | 'left';
const WAYS: Readonly<Record<string, Dot>> = {
  up: { x: 0, y: -1 },
  down: { x: 0, y: 1 },
  'to the left': { x: -1, y: 0 },
  'to the right': { x: 1, y: 0 },
};

/** One sentence with `#` for each length, `@` for each angle and `~` for each count. */
interface Told {
  readonly text: string;
  readonly mm: number[];
  readonly degrees: number[];
  readonly counts: number[];
}
function tell(sentence: string, unit: number, thickness: number): Told {
  const mm: number[] = [];
  const degrees: number[] = [];
  const counts: number[] = [];
  const cards = (words: string) => ['', 'a', 'two', 'three', 'four'].indexOf(words.split(' ')[0] ?? '') * thickness;
  const counted = new RegExp(
    `\\b(${COUNTS.join('|')}|\\d+)( (?:half-round )?(?:teeth|holes|marks|notches|sides)\\b)`,
    'g',
  );
  const text = sentence
    .replace(/([\d.]+)°/g, (_, angle: string) => {
      degrees.push(Number(angle));
      return '@';
    })
    .replace(counted, (_, count: string, what: string) => {
      counts.push(COUNTS.includes(count) ? COUNTS.indexOf(count) : Number(count));
      return `~${what}`;
    })
    .replace(FIGURE, (_, number?: string, signs = '', sign?: string, words?: string, alone?: string) => {
      if (alone) mm.push(cards(alone));
      else {
        const value = (number ?? '')
          .replace('−', '')
          .split(' ')
          .reduce((sum, part) => {
            const [top = 0, bottom = 1] = part.split('/').map(Number);
            return sum + top / bottom;
          }, 0);
        const steps = [...(signs as string)].reduce((sum, one) => sum + (one === '+' ? thickness : -thickness), 0);
        const said = words ? (sign === 'plus' ? 1 : -1) * cards(words) : 0;
        mm.push((number?.startsWith('−') ? -1 : 1) * value * unit + steps + said);
      }
      return '#';
    });
  return { text, mm, degrees, counts };
}

/**
 * Draws a piece from the sentences of its making and the thickness of the maker's card, nothing else. A sentence that it
 * cannot read is an error, unless it is one of `remarks`.
 */
export function readMaking(sentences: readonly string[], thickness: number, remarks: readonly string[]): Card {
  const unit = sentences[0]?.includes(' in') ? 25.4 : 1;
  const [size, ...rest] = sentences
    .filter((sentence) => !remarks.includes(sentence))
    .map((sentence) => tell(sentence, unit, thickness));
  if (size?.text !== 'Cut # × #.' && !size?.text.startsWith('Cut # × # from '))
    throw new Error(`no blank: ${size?.text}`);
  const card = blank(size.mm[0] as number, size.mm[1] as number);
  const reader = new Reader(card);
  for (const told of rest) if (!reader.read(told)) throw new Error(`not understood: ${told.text}`);
  return reader.done();
}

class Reader {
  /** From where to where each side of the blank is still there, and the depth of its strip. */
  private readonly kept: Record<Side, [number, number]>;
  private readonly lines = { across: [] as number[], along: [] as number[] };
  private slitFrom: 'top and bottom' | 'left and right' | null = null;
  private slitDeep = 0;
  private relief = 0;
  private depth: number | null = null;
  private cornerTaper: ((deep: number) => number) | null = null;
  private radii: { outer: number; inner: number; half: number } | null = null;
  private apex: Dot | null = null;
  private fan: { corners: Dot[]; hinges: Dot[][]; middle: Dot; height: number; triangle: boolean } | null = null;
  private disc: { radius: number; deep: number } | null = null;

  constructor(private readonly card: Card) {
    const { across, along } = card;
    this.kept = { top: [0, across], bottom: [0, across], left: [0, along], right: [0, along] };
  }

  read({ text, mm, degrees, counts }: Told): boolean {
    const { card } = this;
    const at = (index: number) => mm[index] as number;
    let is: RegExpExecArray | null;
    const says = (pattern: RegExp) => (is = pattern.exec(text)) !== null;
    const word = (index: number) => is?.[index] ?? '';
    if (
      /^Fold (every score towards you and burnish it|the mountain folds away from you, all others towards you)\.$/.test(
        text,
      )
    )
      return true;
    if (text === 'Each + is a card’s thickness more, each − one less.' || text === 'Each + is # more, each − one less.')
      return true;

    // Scores from edge to edge.
    if (says(/^Score (mountain folds )?at ([#, and]+) from each of the ~ sides\.$/) && counts[0] === 4) {
      for (const value of mm)
        for (const axis of ['across', 'along'] as const) this.rule(axis, [value, this.size(axis) - value], word(1));
      return true;
    }
    if (
      says(
        /^Along one side score (mountain folds )?at (.+?)( from each end)?( and in the middle)?; give it a quarter turn and score the same again\.$/,
      )
    ) {
      for (const axis of ['across', 'along'] as const)
        this.rule(axis, this.positions(axis, mm, word(3), word(4)), word(1));
      return true;
    }
    if (
      says(
        /^(Turn; along the|Along the|Give it a quarter turn; along the other) # side( from left to right| from top to bottom)? (?:score (mountain folds )?|(draw) a? ?pencil lines? )at ([#, and]+?)( from each end)?( and in the middle)?(?:; do not score (?:it|them))?\.$/,
      )
    ) {
      const [size = 0, ...places] = mm;
      const square = Math.abs(card.across - card.along) < 0.01;
      const second = square ? /quarter|bottom/.test(word(1) + word(2)) : Math.abs(size - card.along) < 0.01;
      if (!second && Math.abs(size - card.across) > 0.01) return false;
      const axis = second ? 'along' : 'across';
      this.rule(axis, this.positions(axis, places, word(6), word(7)), word(4) ? 'pencil' : word(3));
      return true;
    }
    // Lines that stop short: `At #, # and # across score from # to # and from # to the right edge.`
    if (says(/^At ([#, and]+) (across|down) (score|slit) (.+)\.$/)) {
      const places = mm.slice(0, (word(1).match(/#/g) ?? []).length);
      const values = mm.slice(places.length);
      const across = word(2) === 'across';
      const run = across ? 'along' : 'across';
      let kind: Kind = word(3) === 'slit' ? 'slit' : 'valley';
      let end = 0;
      const place = (words: string) =>
        words === '#' ? (values.shift() as number) : /left|top/.test(words) ? 0 : this.size(run);
      for (const part of word(4).split(/, | and /)) {
        const told =
          /^(?:a (valley|mountain) fold )?(?:(on)|from (#|the \w+ edge)) to (#|the \w+ edge)(?: down| across)?$/.exec(
            part,
          );
        if (!told) return false;
        if (told[1]) kind = told[1] as Kind;
        const from = told[2] ? end : place(told[3] ?? '');
        end = place(told[4] ?? '');
        for (const value of places)
          card.strokes.push({
            kind,
            path: [from, end].map((other) => (across ? { x: value, y: other } : { x: other, y: value })),
          });
      }
      return true;
    }
    // Slanting and curved lines.
    if (
      says(/^(Slit|Score)( a (valley|mountain) fold| (valley|mountain) folds)? (from .+?)(?:; the same ([a-z, ]+))?\.$/)
    ) {
      const kind: Kind = word(1) === 'Slit' ? 'slit' : ((word(3) || word(4) || 'valley') as Kind);
      let next = 0;
      const strokes: Stroke[] = [];
      for (const part of word(5).split('; ')) {
        const arc = /, an arc of # radius, bowed (up|down|to the left|to the right)$/.exec(part);
        const points = part.replace(arc?.[0] ?? '\n', '');
        if (!/^from # across, # down(, (on )?to # across, # down)+$/.test(points)) return false;
        const path: Dot[] = [];
        for (let count = (points.match(/#/g) ?? []).length / 2; count > 0; count -= 1, next += 2)
          path.push({ x: at(next), y: at(next + 1) });
        if (arc) {
          const [from, to] = path as [Dot, Dot];
          strokes.push({ kind, path: [from, ...arcPoints(from, to, at(next), WAYS[arc[1] ?? ''] as Dot)] });
          next += 1;
        } else strokes.push({ kind, path });
      }
      for (const image of this.images(word(6)))
        for (const { path } of strokes) card.strokes.push({ kind, path: path.map(image) });
      return true;
    }

    // What falls away, square.
    if (
      says(
        /^Cut away the (?:(\w+) )?corner (square|piece)s?(?: at the ([a-z ]+))?, (along the (?:scores|lines)|# wide and # tall)\.$/,
      )
    ) {
      for (const [end, side] of cornersAt(word(3))) {
        const [wide, tall] = word(4).startsWith('#') ? [at(0), at(1)] : [this.strip(side), this.strip(end)];
        if (word(2) === 'square' && Math.abs(wide - tall) > 0.01) return false;
        this.cutCorner([end, side], wide, tall);
      }
      return true;
    }
    if (says(/^Cut a piece # × # out of the ([a-z ]+?) corners?\.$/)) {
      for (const place of cornersAt(word(1))) this.cutCorner(place, at(0), at(1));
      return true;
    }
    if (says(/^Out of the (top|right|bottom|left) edge cut a notch # deep from (.+)\.$/)) {
      for (let index = 1; index < mm.length; index += 2)
        cut(card, [
          this.on(word(1) as Side, at(index), 0),
          this.on(word(1) as Side, at(index), at(0)),
          this.on(word(1) as Side, at(index + 1), at(0)),
          this.on(word(1) as Side, at(index + 1), 0),
        ]);
      return true;
    }
    if (says(/^From (.+?) cut (.+?)(?:; the same ([a-z, ]+))?\.$/)) {
      const path = this.walk(word(1), word(2), mm, counts);
      if (!path) return false;
      for (const image of this.images(word(3)))
        cut(
          card,
          path.map((stop) => ({ ...image(stop), corner: stop.corner })),
        );
      return true;
    }
    if (says(/^Mark the outline from (.+?): (.+)\. Cut round it\.$/)) {
      const path = this.walk(word(1), word(2), mm, counts);
      if (!path || gap(path[0] as Dot, path.at(-1) as Dot) > 0.01) return false;
      card.outline = path.slice(1);
      return true;
    }

    // Tabs.
    if (
      says(
        /^Slit the (?:four corners|corner) from the (top and bottom|left and right) edges, along the scores, # deep, to the crossing: (they become tabs|it becomes a tab)\.$/,
      )
    ) {
      this.slitFrom = word(1) as 'top and bottom';
      this.slitDeep = at(0);
      return true;
    }
    if (says(/^Trim these tabs to # deep, so that two on one wall do not meet\.$/)) {
      this.depth = at(0);
      return true;
    }
    if (says(/^Trim # off each of these tabs along its slit\.$/)) {
      this.relief = at(0);
      return true;
    }
    if (says(/^Taper (all tabs|(the corner tabs)?(?: and )?(?:the tabs? at the ([a-z ]+?))?) at (.+)\.$/)) {
      return this.taper(word(1), word(3), word(4), mm, degrees);
    }
    if (
      says(
        /^Cut the tab at the (\w+) into ~ teeth, each # wide at the score and # at the tip: a narrow V between each two, down to the score\.$/,
      )
    ) {
      const side = word(1) as Side;
      const [from, to] = this.kept[side];
      const [count, deep] = [counts[0] as number, this.strip(side)];
      const pitch = (to - from) / count;
      if (Math.abs(pitch - at(0)) > 0.3) return false;
      const give = (pitch - at(1)) / 2;
      for (let tooth = 0; tooth <= count; tooth += 1) {
        const root = from + tooth * pitch;
        const [a, b] = [root - give, root + give];
        const tip = (value: number) => this.on(side, value, 0);
        if (tooth === 0) cut(card, [this.on(side, root, deep), tip(b)]);
        else if (tooth === count) cut(card, [this.on(side, root, deep), tip(a)]);
        else cut(card, [tip(a), this.on(side, root, deep), tip(b)]);
      }
      return true;
    }
    if (
      says(
        /^At the (\w+) draw the arc of a # circle over the # between the scores, its ends # (down|across), and cut round it\.$/,
      )
    ) {
      const side = word(1) as Side;
      const [lo, hi] = this.kept[side];
      if (Math.abs(hi - lo - at(1)) > 0.01) return false;
      const deep = Math.abs(at(2) - (side === 'bottom' ? card.along : side === 'right' ? card.across : 0));
      const [from, to] = [this.on(side, lo, deep), this.on(side, hi, deep)];
      const out = { bottom: 'down', top: 'up', left: 'to the left', right: 'to the right' }[side];
      cut(card, [from, ...arcPoints(from, to, at(0) / 2, WAYS[out] as Dot)]);
      return true;
    }
    // Where a layer is glued says nothing of its own shape.
    if (says(/^Glue (?:one|it) to the outside of .*, # from every edge\.$/)) return true;
    if (says(/^Round the ([a-z ]+?) corners? to a radius of #\.$/)) {
      for (const [end, side] of cornersAt(word(1))) {
        const [x, y] = [side === 'left' ? 0 : card.across, end === 'top' ? 0 : card.along];
        const [dx, dy] = [side === 'left' ? 1 : -1, end === 'top' ? 1 : -1];
        const [from, to] = [corner(x + dx * at(0), y), corner(x, y + dy * at(0))];
        cut(card, [from, ...arcPoints(from, to, at(0), { x: -dx, y: -dy })]);
      }
      return true;
    }
    if (
      says(
        /^Cut (?:a half-round notch|~ half-round notches) of # radius into the ([a-z ]+) edges?, (?:its middle|their middles) at ([#, and]+) (across|down)\.$/,
      )
    ) {
      const sides = word(1).split(' and ') as Side[];
      if (counts.length > 0 && counts[0] !== sides.length * (mm.length - 1)) return false;
      for (const side of sides)
        for (const middle of mm.slice(1)) {
          const inward = { top: 'down', bottom: 'up', left: 'to the right', right: 'to the left' }[side];
          const [from, to] = [this.on(side, middle - at(0), 0), this.on(side, middle + at(0), 0)];
          cut(card, [from, ...arcPoints(from, to, at(0), WAYS[inward] as Dot)]);
        }
      return true;
    }

    // Holes.
    if (says(/^Punch (?:a hole|~ holes) of # diameter at ([#, and]+) across, ([#, and]+) down\.$/)) {
      const wide = (word(1).match(/#/g) ?? []).length;
      const [xs, ys] = [mm.slice(1, 1 + wide), mm.slice(1 + wide)];
      if (counts.length > 0 && counts[0] !== xs.length * ys.length) return false;
      for (const x of xs) for (const y of ys) card.holes.push(ring({ x, y }, at(0) / 2));
      return true;
    }
    if (says(/^Cut out a (?:window|slot) # × #, its top left corner # across, # down\.$/)) {
      const [w, h, x, y] = mm as [number, number, number, number];
      card.holes.push([corner(x, y), corner(x + w, y), corner(x + w, y + h), corner(x, y + h)]);
      return true;
    }
    return this.readRound({ text, mm, degrees, counts });
  }

  /** Discs, fans and sectors. */
  private readRound({ text, mm, degrees, counts }: Told): boolean {
    const { card } = this;
    const at = (index: number) => mm[index] as number;
    const middle = { x: card.across / 2, y: card.along / 2 };
    if (text === 'Draw a circle of # diameter and cut it out.') {
      card.outline = ring(middle, at(0) / 2).map((dot) => ({ ...dot, corner: false }));
      return true;
    }
    if (text === 'Draw a circle of # diameter and score it; the rim outside it is # deep.') {
      this.disc = { radius: at(0) / 2, deep: at(1) };
      card.strokes.push({
        kind: 'valley',
        path: [...ring(middle, at(0) / 2), { x: middle.x + at(0) / 2, y: middle.y }],
      });
      return true;
    }
    if (
      text ===
      'Cut the rim into ~ teeth, one every @, each # wide at the score and # at the tip, a V between each two, down to the score.'
    ) {
      const [count, { radius, deep }] = [counts[0] as number, this.disc ?? { radius: NaN, deep: NaN }];
      if (
        Math.abs(360 / count - (degrees[0] as number)) > 0.06 ||
        Math.abs(2 * radius * Math.sin(Math.PI / count) - at(0)) > 0.3
      )
        return false;
      card.outline = Array.from({ length: count }, (_, index) => {
        const turn = (2 * Math.PI * index) / count;
        return toothed(
          polar(middle, radius, turn),
          polar(middle, radius, turn + (2 * Math.PI) / count),
          middle,
          radius + deep,
          at(1),
        );
      }).flat();
      return true;
    }
    const fan =
      /^Draw a circle of # radius, its middle # from the left edge and # from the top; mark it every @, beginning @ beside the lowest point, and join the ~ marks: sides of #, each # from the middle\.$/;
    if (fan.test(text)) {
      const [count, hub] = [counts[0] as number, { x: at(1), y: at(2) }];
      const corners = Array.from({ length: count }, (_, index) =>
        polar(hub, at(0), Math.PI / 2 - Math.PI / count + (2 * Math.PI * index) / count),
      );
      if (
        Math.abs(gap(corners[0] as Dot, corners[1] as Dot) - at(3)) > 0.5 ||
        Math.abs(at(0) * Math.cos(Math.PI / count) - at(4)) > 0.5
      )
        return false;
      if (
        Math.abs(360 / count - (degrees[0] as number)) > 0.06 ||
        Math.abs(180 / count - (degrees[1] as number)) > 0.06
      )
        return false;
      this.fan = { corners, hinges: [], middle: hub, height: 0, triangle: false };
      card.outline = corners.map(({ x, y }) => corner(x, y));
      return true;
    }
    if (
      this.fan &&
      /^On every side draw a (triangle, its tip # out from the middle of the side|rectangle # tall)\.$/.test(text)
    ) {
      const { fan } = this;
      fan.height = at(0);
      fan.triangle = text.includes('triangle');
      card.outline = fan.corners.flatMap((from, index) =>
        this.flap(from, fan.corners[(index + 1) % fan.corners.length] as Dot, null),
      );
      return true;
    }
    if (
      this.fan &&
      /^On the left edge of every \w+, seen from the middle, draw a glue tab # wide; its ends stand at @ to that edge on the inner side and @ on the outer\.$/.test(
        text,
      )
    ) {
      const { corners } = this.fan;
      const tab = { wide: at(0), low: degrees[0] as number, high: degrees[1] as number };
      card.outline = corners.flatMap((from, index) =>
        this.flap(from, corners[(index + 1) % corners.length] as Dot, tab),
      );
      return true;
    }
    if (this.fan && text === 'In every tip punch a hole of # diameter on the middle line, its middle # from the tip.') {
      const { corners, middle: hub, height } = this.fan;
      for (const [index, from] of corners.entries()) {
        const to = corners[(index + 1) % corners.length] as Dot;
        const half = { x: (from.x + to.x) / 2, y: (from.y + to.y) / 2 };
        const apothem = gap(half, hub);
        const out = (apothem + height - at(1)) / apothem;
        card.holes.push(ring({ x: hub.x + (half.x - hub.x) * out, y: hub.y + (half.y - hub.y) * out }, at(0) / 2));
      }
      return true;
    }
    const scored = /^Score the ~ sides( and the edges with tabs)?: the \w+ turn by @(, the tabs by @)?\.$/.exec(text);
    if (this.fan && scored) {
      const { corners, hinges } = this.fan;
      for (const path of [[...corners, corners[0] as Dot], ...(scored[1] ? hinges : [])])
        card.strokes.push({ kind: 'valley', path });
      return counts[0] === corners.length;
    }
    if (
      /^From one point draw an arc of # radius( and one of # radius)? over @, which is # straight across the outer one, and join their ends by straight lines\.$/.test(
        text,
      )
    ) {
      const chord = mm.at(-1) as number;
      const half =
        (degrees[0] as number) > 180
          ? Math.PI - Math.asin(Math.min(1, chord / 2 / at(0)))
          : Math.asin(Math.min(1, chord / 2 / at(0)));
      if (Math.abs((half * 360) / Math.PI - (degrees[0] as number)) > 1.5) return false;
      this.radii = {
        outer: at(0),
        inner: mm.length === 3 ? at(1) : 0,
        half: Math.abs(chord / at(0) - 2) < 0.02 ? ((degrees[0] as number) * Math.PI) / 360 : half,
      };
      return true;
    }
    if (
      this.radii &&
      /^That point lies # from the left edge and # (above|below) the top one; the piece hangs straight down from it\.$/.test(
        text,
      )
    ) {
      this.apex = { x: at(0), y: text.includes('above') ? -at(1) : at(1) };
      return true;
    }
    if (
      this.radii &&
      this.apex &&
      /^Outside the left straight edge draw a glue tab # wide; its ends stand at @ to that edge at the outer arc and @ at the (point|inner one)\.$/.test(
        text,
      )
    ) {
      const { outer, inner, half } = this.radii;
      const [first, last] = [Math.PI / 2 - half, Math.PI / 2 + half];
      const round = (radius: number, from: number, to: number) =>
        Array.from(
          { length: 97 },
          (_, index): Stop => ({
            ...polar(this.apex as Dot, radius, from + ((to - from) * index) / 96),
            corner: index % 96 === 0,
          }),
        );
      const [rim, foot] = [polar(this.apex, outer, last), polar(this.apex, inner, last)];
      card.strokes.push({ kind: 'pencil', path: [rim, foot] });
      const tab = tabOutside(rim, foot, at(0), degrees[0] as number, degrees[1] as number);
      card.outline = [
        ...round(outer, first, last),
        ...tab,
        ...(inner > 0 ? round(inner, last, first) : [corner(this.apex.x, this.apex.y)]),
      ];
      return true;
    }
    return text === 'Cut it out. Roll the piece, do not fold it.';
  }
  private flap(from: Dot, to: Dot, tab: { wide: number; low: number; high: number } | null): Stop[] {
    const { middle, height, triangle } = this.fan as NonNullable<Reader['fan']>;
    const half = { x: (from.x + to.x) / 2, y: (from.y + to.y) / 2 };
    const length = gap(half, middle);
    const lift = ({ x, y }: Dot): Stop =>
      corner(x + ((half.x - middle.x) / length) * height, y + ((half.y - middle.y) / length) * height);
    const [a, b] = triangle ? [lift(half), lift(half)] : [lift(from), lift(to)];
    const tabbed = tab ? tabOutside(from, a, tab.wide, tab.low, tab.high) : [];
    if (tab) this.fan?.hinges.push([from, a]);
    return [corner(from.x, from.y), ...tabbed, a, ...(triangle ? [] : [b])];
  }

  private taper(
    which: string,
    places: string,
    how: string,
    mm: readonly number[],
    degrees: readonly number[],
  ): boolean {
    const [lengths, angles] = [[...mm], [...degrees]];
    const ends = new Map<string, (deep: number) => number>();
    for (const part of how.split(' and at ')) {
      const told = /^(both ends|the (\w+) end) by (# at the tip|@)$/.exec(part);
      if (!told) return false;
      const value = (told[3] === '@' ? angles : lengths).shift() as number;
      const by = told[3] === '@' ? (deep: number) => deep * Math.tan((value * Math.PI) / 180) : () => value;
      for (const end of told[2] ? [told[2]] : ['top', 'bottom', 'left', 'right']) ends.set(end, by);
    }
    const sides: Side[] = which === 'all tabs' ? this.tabSides() : ((places ? places.split(' and ') : []) as Side[]);
    if ((which === 'all tabs' && this.slitFrom) || which.includes('corner'))
      this.cornerTaper = ends.get('left') ?? null;
    for (const side of sides) {
      const deep = this.strip(side);
      const [lo, hi] = this.kept[side];
      const [first, last] = side === 'left' || side === 'right' ? ['top', 'bottom'] : ['left', 'right'];
      const [a, b] = [ends.get(first as string)?.(deep) ?? 0, ends.get(last as string)?.(deep) ?? 0];
      const tip = lo + a > hi - b ? lo + ((hi - lo) * a) / (a + b) : null;
      if (tip !== null) {
        const up = deep - (deep * (hi - lo)) / (a + b);
        cut(this.card, [this.on(side, lo, deep), this.on(side, tip, up), this.on(side, hi, deep)]);
        continue;
      }
      if (a > 0) cut(this.card, [this.on(side, lo, deep), this.on(side, lo + a, 0)]);
      if (b > 0) cut(this.card, [this.on(side, hi, deep), this.on(side, hi - b, 0)]);
    }
    return true;
  }
  /** All tabs of a piece without slit corners: its two outer strips, if it is scored one way only. */
  private tabSides(): Side[] {
    if (this.slitFrom) return [];
    return [
      ...(this.lines.across.length > 0 ? (['left', 'right'] as const) : []),
      ...(this.lines.along.length > 0 ? (['top', 'bottom'] as const) : []),
    ];
  }

  done(): Card {
    if (this.slitFrom) {
      const level = this.slitFrom === 'top and bottom';
      for (const [end, side] of cornersAt('')) {
        // In the corner's own frame: u from the free side towards the slit, v from the edge to the hinge.
        const [wide, deep] = level ? [this.strip(side), this.strip(end)] : [this.strip(end), this.strip(side)];
        if (Math.abs(deep - this.slitDeep) > 0.01) throw new Error('the slits do not end at the crossing');
        const place = (u: number, v: number): Stop => {
          const [x, y] = level ? [u, v] : [v, u];
          return corner(side === 'left' ? x : this.card.across - x, end === 'top' ? y : this.card.along - y);
        };
        const tall = this.depth ?? deep;
        const by = this.cornerTaper?.(tall) ?? 0;
        const foot = wide - this.relief;
        const pointed = 2 * by >= foot;
        const [rise, a, b] = pointed ? [(tall * foot) / (2 * by), foot / 2, foot / 2] : [tall, by, foot - by];
        if (deep - rise > 1e-6)
          cut(this.card, [
            place(0, deep),
            place(a, deep - rise),
            place(b, deep - rise),
            place(foot, deep),
            place(wide, deep),
            place(wide, 0),
          ]);
        else {
          if (by > 0) cut(this.card, [place(0, deep), place(a, 0)]);
          cut(this.card, [place(b, 0), place(foot, deep), place(wide, deep), place(wide, 0)]);
        }
      }
    }
    return this.card;
  }

  private size(axis: 'across' | 'along'): number {
    return this.card[axis];
  }
  private rule(axis: 'across' | 'along', places: readonly number[], what: string): void {
    const kind: Kind = what === 'pencil' ? 'pencil' : what ? 'mountain' : 'valley';
    for (const at of places) {
      this.lines[axis].push(at);
      const path =
        axis === 'across'
          ? [
              { x: at, y: 0 },
              { x: at, y: this.card.along },
            ]
          : [
              { x: 0, y: at },
              { x: this.card.across, y: at },
            ];
      this.card.strokes.push({ kind, path });
    }
  }
  private positions(axis: 'across' | 'along', places: readonly number[], ends: string, middle: string): number[] {
    const size = this.size(axis);
    if (!ends) return [...places];
    return [...places, ...places.map((one) => size - one), ...(middle ? [size / 2] : [])];
  }
  /** From a side of the blank to the nearest line along it. */
  private strip(side: Side): number {
    const axis = side === 'left' || side === 'right' ? 'across' : 'along';
    const far = side === 'right' || side === 'bottom';
    return Math.min(...this.lines[axis].map((at) => (far ? this.size(axis) - at : at)));
  }
  /** The place `at` along a side and `deep` in from it. */
  private on(side: Side, at: number, deep: number): Stop {
    const { across, along } = this.card;
    return {
      top: corner(at, deep),
      bottom: corner(at, along - deep),
      left: corner(deep, at),
      right: corner(across - deep, at),
    }[side];
  }
  private cutCorner([end, side]: readonly [Side, Side], wide: number, tall: number): void {
    const { across, along } = this.card;
    const [x, y] = [side === 'left' ? wide : across - wide, end === 'top' ? tall : along - tall];
    cut(this.card, [corner(x, end === 'top' ? 0 : along), corner(x, y), corner(side === 'left' ? 0 : across, y)]);
    this.kept[end][side === 'left' ? 0 : 1] = x;
    this.kept[side][end === 'top' ? 0 : 1] = y;
  }
  private images(words: string): ((point: Dot) => Dot)[] {
    const { across, along } = this.card;
    const flips = {
      'mirrored left to right': [[-1, 1]],
      'mirrored top to bottom': [[1, -1]],
      'turned half round': [[-1, -1]],
      'mirrored left to right, top to bottom and both ways': [
        [-1, 1],
        [1, -1],
        [-1, -1],
      ],
    }[words];
    if (words && !flips) throw new Error(`the same how: ${words}`);
    return [[1, 1], ...(flips ?? [])].map(
      ([h = 1, v = 1]) =>
        ({ x, y }: Dot): Dot => ({ x: h < 0 ? across - x : x, y: v < 0 ? along - y : y }),
    );
  }
  /** From a place by moves: `across to #; down to #; to # across, # down; to the top edge at #; round ~ teeth, …, to …`. */
  private walk(start: string, moves: string, figures: readonly number[], counts: readonly number[]): Stop[] | null {
    const values = [...figures];
    const take = () => values.shift() as number;
    const { across, along } = this.card;
    const place = (words: string): Stop | null => {
      const on = /^the (left|right|top|bottom) edge at #$/.exec(words)?.[1];
      const at = /^the (top|bottom) (left|right) corner$/.exec(words);
      if (on) return this.on(on as Side, take(), 0);
      if (at) return corner(at[2] === 'left' ? 0 : across, at[1] === 'top' ? 0 : along);
      return words === '# across, # down' ? corner(take(), take()) : null;
    };
    const first = place(start);
    if (!first) return null;
    const path = [first];
    for (const move of moves.split('; ')) {
      const from = path.at(-1) as Stop;
      const straight = /^(across|down|up) to #$/.exec(move);
      const arc = /^to (.+), an arc of # radius, bowed (up|down|to the left|to the right)$/.exec(move);
      const teeth = /^round ~ teeth, each # wide at the score, # at the tip and # deep, to (.+)$/.exec(move);
      if (straight) {
        const value = take();
        if (straight[1] === 'down' ? value < from.y - 1e-6 : straight[1] === 'up' && value > from.y + 1e-6) return null;
        path.push(straight[1] === 'across' ? corner(value, from.y) : corner(from.x, value));
      } else if (teeth) {
        const [wide, tip, deep] = [take(), take(), take()];
        const to = place(teeth[1] ?? '');
        const score = this.card.strokes.find(
          ({ path: [a, ...rest] }) =>
            a && to && [a, rest.at(-1) as Dot].every((end) => Math.min(gap(end, from), gap(end, to)) < 0.3),
        );
        if (!to || !score) return null;
        path.push(...this.teethRound(from, score.path, { count: counts[0] as number, wide, tip, deep }));
      } else {
        const to = place(arc ? (arc[1] ?? '') : move.replace(/^to /, ''));
        if (!to) return null;
        if (arc) path.push(...arcPoints(from, to, take(), WAYS[arc[2] ?? ''] as Dot));
        else path.push(to);
      }
    }
    return values.length === 0 ? path : null;
  }
  /** Teeth outside a scored arc, walked from one of its ends. */
  private teethRound(
    from: Dot,
    score: readonly Dot[],
    teeth: { count: number; wide: number; tip: number; deep: number },
  ): Stop[] {
    const { count, wide, tip, deep } = teeth;
    const round = gap(score[0] as Dot, from) < gap(score.at(-1) as Dot, from) ? score : [...score].reverse();
    const [a, b, c] = [round[0], round[Math.floor(round.length / 2)], round.at(-1)] as [Dot, Dot, Dot];
    const centre = centreThrough(a, b, c);
    const [chord, radius] = [gap(a, c), gap(a, centre)];
    const sweep = 2 * Math.asin(chord / 2 / radius);
    if (Math.abs(2 * radius * Math.sin(sweep / count / 2) - wide) > 0.3)
      throw new Error('the teeth do not fill the arc');
    const start = Math.atan2(a.y - centre.y, a.x - centre.x);
    const sense = Math.sin(Math.atan2(c.y - centre.y, c.x - centre.x) - start) > 0 ? 1 : -1;
    return Array.from({ length: count }, (_, index) => {
      const at = (part: number) => polar(centre, radius, start + (sense * sweep * (index + part)) / count);
      return [...toothed(at(0), at(1), centre, radius + deep, tip).slice(1), corner(at(1).x, at(1).y)];
    }).flat();
  }
}

/** Root, then the tip's two ends: straight across the middle at `out` from the centre, `wide` long. */
function toothed(from: Dot, to: Dot, centre: Dot, out: number, wide: number): Stop[] {
  const half = { x: (from.x + to.x) / 2 - centre.x, y: (from.y + to.y) / 2 - centre.y };
  const length = Math.hypot(half.x, half.y);
  const pitch = gap(from, to);
  const at = (along: number) =>
    corner(
      centre.x + (half.x / length) * out + ((to.x - from.x) / pitch) * along,
      centre.y + (half.y / length) * out + ((to.y - from.y) / pitch) * along,
    );
  return [corner(from.x, from.y), at(-wide / 2), at(wide / 2)];
}
/** Outer corners of a tab on the edge from `from` to `to`, to the left of the way as seen going. */
function tabOutside(from: Dot, to: Dot, wide: number, low: number, high: number): Stop[] {
  const length = gap(from, to);
  const way = { x: (to.x - from.x) / length, y: (to.y - from.y) / length };
  const at = (along: number) => corner(from.x + way.x * along + way.y * wide, from.y + way.y * along - way.x * wide);
  const run = (angle: number) => wide / Math.tan((angle * Math.PI) / 180);
  return [at(run(low)), at(length - run(high))];
}
/** Middle of the circle through three points. */
function centreThrough(a: Dot, b: Dot, c: Dot): Dot {
  const square = ({ x, y }: Dot) => x * x + y * y;
  const twice = 2 * (a.x * (b.y - c.y) + b.x * (c.y - a.y) + c.x * (a.y - b.y));
  return {
    x: (square(a) * (b.y - c.y) + square(b) * (c.y - a.y) + square(c) * (a.y - b.y)) / twice,
    y: (square(a) * (c.x - b.x) + square(b) * (a.x - c.x) + square(c) * (b.x - a.x)) / twice,
  };
}
const polar = (centre: Dot, radius: number, angle: number): Dot => ({
  x: centre.x + radius * Math.cos(angle),
  y: centre.y + radius * Math.sin(angle),
});
const ring = (centre: Dot, radius: number): Dot[] =>
  Array.from({ length: 180 }, (_, index) => polar(centre, radius, (index * Math.PI) / 90));

/** `top`, `bottom right`, `top left and bottom left`; nothing: all four. */
function cornersAt(words: string): (readonly [Side, Side])[] {
  const all = (['top', 'bottom'] as const).flatMap((end) =>
    (['left', 'right'] as const).map((side) => [end, side] as const),
  );
  if (!words || words === 'four') return all;
  return words
    .split(/ and |, /)
    .flatMap((one) => all.filter((pair) => one.split(' ').every((word) => (pair as readonly string[]).includes(word))));
}
