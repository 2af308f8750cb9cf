import type { APIRoute } from 'astro';
import { figuresJson } from '@/exports/json/figures-json';
import { hasTag, notModified, publicHeaders, tagOf } from '@/features/editions/public-answer';
import { loadReaderPage } from '@/features/editions/reader-page.server';
import { planOn } from '@/features/sheets/stock-link';
import { problem, json } from '@/features/http/problem';

/** Planning sheets for many boxes takes long, and anybody may ask. */
const MOST_COPIES = 12;

/**
 * The command line's JSON for a published project at the sizing in the address, with `copies` and `card` as there. A size that
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
  const text = url.searchParams.get('copies') ?? '1';
  const copies = /^\d{1,4}$/.test(text) ? Number(text) : 0;
  if (copies < 1 || copies > MOST_COPIES) {
    const sentence = `“${text}” is no number of copies. Give a whole number from 1 to ${MOST_COPIES}.`;
    return problem(400, 'Something in the address does not read', {
      detail: sentence,
      code: 'bad-copies',
      errors: [{ where: 'copies', sentence }],
    });
  }
  const tag = tagOf(['figures', page.edition.id, url.search]);
  if (hasTag(request, tag)) return notModified(tag);
  const data = {
    project: page.edition.slug,
    edition: page.edition.n,
    ...figuresJson(page.model, page.view.verdict.figures, {
      ...planOn(page.view.stock),
      stock: page.view.stock,
      copies,
    }),
  };
  return json(data, { headers: publicHeaders(tag) });
};
