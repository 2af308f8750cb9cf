import sharp from 'sharp';
import { beforeEach, describe, expect, it } from 'vitest';
import { getEdition } from '@/features/editions/editions.server';
import {
  BOX,
  GROUND,
  HEIGHT,
  previewPicture,
  titleLines,
  WIDTH,
  WORDS,
} from '@/features/editions/preview-picture.server';
import { publishEdition } from '@/features/editions/publish.server';
import { addPerson, addProject } from '../server/published-project';
import { testDatabase } from '../setup/test-database';

beforeEach(() => void testDatabase());

interface Area {
  readonly left: number;
  readonly right: number;
  readonly top: number;
  readonly bottom: number;
}

/** The picture's pixels that are not its ground, counted in an area. */
async function pictureOf(title: string): Promise<{ readonly ink: (area: Area) => number; readonly all: number }> {
  const author = addPerson('Ines Thornbury');
  publishEdition(addProject(author, { slug: 'seed-list-folder', title }), { by: author, revision: 1 });
  const edition = getEdition('seed-list-folder');
  if (!edition) throw new Error('nothing is published');
  const picture = sharp(await previewPicture(edition)).removeAlpha();
  const { data, info } = await picture.raw().toBuffer({ resolveWithObject: true });
  expect([info.width, info.height]).toEqual([WIDTH, HEIGHT]);
  const ground = [1, 3, 5].map((at) => parseInt(GROUND.slice(at, at + 2), 16));
  const ink = ({ left, right, top, bottom }: Area) => {
    let count = 0;
    for (let y = top; y < bottom; y += 1) {
      for (let x = left; x < right; x += 1) {
        const at = (y * info.width + x) * 3;
        if (ground.some((channel, k) => Math.abs((data[at + k] ?? 0) - channel) > 12)) count += 1;
      }
    }
    return count;
  };
  return { ink, all: ink({ left: 0, right: WIDTH, top: 0, bottom: HEIGHT }) };
}
/** Letters hang a little over their line and their box. */
const HANG = 12;
const words: Area = { left: WORDS.left - HANG, right: WORDS.right + HANG, top: WORDS.top, bottom: WORDS.bottom + HANG };
const box: Area = { left: BOX.left - 2, right: BOX.right + 2, top: BOX.top - 2, bottom: BOX.bottom + 2 };

describe('the picture of a project without a photo', () => {
  it('has its title and size to the left and its box to the right, on a light ground of its own', async () => {
    const { ink, all } = await pictureOf('Seed lists');
    // A line of 68 pixels; below it the size of 34 pixels.
    const title = ink({ ...words, bottom: WORDS.top + 84 });
    const size = ink({ ...words, top: WORDS.top + 90, bottom: WORDS.top + 150 });
    expect(title).toBeGreaterThan(3000);
    expect(size).toBeGreaterThan(500);
    // A folder of 4 × 6 in fills a good part of its place.
    expect(ink(box)).toBeGreaterThan(10_000);
    expect(ink(words) + ink(box)).toBe(all);
  });

  it.each([
    'An uncommonly long title of a box for everything that '.repeat(6),
    'W'.repeat(200),
    'MWMWMWMW '.repeat(20),
  ])('keeps the title %s off the box and the edges', async (title) => {
    const { ink, all } = await pictureOf(title.trim());
    expect(ink(words)).toBeGreaterThan(10_000);
    expect(ink(words) + ink(box)).toBe(all);
  });
});

describe('a title', () => {
  it('that is short stands on one line', () => {
    expect(titleLines('Seed lists', 560).lines).toEqual(['Seed lists']);
  });
  it('that is longer is broken between words and set smaller', () => {
    const { size, lines } = titleLines('A box with four small drawers for the packets of a whole season', 560);
    expect(lines.join(' ')).toBe('A box with four small drawers for the packets of a whole season');
    expect(size).toBeLessThan(titleLines('Seed lists', 560).size);
  });
  it('that is too long ends in an ellipsis on its fourth line', () => {
    const { lines } = titleLines('seeds '.repeat(60), 560);
    expect(lines).toHaveLength(4);
    expect(lines[3]).toMatch(/…$/);
  });
});
