import { createReadStream, type ReadStream } from 'node:fs';
import { mkdir, open, rename, rm, stat, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { config } from '@/config.server';
import { PICTURE_WIDTHS, type PictureWidth } from '@/writeup/pictures';

/** The one door to stored picture files: a folder beside the database. A hosted store would be another such file. */

export type PictureFile = `${PictureWidth}.webp` | 'jpg';

const PICTURE_FILES: readonly PictureFile[] = [...PICTURE_WIDTHS.map((w) => `${w}.webp` as const), 'jpg'];

const ID = /^[a-f0-9]{24}$/;
const folder = () => join(config.dataDir, 'uploads');
const nameOf = (id: string, file: PictureFile) => (file === 'jpg' ? `${id}.jpg` : `${id}-${file}`);

function pathOf(id: string, file: PictureFile): string {
  if (!ID.test(id)) throw new Error(`“${id}” is not the id of a picture.`);
  return join(folder(), nameOf(id, file));
}

/** Writes beside the place first and moves it in, so that a reader never meets half a picture. */
export async function keepPictureFile(id: string, file: PictureFile, bytes: Uint8Array): Promise<void> {
  const path = pathOf(id, file);
  const half = `${path}.part`;
  await mkdir(folder(), { recursive: true });
  await writeFile(half, bytes);
  const handle = await open(half, 'r+');
  await handle.sync();
  await handle.close();
  await rename(half, path);
}

export async function dropPictureFiles(id: string): Promise<void> {
  for (const file of PICTURE_FILES) {
    await rm(pathOf(id, file), { force: true });
    await rm(`${pathOf(id, file)}.part`, { force: true });
  }
}

/** A stored file to read from, with its length; null when there is none. */
export async function openPictureFile(
  id: string,
  file: PictureFile,
): Promise<{ stream: ReadStream; length: number } | null> {
  if (!ID.test(id)) return null;
  const path = pathOf(id, file);
  const found = await stat(path).catch(() => null);
  return found?.isFile() ? { stream: createReadStream(path), length: found.size } : null;
}
