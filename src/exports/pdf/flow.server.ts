import { decoration, tagged, type Paper, type Tag } from './document.server';
import type { Pen } from './drawing.server';
import { INK, SECTION, SMALL, THIN } from './look';

/** The part of a page that content may stand in, in points. */
export interface Frame {
  readonly left: number;
  readonly right: number;
  readonly top: number;
  readonly bottom: number;
}
/** Something that stays together on a page. */
export interface Block {
  readonly height: number;
  draw(parent: Tag, place: { readonly x: number; readonly y: number }): void;
  /** For a block taller than a page: the same in parts that are not. */
  parts?(): readonly Block[];
}

const SECTION_GAP = 15;
const SECTION_HEAD = 19;
/** Space at the foot of a page that is too little to begin a section in. */
const LEAST = 60;

/** Puts blocks on pages, one below the other or in columns, and begins a new page when one is full. */
export class Flow {
  y = 0;

  constructor(
    readonly pen: Pen,
    private readonly paper: Paper,
    readonly frame: Frame,
    private readonly onPage: () => void,
  ) {
    this.newPage();
  }

  get width(): number {
    return this.frame.right - this.frame.left;
  }
  get room(): number {
    return this.frame.bottom - this.y;
  }

  newPage(): void {
    this.paper.doc.addPage();
    this.onPage();
    this.y = this.frame.top;
  }

  /** Begins a new page unless there is this much room. */
  need(height: number): void {
    if (this.room < height && this.y > this.frame.top) this.newPage();
  }

  put(parent: Tag, block: Block, gap = 0): void {
    const tall = block.height > this.frame.bottom - this.frame.top && block.parts;
    if (tall) return tall.call(block).forEach((part) => this.put(parent, part, gap));
    this.need(block.height);
    block.draw(parent, { x: this.frame.left, y: this.y });
    this.y += block.height + gap;
  }

  /** A heading over a rule, with what follows it on the same page: `first` is the height that must fit below. */
  section(parent: Tag, title: string, note: string, first: number): void {
    if (this.y > this.frame.top) this.y += SECTION_GAP;
    const tallest = this.frame.bottom - this.frame.top - SECTION_HEAD;
    this.need(SECTION_HEAD + Math.max(LEAST, Math.min(first, tallest)));
    const { doc, type } = this.pen;
    const { left, right } = this.frame;
    const baseline = this.y + 10;
    tagged(doc, parent, 'H2', () => type.draw(title, SECTION, { x: left, baseline }));
    if (note !== '') tagged(doc, parent, 'P', () => type.draw(note, SMALL, { x: right, baseline, anchor: 'end' }));
    decoration(doc, () =>
      doc
        .moveTo(left, this.y + 15)
        .lineTo(right, this.y + 15)
        .lineWidth(THIN)
        .undash()
        .stroke(INK),
    );
    this.y += SECTION_HEAD + 4;
  }

  /** Blocks down equal columns, as level at the foot as they go; on further pages where one does not hold them. */
  columns(
    parent: Tag,
    blocks: readonly Block[],
    options: { readonly count: number; readonly gap: number; readonly between: number },
  ): void {
    const { count, gap, between } = options;
    const wide = (this.width - gap * (count - 1)) / count;
    const whole = this.frame.bottom - this.frame.top;
    let rest = blocks.flatMap((block) => (block.height > whole && block.parts ? block.parts() : [block]));
    while (rest.length > 0) {
      const [first] = rest as [Block, ...Block[]];
      this.need(first.height);
      const all = fill(rest, count, this.room, between);
      const columns = all.placed === rest.length ? level(rest, count, this.room, between) : all;
      columns.columns.forEach((column, index) => {
        let { y } = this;
        for (const block of column) {
          block.draw(parent, { x: this.frame.left + index * (wide + gap), y });
          y += block.height + between;
        }
      });
      this.y += columns.height;
      rest = rest.slice(columns.placed);
      if (rest.length > 0) this.newPage();
    }
  }
}

interface Filled {
  readonly columns: readonly (readonly Block[])[];
  readonly placed: number;
  readonly height: number;
}

function fill(blocks: readonly Block[], count: number, height: number, between: number): Filled {
  const columns: Block[][] = [];
  let placed = 0;
  let tallest = 0;
  while (columns.length < count && placed < blocks.length) {
    const column: Block[] = [];
    let used = 0;
    for (let block = blocks[placed]; block; block = blocks[placed]) {
      const after = used + (column.length > 0 ? between : 0) + block.height;
      // The first goes in whether it fits or not: there is nowhere that it would.
      if (after > height + 0.01 && (column.length > 0 || columns.length > 0)) break;
      column.push(block);
      used = after;
      placed += 1;
    }
    columns.push(column);
    tallest = Math.max(tallest, used);
  }
  return { columns, placed, height: tallest };
}

/** The lowest columns that hold everything. */
function level(blocks: readonly Block[], count: number, most: number, between: number): Filled {
  let [low, high] = [0, most];
  while (high - low > 1) {
    const middle = (low + high) / 2;
    const filled = fill(blocks, count, middle, between);
    if (filled.placed === blocks.length && filled.height <= middle + 0.01) high = middle;
    else low = middle;
  }
  return fill(blocks, count, high, between);
}
