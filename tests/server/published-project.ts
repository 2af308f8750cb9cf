import { randomUUID } from 'node:crypto';
import { db } from '@/db/client.server';
import { projects, uploads, users, type Role } from '@/db/schema';
import type { Pattern, Sizing } from '@/engine';
import type { BlockNode, WriteUp } from '@/writeup/document';

/** A card with a fold in its middle: the smallest box that a maker could still fold. */
export const FOLDER: Pattern = {
  format: 1,
  slug: 'folder',
  name: 'Folder',
  summary: 'A card folded once.',
  group: 'Envelopes and pillows',
  measures: [
    { name: 'inside width', ask: { question: 'How wide is what goes in?', usual: '4 in', from: '2 in', to: '8 in' } },
    { name: 'inside height', ask: { question: 'How tall?', usual: '6 in', from: '3 in', to: '10 in' } },
    { name: 'blank width', formula: '2 * inside width' },
  ],
  choices: [],
  pieces: [
    {
      name: 'Folder',
      stock: 'card',
      builder: 'grid',
      columns: [
        { name: 'front', size: 'inside width' },
        { name: 'back', size: 'inside width' },
      ],
      rows: [{ name: 'height', size: 'inside height' }],
      cells: [['panel front', 'panel back']],
    },
  ],
  fits: [
    {
      name: 'it stands',
      left: 'inside height',
      is: 'at most',
      right: '2 * inside width',
      otherwise: 'it is taller than twice its width and falls over. Make it wider.',
      change: ['inside height'],
    },
  ],
  finished: {
    inside: [
      { name: 'wide', formula: 'inside width' },
      { name: 'tall', formula: 'inside height' },
    ],
    outside: [
      { name: 'wide', formula: 'inside width' },
      { name: 'tall', formula: 'inside height' },
    ],
  },
  order: ['Fold the card along the score.'],
  assembly: [{ piece: 'Folder', root: 'front', at: ['0 mm', '0 mm', '0 mm'], across: '+x', along: '+y' }],
};

export const AUTHORS_SIZE: Sizing = { values: {}, choices: {}, units: 'in', grid: '1/16in' };

export const writeUpOf = (...content: BlockNode[]): WriteUp => ({ version: 1, doc: { type: 'doc', content } });

/** One step: “Cut `<blank width>` of card.” */
export const ONE_STEP = writeUpOf({
  type: 'step',
  attrs: { title: 'Cut the card', mark: '' },
  content: [
    {
      type: 'paragraph',
      content: [
        { type: 'text', text: 'Cut ' },
        { type: 'measure', attrs: { formula: 'blank width', bare: false } },
        { type: 'text', text: ' of card.' },
      ],
    },
    { type: 'pieceCard', attrs: { piece: 'Folder' } },
  ],
});

export function addPerson(name: string, role: Role = 'author'): string {
  const id = randomUUID();
  const email = `${name.toLowerCase().replaceAll(' ', '.')}@quilletlane.example`;
  db.insert(users).values({ id, name, email, emailKey: email, role }).run();
  return id;
}

export function addProject(authorId: string, facts: Partial<typeof projects.$inferInsert> = {}): string {
  const id = randomUUID();
  db.insert(projects)
    .values({
      id,
      authorId,
      slug: `folder-${id.slice(0, 8)}`,
      title: 'Seed list folder',
      summary: 'Keeps a season of lists.',
      minutes: 20,
      pattern: FOLDER,
      sizing: AUTHORS_SIZE,
      writeUp: ONE_STEP,
      ...facts,
    })
    .run();
  return id;
}

export function addUpload(ownerId: string, id: string): string {
  db.insert(uploads).values({ id, ownerId, width: 1600, height: 1200, bytes: 1000 }).run();
  return id;
}
