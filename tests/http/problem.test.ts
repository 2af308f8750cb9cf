import { describe, expect, it } from 'vitest';
import { z } from 'zod';
import { isFromHere } from '@/features/http/origin';
import { problem, readJson } from '@/features/http/problem';

const post = (body: BodyInit, type = 'application/json') =>
  new Request('http://localhost:4321/api/x', {
    method: 'POST',
    headers: { 'content-type': type },
    body,
    duplex: 'half',
  } as RequestInit);
const schema = z.object({ title: z.string().min(1, 'Give it a title.') });

describe('a problem document', () => {
  it('holds type, status, title and what was said about it, and is not kept by caches', async () => {
    const answer = problem(412, 'Changed meanwhile', {
      detail: 'Another tab saved it.',
      code: 'changed-meanwhile',
      headers: { etag: '"8"' },
    });
    expect(await answer.json()).toEqual({
      type: 'about:blank',
      status: 412,
      title: 'Changed meanwhile',
      detail: 'Another tab saved it.',
      code: 'changed-meanwhile',
    });
    expect(Object.fromEntries(answer.headers)).toEqual({
      'content-type': 'application/problem+json; charset=utf-8',
      'cache-control': 'no-store',
      etag: '"8"',
    });
  });
});

describe('a JSON body', () => {
  it('is given as the schema has it', async () => {
    expect(await readJson(post('{"title":"Tray","more":1}'), schema)).toEqual({ ok: true, value: { title: 'Tray' } });
  });

  it.each([
    ['text/plain', 415],
    ['application/x-www-form-urlencoded', 415],
    ['application/jsonp', 415],
    ['application/json; charset=utf-8', 200],
    ['application/merge-patch+json', 200],
  ])('sent as %s gets %i', async (type, status) => {
    const read = await readJson(post('{"title":"Tray"}', type), schema);
    expect(read.ok ? 200 : read.response.status).toBe(status);
  });

  it('that is too long is refused by the bytes that arrive, without trusting a stated length', async () => {
    let sent = 0;
    const endless = new ReadableStream({
      pull(controller) {
        sent += 1024;
        controller.enqueue(new Uint8Array(1024).fill(32));
      },
    });
    const read = await readJson(post(endless), schema, { maxBytes: 4096 });
    expect(read.ok ? 200 : read.response.status).toBe(413);
    expect(sent).toBeLessThan(16 * 1024);
  });

  it('that is not UTF-8 is refused', async () => {
    const read = await readJson(post(new Uint8Array([0x22, 0xff, 0x22])), schema);
    expect(read.ok ? 200 : read.response.status).toBe(400);
  });

  it('that does not fit is answered with every fault and its place', async () => {
    const read = await readJson(post('{"title":""}'), schema);
    if (read.ok) throw new Error('It was taken.');
    expect(await read.response.json()).toEqual({
      type: 'about:blank',
      status: 422,
      title: 'Something sent does not fit',
      detail: 'title: Give it a title.',
      code: 'does-not-fit',
      errors: [{ where: 'title', sentence: 'Give it a title.' }],
    });
  });
});

describe('where a request comes from', () => {
  const ownOrigins = ['http://localhost:4321', 'https://boxes.example'];
  const check = (method: string, path: string, headers: Record<string, string>) => {
    const url = new URL(path, 'http://localhost:4321');
    return isFromHere(new Request(url, { method, headers }), { url, ownOrigins });
  };

  it('does not matter for reading', () => {
    expect(check('GET', '/projects', { origin: 'https://elsewhere.example' })).toBe(true);
  });

  it.each([
    ['our own origin', { origin: 'http://localhost:4321' }, true],
    [
      'the address that the site is known by',
      { origin: 'https://boxes.example', 'sec-fetch-site': 'same-origin' },
      true,
    ],
    ['another port', { origin: 'http://localhost:4322' }, false],
    ['another scheme', { origin: 'http://boxes.example' }, false],
    ['a name that begins like ours', { origin: 'https://boxes.example.elsewhere.example' }, false],
    ['nowhere', {}, false],
    ['an origin of its own', { origin: 'null' }, false],
    ['a sister site', { origin: 'https://boxes.example', 'sec-fetch-site': 'same-site' }, false],
  ])('counts for changing something: %s', (_where, headers, passes) => {
    expect(check('POST', '/workroom', headers)).toBe(passes);
    expect(check('DELETE', '/api/projects/x', headers)).toBe(passes);
  });

  it('does not matter for the one-click unsubscribing of mail programs, and for that alone', () => {
    expect(check('POST', '/unsubscribe?token=x', {})).toBe(true);
    expect(check('PUT', '/unsubscribe?token=x', {})).toBe(false);
    expect(check('POST', '/unsubscribe/all', {})).toBe(false);
    expect(check('POST', '/subscribe', {})).toBe(false);
  });
});
