import type { Pattern } from '@/engine';
import type { DocNode, WriteUp } from '@/writeup/document';
import { safeHref } from '@/writeup/links';
import type { Uses } from '@/writeup/uses';
import { dangersIn } from './dangers';
import type { ProofItem } from './proof';
import type { PlaceAt } from './proof-place';
import { blockWords, type LooseNode } from './state-words';

interface Written {
  readonly pattern: Pattern;
  readonly writeUp: WriteUp;
}

/** What the write-up lacks or gets wrong by itself, whatever the figures are. */
export function writeUpItems({ pattern, writeUp: { doc } }: Written, uses: Uses, at: PlaceAt): ProofItem[] {
  return [
    ...stepItems(uses),
    ...pieceItems(pattern, uses, at),
    ...referenceItems(uses, at),
    ...linkItems(doc, uses.steps, at),
    ...altItems(uses, at),
    ...materialItems(uses),
    ...unusedPieces(pattern, uses),
    ...pictureItems(doc, at),
    ...cautionItems(doc, at),
  ];
}

function stepItems({ steps }: Uses): ProofItem[] {
  if (steps > 0) return [];
  return [
    {
      code: 'no steps',
      blocking: true,
      title: 'There are no steps',
      detail: 'Put in the first step: what does the maker do first?',
      place: { column: 'write-up', label: 'Write-up' },
    },
  ];
}

function pieceItems(pattern: Pattern, uses: Uses, at: PlaceAt): ProofItem[] {
  const known = new Set(pattern.pieces.map((piece) => piece.name));
  const unknown = (piece: string, place: ProofItem['place'], what: string): ProofItem[] =>
    known.has(piece)
      ? []
      : [
          {
            code: 'unknown piece',
            blocking: true,
            title: `No piece is called “${piece}”`,
            detail: `Choose another piece for this ${what}, or take the ${what} out.`,
            place,
          },
        ];
  return [
    ...uses.pieces.flatMap(({ piece, step }, nth) => unknown(piece, at(step, nth), 'card')),
    ...uses.curves.flatMap(({ piece, step }) => unknown(piece, at(step), 'template')),
  ];
}

function referenceItems(uses: Uses, at: PlaceAt): ProofItem[] {
  return uses.references.flatMap(({ step, found }, nth): ProofItem[] =>
    found
      ? []
      : [
          {
            code: 'unknown step',
            blocking: true,
            title: 'The text speaks of a step that is gone',
            detail: 'Choose another step, or take the reference out.',
            place: at(step, nth),
          },
        ],
  );
}

function linkItems(doc: DocNode, steps: number, at: PlaceAt): ProofItem[] {
  let nth = -1;
  return everyText(doc).flatMap(({ node, step }): ProofItem[] =>
    (node.marks ?? [])
      .filter((mark) => mark.type === 'link')
      .flatMap((mark): ProofItem[] => {
        nth += 1;
        const href = String(mark.attrs?.['href'] ?? '');
        const anchor = /^#step-(\d+)$/u.exec(href);
        const leads = safeHref(href) !== null && (anchor === null || Number(anchor[1]) <= steps);
        if (leads && (!href.startsWith('#') || anchor !== null)) return [];
        return [
          {
            code: 'link broken',
            blocking: true,
            title: `“${node.text ?? ''}” links to nowhere`,
            detail: `“${href}” is no address that a reader can follow. Give one that begins with https://, or take the link away.`,
            place: at(step, nth),
          },
        ];
      }),
  );
}

function altItems(uses: Uses, at: PlaceAt): ProofItem[] {
  return uses.photos.flatMap(({ alt, step }, nth): ProofItem[] =>
    alt.trim() === ''
      ? [
          {
            code: 'no alt text',
            blocking: true,
            title: 'A photo has no words',
            detail: 'Say what the photo shows, for those who cannot see it.',
            place: at(step, nth),
          },
        ]
      : [],
  );
}

function materialItems({ materials }: Uses): ProofItem[] {
  if (materials.length > 0) return [];
  return [
    {
      code: 'no materials',
      blocking: false,
      title: 'No materials yet',
      detail: 'List the card, the glue and the tools, so that readers can lay them out first.',
      place: { column: 'write-up', label: 'Write-up' },
    },
  ];
}

function unusedPieces(pattern: Pattern, uses: Uses): ProofItem[] {
  if (uses.cutLists.length > 0) return [];
  const used = new Set(uses.pieces.map((card) => card.piece));
  return pattern.pieces
    .filter(({ name }) => !used.has(name))
    .map(({ name }) => ({
      code: 'piece unused',
      blocking: false,
      title: `No step uses ${name}`,
      detail: 'Put its piece card into the step that cuts it.',
      place: { column: 'pieces', label: `Pieces · ${name}`, name },
    }));
}

/** What shows something, and so stands for a photo. */
const PICTURES = new Set(['photo', 'pieceCard', 'cutList', 'curveTemplate', 'foldedView', 'sheetPlan']);

function pictureItems(doc: DocNode, at: PlaceAt): ProofItem[] {
  return stepsOf(doc).flatMap((step, i): ProofItem[] => {
    const shows = (node: LooseNode): boolean => PICTURES.has(node.type) || (node.content ?? []).some(shows);
    // One sentence seldom needs a picture.
    if (shows(step) || step.attrs?.['moment'] || blockWords(step).length < MOST_WITHOUT) return [];
    return [
      {
        code: 'no picture',
        blocking: false,
        title: `Step ${i + 1} shows nothing`,
        detail: 'A photo, a piece, the folded box or a moment of a video would say what words are long about.',
        place: at(i + 1),
      },
    ];
  });
}
const MOST_WITHOUT = 300;

/** Tools and materials that can hurt, where no caution of the write-up speaks of them. */
function cautionItems(doc: DocNode, at: PlaceAt): ProofItem[] {
  const said = new Set(cautionsIn(doc).flatMap((words) => dangersIn(words).map(({ name }) => name)));
  const told = new Set<string>();
  let step = 0;
  return (doc.content as readonly LooseNode[]).flatMap((block) => {
    if (block.type === 'step') step += 1;
    return dangersIn(blockWords(block)).flatMap(({ name, advice }): ProofItem[] => {
      if (said.has(name) || told.has(name)) return [];
      told.add(name);
      return [
        {
          code: 'no caution',
          blocking: false,
          title: `No caution speaks of ${name}`,
          detail: advice,
          place: at(block.type === 'step' ? step : null),
        },
      ];
    });
  });
}

function cautionsIn(doc: DocNode): readonly string[] {
  const found: string[] = [];
  const walk = (node: LooseNode): void => {
    if (node.type === 'caution') found.push(blockWords(node));
    node.content?.forEach(walk);
  };
  walk(doc as LooseNode);
  return found;
}

const stepsOf = (doc: DocNode): readonly LooseNode[] =>
  (doc.content as readonly LooseNode[]).filter(({ type }) => type === 'step');

interface MarkedText extends LooseNode {
  readonly marks?: readonly { readonly type: string; readonly attrs?: Readonly<Record<string, unknown>> }[];
}

function everyText(doc: DocNode): readonly { readonly node: MarkedText; readonly step: number | null }[] {
  const found: { node: MarkedText; step: number | null }[] = [];
  let steps = 0;
  const walk = (node: MarkedText, step: number | null): void => {
    if (node.type === 'text') found.push({ node, step });
    node.content?.forEach((inner) => walk(inner, step));
  };
  for (const block of doc.content as readonly MarkedText[]) {
    if (block.type === 'step') steps += 1;
    walk(block, block.type === 'step' ? steps : null);
  }
  return found;
}
