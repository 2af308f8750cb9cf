import { randomBytes } from 'node:crypto';
import { count, eq } from 'drizzle-orm';
import { db } from '@/db/client.server';
import { uploads } from '@/db/schema';
import type { Fault, Result } from '@/engine';
import { PICTURE_LIMITS } from './limits';
import { pictureFaults } from './messages';
import { ACCEPTED_KINDS, pictureKind } from './picture-kind';
import { oneAtATime } from './one-at-a-time';
import { reEncode } from './re-encode.server';
import { dropPictureFiles, keepPictureFile } from './storage.server';

export interface StoredUpload {
  readonly id: string;
  /** Of the largest file kept. */
  readonly width: number;
  readonly height: number;
}

/** Decoding takes a few hundred megabytes for a large photo, so pictures take turns. */
const turns = oneAtATime({ waiting: PICTURE_LIMITS.waiting });

/**
 * Checks a picture by its content, encodes it anew in every size, keeps the files and writes the row. What was sent is
 * never kept. The caller has checked that the owner may add to the project; `projectId` null stands for no project.
 */
export async function storeUpload(given: {
  ownerId: string;
  projectId: string | null;
  bytes: Uint8Array;
}): Promise<Result<StoredUpload>> {
  const refusal = refuseAtOnce(given.bytes) ?? (given.projectId ? refuseFullProject(given.projectId) : null);
  if (refusal) return refused(refusal);
  return (await turns(() => encodeAndKeep(given))) ?? refused(pictureFaults.busy());
}

function refuseAtOnce(bytes: Uint8Array): Fault | null {
  if (bytes.byteLength === 0) return pictureFaults.empty();
  if (bytes.byteLength > PICTURE_LIMITS.bytes) return pictureFaults.tooLarge(bytes.byteLength);
  const kind = pictureKind(bytes);
  return ACCEPTED_KINDS.includes(kind) ? null : pictureFaults.wrongKind(kind);
}

function refuseFullProject(projectId: string): Fault | null {
  const kept = db.select({ n: count() }).from(uploads).where(eq(uploads.projectId, projectId)).get();
  return (kept?.n ?? 0) >= PICTURE_LIMITS.perProject ? pictureFaults.projectFull() : null;
}

async function encodeAndKeep(given: {
  ownerId: string;
  projectId: string | null;
  bytes: Uint8Array;
}): Promise<Result<StoredUpload>> {
  const encoded = await reEncode(given.bytes).catch((error: unknown) => {
    const message = error instanceof Error ? error.message : '';
    return /pixel limit|dimensions|too large/i.test(message)
      ? pictureFaults.tooManyPixels()
      : pictureFaults.unreadable();
  });
  if (!('files' in encoded)) return refused(encoded);

  const id = randomBytes(12).toString('hex');
  const { width, height, files } = encoded;
  try {
    let bytes = 0;
    for (const [file, content] of files) {
      await keepPictureFile(id, file, content);
      bytes += content.byteLength;
    }
    db.insert(uploads).values({ id, ownerId: given.ownerId, projectId: given.projectId, width, height, bytes }).run();
  } catch (error) {
    await dropPictureFiles(id);
    throw error;
  }
  return { ok: true, value: { id, width, height } };
}

const refused = (fault: Fault): Result<never> => ({ ok: false, faults: [fault] });
