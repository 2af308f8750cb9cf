import type { z } from 'zod';

/** One thing wrong with what was sent: where it stands and what to do about it. */
export interface FieldFault {
  /** Dotted path into what was sent, such as `steps.2.title`; empty for the whole. */
  readonly where: string;
  readonly sentence: string;
}

export interface ProblemParts {
  /** One or two sentences for the person. */
  readonly detail?: string;
  /** A short name that programs may compare. */
  readonly code?: string;
  readonly errors?: readonly FieldFault[];
  readonly headers?: HeadersInit;
}

/**
 * An RFC 9457 problem document: `{ type, status, title, detail?, code?, errors? }`. Never stored by a cache.
 *
 *     problem(412, 'Changed meanwhile', { detail: 'Another tab saved revision 8.', code: 'changed-meanwhile' })
 */
export function problem(status: number, title: string, { headers, ...parts }: ProblemParts = {}): Response {
  const response = new Response(JSON.stringify({ type: 'about:blank', status, title, ...parts }), { status, headers });
  response.headers.set('content-type', 'application/problem+json; charset=utf-8');
  response.headers.set('cache-control', 'no-store');
  return response;
}

/** Data as JSON; not stored by a cache unless `init` says so. */
export function json(data: unknown, init: ResponseInit = {}): Response {
  const response = new Response(JSON.stringify(data), init);
  response.headers.set('content-type', 'application/json; charset=utf-8');
  if (!response.headers.has('cache-control')) response.headers.set('cache-control', 'no-store');
  return response;
}

export type Read<T> = { readonly ok: true; readonly value: T } | { readonly ok: false; readonly response: Response };

const USUAL_LIMIT = 64 * 1024;

/**
 * The request's JSON body, checked against a schema. Refusals are ready to be returned: 415 when it is not sent as
 * JSON, 413 past `maxBytes` (64 kB unless said; counted as they arrive, so a body without a length is caught too),
 * 400 when it does not read, 422 with every fault when it reads and does not fit.
 */
export async function readJson<S extends z.ZodTypeAny>(
  request: Request,
  schema: S,
  { maxBytes = USUAL_LIMIT }: { maxBytes?: number } = {},
): Promise<Read<z.output<S>>> {
  if (!/^application\/(?:[\w.-]+\+)?json\s*(?:;|$)/i.test(request.headers.get('content-type') ?? '')) {
    return refuse(problem(415, 'Not JSON', { detail: 'Send the body as application/json.', code: 'not-json' }));
  }
  const bytes = await readBytes(request, maxBytes);
  if (!bytes) return refuse(tooLarge(maxBytes));
  let data: unknown;
  try {
    data = JSON.parse(new TextDecoder('utf-8', { fatal: true }).decode(bytes));
  } catch {
    return refuse(
      problem(400, 'The JSON does not read', { detail: 'The body is not valid JSON in UTF-8.', code: 'bad-json' }),
    );
  }
  const parsed = schema.safeParse(data);
  if (parsed.success) return { ok: true, value: parsed.data };
  return refuse(doesNotFit(parsed.error));
}

/** A 422 that names every fault found by a schema. */
function doesNotFit(error: z.ZodError): Response {
  const errors = error.issues.map((issue) => ({ where: issue.path.join('.'), sentence: issue.message }));
  const first = errors[0];
  const detail = first ? (first.where ? `${first.where}: ${first.sentence}` : first.sentence) : undefined;
  return problem(422, 'Something sent does not fit', { detail, code: 'does-not-fit', errors });
}

export function tooLarge(maxBytes: number): Response {
  const detail = `At most ${Math.floor(maxBytes / 1024)} kB may be sent here.`;
  return problem(413, 'Too large', { detail, code: 'too-large' });
}

/** The body's bytes, or null as soon as there are more than `maxBytes`; the rest is then not read. */
export async function readBytes(request: Request, maxBytes: number): Promise<Uint8Array | null> {
  if (Number(request.headers.get('content-length') ?? 0) > maxBytes) return null;
  if (!request.body) return new Uint8Array();
  const reader = request.body.getReader();
  const chunks: Uint8Array[] = [];
  let length = 0;
  for (let part = await reader.read(); !part.done; part = await reader.read()) {
    length += part.value.byteLength;
    if (length > maxBytes) {
      await reader.cancel();
      return null;
    }
    chunks.push(part.value);
  }
  const bytes = new Uint8Array(length);
  let at = 0;
  for (const chunk of chunks) {
    bytes.set(chunk, at);
    at += chunk.byteLength;
  }
  return bytes;
}

const refuse = (response: Response) => ({ ok: false, response }) as const;
