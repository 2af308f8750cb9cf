import { setImmediate } from 'node:timers/promises';
import { config } from '@/config.server';
import { measurementPdf } from '@/exports/pdf/measurement-sheet.server';
import { templatesPdf } from '@/exports/pdf/templates-pdf.server';
import type { PaperId } from '@/exports/paper';
import type { ReaderPage } from '@/features/editions/reader-page.server';
import { publicHeaders, hasTag, notModified, tagOf } from '@/features/editions/public-answer';
import { problem } from '@/features/http/problem';
import { takeTurn, tooMany } from '@/features/limits/limits.server';
import { cutFromKey } from '@/features/sheets/cut-from';
import { sizingHref } from '@/features/sizing/live-html';
import { oneAtATime } from '@/features/uploads/one-at-a-time';
import { paperCache, PaperCache } from './paper-cache.server';
import { paperName } from './paper-name';
import { editionSheet } from './sheet-content';

/** Laying out a paper keeps the processor busy: one at a time, with a breath between for everybody else. */
const WAITING = 300;
const inTurn = oneAtATime({ waiting: WAITING });
/** Papers being made, so that a second request for one does not make it again. */
const making = new Map<string, Promise<Uint8Array | null>>();

export type PaperKind = 'sheet' | 'templates';

/**
 * A paper of a published project at a sizing that can be made, as a PDF response. Equal requests are answered from what was
 * made before; 429 for one who asks for too many, 503 when too many wait.
 */
export async function answerPaper(
  page: ReaderPage,
  {
    kind,
    paper,
    request,
    ip,
  }: { readonly kind: PaperKind; readonly paper: PaperId; readonly request: Request; readonly ip: string },
): Promise<Response> {
  const { edition, view } = page;
  const { sizing } = view.verdict.shown;
  const parts = [kind, paper, edition.id, edition.author.name, cutFromKey(view.cutFrom), sizing];
  const key = PaperCache.keyOf(parts);
  const tag = tagOf([key]);
  if (hasTag(request, tag)) return notModified(tag);
  let bytes: Uint8Array | null = await paperCache.get(key);
  if (!bytes) {
    const turn = await takeTurn('paper', { ip });
    if (!turn.ok) return tooMany(turn);
    bytes = await madeOnce(key, () => make(page, kind, paper));
  }
  if (!bytes) {
    return problem(503, 'Too many papers are being made', {
      detail: 'Wait a minute, then ask again.',
      code: 'busy',
      headers: { 'retry-after': '60' },
    });
  }
  return new Response(new Uint8Array(bytes), {
    headers: {
      ...publicHeaders(tag),
      'content-type': 'application/pdf',
      'content-disposition': `inline; filename="${paperName(edition.slug, view.verdict.shown, kind, paper)}"`,
    },
  });
}

function madeOnce(key: string, work: () => Uint8Array): Promise<Uint8Array | null> {
  const known = making.get(key);
  if (known) return known;
  const made = inTurn(async () => {
    await setImmediate();
    const bytes = work();
    await paperCache.put(key, bytes);
    return bytes;
  }).finally(() => making.delete(key));
  making.set(key, made);
  return made;
}

function make({ edition, model, view, links }: ReaderPage, kind: PaperKind, paper: PaperId): Uint8Array {
  const figures = view.verdict.shown;
  const address = `${config.siteUrl}${sizingHref(links, figures.sizing)}`;
  const content = editionSheet({ model, figures, plan: view.plan }, edition, address);
  return kind === 'sheet' ? measurementPdf(content, paper) : templatesPdf(content, paper);
}
