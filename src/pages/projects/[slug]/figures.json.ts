import type { APIRoute } from 'astro';
import { figuresJson } from '@/exports/json/figures-json';
import { hasTag, notModified, publicHeaders, tagOf } from '@/features/editions/public-answer';
import { loadReaderPage } from '@/features/editions/reader-page.server';
import { planOptions } from '@/features/sheets/cut-from';
import { problem, json } from '@/features/http/problem';

/**
 * The command line's JSON for a published project at the sizing in the address, with its sheets as there. A size that
 * cannot be made is answered with its own figures and its problems listed; a value that does not read is refused.
 */
export const GET: APIRoute = ({ params, url, request }) => {
  const page = loadReaderPage(params.slug ?? '', url);
  if (!page) {
    return problem(404, 'No such project', {
      detail: 'Nothing is published at this address. /projects lists what is.',
      code: 'not-found',
    });
  }
  if (page.faults.length > 0) {
    const errors = page.faults.map(({ where, sentence }) => ({ where, sentence }));
    return problem(400, 'Something in the address does not read', {
      detail: errors[0]?.sentence,
      code: 'bad-sizing',
      errors,
    });
  }
  const tag = tagOf(['figures', page.edition.id, url.search]);
  if (hasTag(request, tag)) return notModified(tag);
  const { cutFrom, verdict } = page.view;
  const { figures } = verdict;
  const data = {
    project: page.edition.slug,
    edition: page.edition.n,
    ...figuresJson(page.model, figures, {
      ...planOptions(cutFrom, figures.pieces),
      stock: cutFrom.stock,
    }),
  };
  return json(data, { headers: publicHeaders(tag) });
};
