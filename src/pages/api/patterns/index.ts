import type { APIRoute } from 'astro';
import { z } from 'zod';
import { explain } from '@/engine';
import { requireRole } from '@/features/accounts/guard.server';
import { json, problem, readJson } from '@/features/http/problem';
import { readPattern } from '@/features/patterns/load-pattern';
import { keepPattern, MOST_PATTERNS } from '@/features/patterns/own-patterns.server';
import { PATTERN_BYTES } from '@/features/patterns/pattern-limits';
import { ownShelf } from '@/features/projects/pattern-shelf.server';

/** More would only be the same again. */
const MOST_FAULTS = 30;

/** The asker's own patterns, as the shelf shows them. */
export const GET: APIRoute = (context) => {
  const user = requireRole(context, 'author');
  if (user instanceof Response) return user;
  return json({ patterns: ownShelf(user.id) });
};

/**
 * Keeps a pattern, sent as its file, among the asker's own. Answers `{id, replaced}`; one of the same name is refused with
 * 409 unless the address says `?replace=yes`.
 */
export const POST: APIRoute = async (context) => {
  const user = requireRole(context, 'author');
  if (user instanceof Response) return user;
  const sent = await readJson(context.request, z.object({}).passthrough(), { maxBytes: PATTERN_BYTES });
  if (!sent.ok) return sent.response;
  const read = readPattern(sent.value);
  if (!read.ok) {
    const errors = read.faults.slice(0, MOST_FAULTS).map((fault) => ({ where: fault.where, sentence: explain(fault) }));
    const [first] = errors;
    return problem(422, 'The pattern cannot be used', {
      detail: first && `${first.where}: ${first.sentence}`,
      code: 'pattern-faults',
      errors,
    });
  }
  const { pattern } = read.value;
  if (pattern.name.trim() === '')
    return problem(422, 'No name', { detail: 'Give the pattern a name first.', code: 'no-name' });
  const kept = keepPattern(pattern, {
    ownerId: user.id,
    replace: context.url.searchParams.get('replace') === 'yes',
  });
  if (kept.ok) return json({ id: kept.id, replaced: kept.replaced }, { status: kept.replaced ? 200 : 201 });
  return kept.code === 'name taken'
    ? problem(409, 'Name taken', {
        detail: `A pattern of yours is called “${pattern.name}” already. Give this one another name, or replace that one.`,
        code: 'name-taken',
      })
    : problem(409, 'Shelf full', {
        detail: `You keep ${MOST_PATTERNS} patterns, and that is as many as may be. Take one off the shelf first.`,
        code: 'shelf-full',
      });
};
