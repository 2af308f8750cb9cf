import { getPatternModel } from '@/features/patterns/patterns.server';
import { workExample, type Example } from './example';

const worked = new WeakMap<Request, Map<string, Example>>();

/**
 * The example box of a pattern at the size that the page's address asks for; worked out once a request, however many
 * figures of it the page shows. Throws when there is no such pattern: pages name them in their source.
 */
export function exampleOf(request: Request, slug: string): Example {
  const examples = worked.get(request) ?? new Map<string, Example>();
  worked.set(request, examples);
  const known = examples.get(slug);
  if (known) return known;
  const model = getPatternModel(slug);
  if (!model) throw new Error(`No pattern is called "${slug}": see content/patterns.`);
  const example = workExample(model, new URL(request.url).searchParams);
  examples.set(slug, example);
  return example;
}
