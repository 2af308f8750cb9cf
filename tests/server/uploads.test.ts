import { existsSync, readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import sharp from 'sharp';
import { beforeEach, describe, expect, it } from 'vitest';
import { config } from '@/config.server';
import { db } from '@/db/client.server';
import { projects, uploads, users } from '@/db/schema';
import { emptyWriteUp } from '../setup/empty-write-up';
import { PICTURE_LIMITS } from '@/features/uploads/limits';
import { explainPictureFault } from '@/features/uploads/messages';
import { receiveUpload } from '@/features/uploads/receive-upload.server';
import { servePicture } from '@/features/uploads/serve-picture.server';
import { storeUpload } from '@/features/uploads/uploads.server';
import { testDatabase } from '../setup/test-database';

const INES = { id: 'ines', role: 'author' } as const;
const WENNA = { id: 'wenna', role: 'author' } as const;

beforeEach(() => {
  testDatabase();
  for (const { id } of [INES, WENNA]) {
    db.insert(users)
      .values({
        id,
        name: id,
        email: `${id}@quilletlane.example`,
        emailKey: `${id}@quilletlane.example`,
        role: 'author',
      })
      .run();
  }
  const empty = {} as never;
  db.insert(projects)
    .values({
      id: 'seed-box',
      authorId: INES.id,
      slug: 'seed-box',
      title: 'Seed box',
      pattern: empty,
      sizing: empty,
      writeUp: emptyWriteUp(),
    })
    .run();
});

const plain = (width: number, height: number) =>
  sharp({ create: { width, height, channels: 3, background: '#6d2e5b' } });
const jpeg = (width = 640, height = 400) => plain(width, height).jpeg().toBuffer();
const fileOf = (id: string, ending: string) => join(config.dataDir, 'uploads', `${id}${ending}`);
const store = (bytes: Uint8Array) => storeUpload({ ownerId: INES.id, projectId: 'seed-box', bytes });

async function stored(bytes: Uint8Array) {
  const result = await store(bytes);
  if (!result.ok) throw new Error(result.faults.map(explainPictureFault).join(' '));
  return result.value;
}
async function sentenceFor(bytes: Uint8Array) {
  const result = await store(bytes);
  if (result.ok) throw new Error('The picture was taken.');
  return explainPictureFault(result.faults[0]!);
}
function form(bytes: Uint8Array, { project = 'seed-box', name = 'photo.jpg' } = {}) {
  const data = new FormData();
  data.set('project', project);
  data.set('picture', new File([bytes as BlobPart], name));
  return new Request('http://localhost:4321/api/uploads', { method: 'POST', body: data });
}

describe('a picture that is taken', () => {
  it('is kept in three widths of WebP and as JPEG for mail, never larger than it came', async () => {
    const { id, width, height } = await stored(await jpeg(2000, 1000));
    expect({ width, height }).toEqual({ width: 1600, height: 800 });
    const sizes = async (ending: string) => {
      const { format, width, height } = await sharp(readFileSync(fileOf(id, ending))).metadata();
      return `${format} ${width}×${height}`;
    };
    expect(await sizes('-480.webp')).toBe('webp 480×240');
    expect(await sizes('-960.webp')).toBe('webp 960×480');
    expect(await sizes('-1600.webp')).toBe('webp 1600×800');
    expect(await sizes('.jpg')).toBe('jpeg 1200×600');
    const small = await stored(await jpeg(300, 200));
    expect({ width: small.width, height: small.height }).toEqual({ width: 300, height: 200 });
  });

  it('has a row with its owner, its project and the bytes that its files take', async () => {
    const { id } = await stored(await jpeg());
    const row = db.select().from(uploads).get();
    const files = readdirSync(join(config.dataDir, 'uploads')).filter((name) => name.startsWith(id));
    expect(files.sort()).toEqual([`${id}-1600.webp`, `${id}-480.webp`, `${id}-960.webp`, `${id}.jpg`]);
    expect(row).toMatchObject({ id, ownerId: 'ines', projectId: 'seed-box', width: 640, height: 400 });
    expect(row?.bytes).toBe(
      files.reduce((sum, name) => sum + readFileSync(join(config.dataDir, 'uploads', name)).byteLength, 0),
    );
  });

  it('loses its EXIF, place and camera, and stands upright', async () => {
    const withPlace = await plain(600, 400)
      .withExif({
        IFD0: { Artist: 'Ines Thornbury', Orientation: '6' },
        IFD3: { GPSLatitudeRef: 'N', GPSLatitude: '51/1 30/1 3230/100' },
      })
      .withMetadata({ orientation: 6 })
      .jpeg()
      .toBuffer();
    expect((await sharp(withPlace).metadata()).exif).toBeDefined();
    const { id, width, height } = await stored(withPlace);
    expect({ width, height }).toEqual({ width: 400, height: 600 });
    for (const ending of ['-480.webp', '-960.webp', '-1600.webp', '.jpg']) {
      const bytes = readFileSync(fileOf(id, ending));
      const { exif, xmp, iptc, icc, orientation } = await sharp(bytes).metadata();
      expect({ exif, xmp, iptc, icc, orientation }, ending).toEqual({});
      expect(bytes.includes('Thornbury')).toBe(false);
    }
  });

  it('may be a PNG with clear parts: they stay clear in WebP and turn white in the JPEG', async () => {
    const clear = await sharp({
      create: { width: 50, height: 50, channels: 4, background: { r: 0, g: 0, b: 0, alpha: 0 } },
    })
      .png()
      .toBuffer();
    const { id } = await stored(clear);
    expect((await sharp(readFileSync(fileOf(id, '-480.webp'))).metadata()).hasAlpha).toBe(true);
    expect([
      ...(
        await sharp(readFileSync(fileOf(id, '.jpg')))
          .raw()
          .toBuffer()
      ).subarray(0, 3),
    ]).toEqual([255, 255, 255]);
  });

  it('keeps the first picture alone of an animation', async () => {
    const frames = await Promise.all(
      ['#6d2e5b', '#1b7155'].map((background) =>
        sharp({ create: { width: 40, height: 30, channels: 3, background } })
          .png()
          .toBuffer(),
      ),
    );
    const moving = await sharp(frames, { join: { animated: true } })
      .webp()
      .toBuffer();
    expect((await sharp(moving).metadata()).pages).toBe(2);
    const { id, height } = await stored(moving);
    expect(height).toBe(30);
    expect((await sharp(readFileSync(fileOf(id, '-480.webp'))).metadata()).pages).toBeUndefined();
  });

  it('leaves behind whatever was hung onto the file', async () => {
    const polyglot = Buffer.concat([await jpeg(), Buffer.from('<script>alert(1)</script>PK\u0003\u0004')]);
    const { id } = await stored(polyglot);
    for (const ending of ['-480.webp', '-960.webp', '-1600.webp', '.jpg'])
      expect(readFileSync(fileOf(id, ending)).includes('script')).toBe(false);
  });

  it('that is very tall is kept at most four times as tall as the widest width', async () => {
    const { width, height } = await stored(await plain(200, 12_000).png().toBuffer());
    expect(height).toBe(6400); // 4 × 1600
    expect(width).toBe(107); // 200 × 6400 / 12000 = 106.7
  });
});

describe('a picture that is not taken', () => {
  it.each([
    [
      'SVG',
      Buffer.from('<?xml version="1.0"?><svg xmlns="http://www.w3.org/2000/svg"><script>alert(1)</script></svg>'),
      'This is an SVG drawing, which may hold programs; wanted is a JPEG, PNG or WebP picture. Save it as JPEG, PNG or WebP and send that.',
    ],
    [
      'HEIC',
      Buffer.from('\0\0\0\x18ftypheic\0\0\0\0', 'latin1'),
      'This is a HEIC photo, as some phones keep them; it cannot be read here; wanted is a JPEG, PNG or WebP picture. On the phone, share it as JPEG (“most compatible”), or send a screenshot of it.',
    ],
    [
      'GIF',
      Buffer.from('GIF89a\x01\x00\x01\x00', 'latin1'),
      'This is a GIF, which holds animation and few colours; wanted is a JPEG, PNG or WebP picture. Save it as JPEG, PNG or WebP and send that.',
    ],
    [
      'PDF',
      Buffer.from('%PDF-1.7\n'),
      'This is a PDF document; wanted is a JPEG, PNG or WebP picture. Save it as JPEG, PNG or WebP and send that.',
    ],
    [
      'page',
      Buffer.from('<!doctype html><p>hello'),
      'This file is not a picture that is known here; wanted is a JPEG, PNG or WebP picture. Save it as JPEG, PNG or WebP and send that.',
    ],
    ['nothing', Buffer.alloc(0), 'The file is empty; wanted is a picture. Choose another file.'],
  ])('names %s and says what to do', async (_, bytes, sentence) => {
    expect(await sentenceFor(bytes)).toBe(sentence);
    expect(db.select().from(uploads).all()).toEqual([]);
  });

  it('is cut short', async () => {
    const whole = await sharp({
      create: {
        width: 800,
        height: 800,
        channels: 3,
        background: '#000',
        noise: { type: 'gaussian', mean: 128, sigma: 40 },
      },
    })
      .jpeg()
      .toBuffer();
    expect(await sentenceFor(whole.subarray(0, whole.length / 2))).toBe(
      'The picture is damaged or cut short; wanted is a whole picture. Open it on your machine, save it again, and send that.',
    );
  });

  it('is larger than 12 MB', async () => {
    const bytes = Buffer.concat([await jpeg(), Buffer.alloc(PICTURE_LIMITS.bytes)]);
    expect(await sentenceFor(bytes)).toBe(
      'The file has 12.1 MB; wanted is at most 12 MB. Make it smaller, or save it as JPEG.',
    );
  });

  it('has more pixels than 40 million, however few bytes they take', async () => {
    const bomb = await plain(7000, 6000).png().toBuffer();
    expect(bomb.byteLength).toBeLessThan(PICTURE_LIMITS.bytes);
    expect(await sentenceFor(bomb)).toBe(
      'The picture has too many pixels; wanted is at most 40 million pixels. Scale it down and send it again.',
    );
  });

  it('is an SVG behind the first bytes of a PNG', async () => {
    const mask = Buffer.concat([
      Buffer.from('\x89PNG\r\n\x1a\n', 'latin1'),
      Buffer.from('<svg xmlns="http://www.w3.org/2000/svg"/>'),
    ]);
    expect(await sentenceFor(mask)).toMatch(/^The picture is damaged or cut short/);
  });
});

describe('POST /api/uploads', () => {
  it('answers 201 with the id and the size', async () => {
    const response = await receiveUpload(form(await jpeg()), INES);
    expect(response.status).toBe(201);
    expect(await response.json()).toEqual({ id: expect.stringMatching(/^[a-f0-9]{24}$/), width: 640, height: 400 });
  });

  it("answers 404 for another author's project, a deleted one and one that never was", async () => {
    const bytes = await jpeg();
    expect((await receiveUpload(form(bytes), WENNA)).status).toBe(404);
    expect((await receiveUpload(form(bytes, { project: 'nothing' }), INES)).status).toBe(404);
    db.update(projects).set({ deletedAt: new Date() }).run();
    expect((await receiveUpload(form(bytes), INES)).status).toBe(404);
    expect(db.select().from(uploads).all()).toEqual([]);
  });

  it('answers 413 when more than 12 MB arrive, also without a length', async () => {
    const chunk = new Uint8Array(1024 * 1024);
    let sent = 0;
    const body = new ReadableStream({
      pull(controller) {
        if (sent === 20) controller.close();
        else controller.enqueue(chunk);
        sent += 1;
      },
    });
    const init = {
      method: 'POST',
      body,
      duplex: 'half',
      headers: { 'content-type': 'multipart/form-data; boundary=x' },
    };
    const response = await receiveUpload(new Request('http://localhost/api/uploads', init as RequestInit), INES);
    expect(response.status).toBe(413);
    expect(sent).toBeLessThan(16);
    expect(await response.json()).toMatchObject({
      code: 'too-large',
      detail: 'The file is larger than 12 MB. Make it smaller, or save it as JPEG.',
    });
  });

  it('answers 415 for what is no form or no picture, and 422 for a form without one', async () => {
    const text = new Request('http://localhost/api/uploads', {
      method: 'POST',
      body: '{}',
      headers: { 'content-type': 'application/json' },
    });
    expect((await receiveUpload(text, INES)).status).toBe(415);
    const disguised = await receiveUpload(form(Buffer.from('<svg/>'), { name: 'photo.png' }), INES);
    expect(disguised.status).toBe(415);
    expect(disguised.headers.get('content-type')).toMatch('application/problem+json');
    const nothing = new FormData();
    nothing.set('project', 'seed-box');
    expect(
      (await receiveUpload(new Request('http://localhost/api/uploads', { method: 'POST', body: nothing }), INES))
        .status,
    ).toBe(422);
  });

  it('answers 400 for a form that is cut short', async () => {
    const init = {
      method: 'POST',
      body: '--x\r\nContent-Disposition: form-data; name="pro',
      headers: { 'content-type': 'multipart/form-data; boundary=x' },
    };
    expect((await receiveUpload(new Request('http://localhost/api/uploads', init), INES)).status).toBe(400);
  });

  it('takes ten at once, one after the other', async () => {
    const bytes = await jpeg(100, 100);
    const answers = await Promise.all(Array.from({ length: 10 }, () => receiveUpload(form(bytes), INES)));
    expect(answers.map(({ status }) => status)).toEqual(Array(10).fill(201));
    expect(db.select().from(uploads).all()).toHaveLength(10);
  });
});

describe('GET /media/…', () => {
  it('serves each file for ever, as a picture and nothing else', async () => {
    const { id } = await stored(await jpeg());
    for (const [ending, type] of [
      ['-480.webp', 'image/webp'],
      ['-960.webp', 'image/webp'],
      ['-1600.webp', 'image/webp'],
      ['.jpg', 'image/jpeg'],
    ] as const) {
      const response = await servePicture(`${id}${ending}`);
      expect(response.status).toBe(200);
      expect(response.headers.get('content-type')).toBe(type);
      expect(response.headers.get('cache-control')).toBe('public, max-age=31536000, immutable');
      expect(response.headers.get('x-content-type-options')).toBe('nosniff');
      expect((await response.arrayBuffer()).byteLength).toBe(readFileSync(fileOf(id, ending)).byteLength);
    }
  });

  it.each([
    '../secret',
    '..%2fsecret',
    'secret',
    `${'a'.repeat(24)}-481.webp`,
    `${'a'.repeat(24)}.png`,
    `${'a'.repeat(24)}.jpg`,
    '',
  ])('answers 404 for %j and is not kept', async (name) => {
    const response = await servePicture(name);
    expect(response.status).toBe(404);
    expect(response.headers.get('cache-control')).toBe('no-store');
    expect(existsSync(join(config.dataDir, 'uploads', name || 'nothing'))).toBe(false);
  });
});
