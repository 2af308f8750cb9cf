import { compilePattern, evaluate, planSheets, STOCKS, usualSizing, type Pattern, type Sizing } from '@/engine';
import type { SheetContent } from '@/exports/pdf/sheet/content';
import { editionSheet } from '@/features/editions/paper/sheet-content';
import { FOLDER, writeUpOf } from '../server/published-project';

export const ADDRESS = 'https://boxes.example/projects/seed-folder?inside-width=5in';

/** A published folder, 5 × 6 in inside unless told otherwise, as a measurement sheet says it. */
export function folderSheet({
  pattern = FOLDER,
  sizing = {},
  title = 'Seed folder',
  author = 'Ines Thornbury',
}: {
  readonly pattern?: Pattern;
  readonly sizing?: Partial<Sizing>;
  readonly title?: string;
  readonly author?: string;
} = {}): SheetContent {
  const compiled = compilePattern(pattern);
  if (!compiled.ok) throw new Error(JSON.stringify(compiled.faults));
  const model = compiled.value;
  const figures = evaluate(model, { ...usualSizing(model), values: { 'inside width': 127 }, ...sizing });
  const writeUp = writeUpOf(
    { type: 'step', attrs: { title: 'Cut and score', mark: '' }, content: [{ type: 'paragraph' }] },
    {
      type: 'step',
      attrs: { title: '', mark: 'optional' },
      content: [
        {
          type: 'paragraph',
          content: [
            { type: 'text', text: 'Round the corners, ' },
            { type: 'measure', attrs: { formula: 'inside width / 8', bare: false } },
            { type: 'text', text: ' or so. Sand them.' },
          ],
        },
        {
          type: 'caution',
          content: [{ type: 'paragraph', content: [{ type: 'text', text: 'Sand outdoors.' }] }],
        },
      ],
    },
  );
  return editionSheet(
    { model, figures, plan: planSheets(figures, { stock: STOCKS['12x12in'] }) },
    {
      title,
      n: 2,
      author: { id: 'ines', name: author },
      publishedAt: new Date('2031-03-14T09:30:00Z'),
      minutes: 20,
      writeUp,
    },
    ADDRESS,
  );
}
