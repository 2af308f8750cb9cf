import type { APIContext } from 'astro';
import { zipSync, strToU8 } from 'fflate';
import type { Figures, PieceFigure } from '@/engine';
import { pieceLayout, rowLayout, type CuttingLayout } from '@/exports/cutting/layout';
import { figuresAsCut } from '@/exports/as-cut';
import { cuttingDxf } from '@/exports/dxf/cutting';
import { cuttingSvg } from '@/exports/svg/cutting';
import { loadMakeable } from '@/features/editions/paper/paper-route.server';
import { hasTag, notModified, publicHeaders, tagOf } from '@/features/editions/public-answer';
import type { ReaderPage } from '@/features/editions/reader-page.server';
import { problem } from '@/features/http/problem';
import { takeTurn, tooMany } from '@/features/limits/limits.server';
import { cutFromKey } from '@/features/sheets/cut-from';
import { CUTTING_FORMATS, cuttingName, piecesByKey, readGlue, type CuttingFormat } from './piece-files';

/** One piece by its key, all in one drawing, or each in a file of its own, all in a zip. */
export type CuttingFile =
  | { readonly of: 'piece'; readonly key: string; readonly format: CuttingFormat }
  | { readonly of: 'all'; readonly format: CuttingFormat }
  | { readonly of: 'zip' };

/** Types as registered with IANA. */
const TYPES: Readonly<Record<CuttingFormat | 'zip', string>> = {
  svg: 'image/svg+xml; charset=utf-8',
  dxf: 'image/vnd.dxf',
  zip: 'application/zip',
};

/**
 * Answers the address of a file for cutting machines, at the sizing in the address and with `glue=drawn` for glue areas. A piece that
 * this sizing does not have is not found; 429 for one who asks for too many.
 */
export async function cuttingRoute(context: APIContext, file: CuttingFile): Promise<Response> {
  const page = loadMakeable(context);
  if (page instanceof Response) return page;
  const { url, request, clientAddress } = context;
  const { edition, view } = page;
  const figures = figuresAsCut(view.verdict.shown, { ...view.plan, copies: 1 });
  const options = { glue: readGlue(url.searchParams) };
  const piece = file.of === 'piece' ? piecesByKey(figures).get(file.key) : undefined;
  if (file.of === 'piece' && !piece) {
    return problem(404, 'No such piece', {
      detail: `At this size and with these choices it has ${[...piecesByKey(figures).keys()].join(', ')}.`,
      code: 'not-found',
    });
  }
  const tag = tagOf(['cutting', edition.id, JSON.stringify([file, options, cutFromKey(view.cutFrom), figures.sizing])]);
  if (hasTag(request, tag)) return notModified(tag);
  const turn = await takeTurn('cutting', { ip: clientAddress });
  if (!turn.ok) return tooMany(turn);

  const extension = file.of === 'zip' ? 'zip' : file.format;
  const body =
    file.of === 'zip'
      ? zipOf(page, figures, options)
      : piece
        ? drawn(pieceLayout(piece, options), file.format, titleOf(page, piece))
        : drawn(rowLayout(figures.pieces, options), file.format, titleOf(page));
  const what = file.of === 'piece' ? file.key : 'pieces';
  return new Response(body, {
    headers: {
      ...publicHeaders(tag),
      'content-type': TYPES[extension],
      'content-disposition': `attachment; filename="${cuttingName(edition.slug, figures, what, extension)}"`,
    },
  });
}

const drawn = (layout: CuttingLayout, format: CuttingFormat, title: string): string =>
  format === 'svg' ? cuttingSvg(layout, { title }) : cuttingDxf(layout);

const titleOf = ({ edition }: ReaderPage, piece?: PieceFigure): string =>
  `${edition.title}: ${piece ? piece.name : 'all pieces'}`;

function zipOf(page: ReaderPage, figures: Figures, options: { readonly glue: boolean }): Uint8Array<ArrayBuffer> {
  const { edition } = page;
  const files = [...piecesByKey(figures)].flatMap(([key, piece]) =>
    CUTTING_FORMATS.map((format) => [
      cuttingName(edition.slug, figures, key, format),
      strToU8(drawn(pieceLayout(piece, options), format, titleOf(page, piece))),
    ]),
  );
  const day = edition.publishedAt;
  // Zip files keep local time; the day of publishing, wherever the site runs, makes equal files equal.
  const mtime = new Date(day.getUTCFullYear(), day.getUTCMonth(), day.getUTCDate());
  return new Uint8Array(zipSync(Object.fromEntries(files), { mtime }));
}
