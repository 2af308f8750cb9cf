import type { APIContext } from 'astro';
import { loadReaderPage, type ReaderPage } from '@/features/editions/reader-page.server';
import { problem } from '@/features/http/problem';
import { readPaper } from '@/features/sizing/paper';
import { answerPaper, type PaperKind } from './papers.server';

/**
 * Answers a paper's address. What does not read or cannot be made is sent to the sheet's page, where the reason and the cures
 * stand: nobody should cut from figures of another size than they asked for.
 */
export async function paperRoute(context: APIContext, kind: PaperKind): Promise<Response> {
  const page = loadMakeable(context);
  if (page instanceof Response) return page;
  const { url, request, clientAddress } = context;
  const paper = readPaper(url.searchParams.get('paper'), page.view.verdict.shown.sizing.units);
  return answerPaper(page, { kind, paper, request, ip: clientAddress });
}

/** The published project in the address at a size that can be made, or what to answer instead. */
export function loadMakeable({ params, url, redirect }: APIContext): ReaderPage | Response {
  const page = loadReaderPage(params.slug ?? '', url);
  if (!page) {
    return problem(404, 'No such project', {
      detail: 'Nothing is published at this address. /projects lists what is.',
      code: 'not-found',
    });
  }
  if (page.faults.length > 0 || !page.view.verdict.good) return redirect(`${page.links.path}/sheet${url.search}`, 303);
  return page;
}
