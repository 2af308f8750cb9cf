import { createHash } from 'node:crypto';
import { mkdir, readFile, rm, unlink, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { config } from '@/config.server';

/** Both bounds hold; what was asked for longest ago goes first. */
const MOST_FILES = 400;
const MOST_BYTES = 64 * 1024 * 1024;

/** Papers kept on disk by everything they depend on. Another build may lay them out differently, so each start begins with none. */
export class PaperCache {
  readonly #folder: string;
  readonly #most: { readonly files: number; readonly bytes: number };
  /** Sizes by key, in the order they were last asked for. */
  readonly #kept = new Map<string, number>();
  #ready: Promise<unknown> | null = null;

  constructor(folder: string, most = { files: MOST_FILES, bytes: MOST_BYTES }) {
    this.#folder = folder;
    this.#most = most;
  }

  static keyOf(parts: readonly unknown[]): string {
    return createHash('sha256').update(JSON.stringify(parts)).digest('hex').slice(0, 40);
  }

  /** Null when it is not kept, or no longer readable. */
  async get(key: string): Promise<Uint8Array | null> {
    const size = this.#kept.get(key);
    if (size === undefined) return null;
    this.#kept.delete(key);
    try {
      const file = await readFile(this.#fileOf(key));
      this.#kept.set(key, size);
      return file;
    } catch {
      return null;
    }
  }

  async put(key: string, bytes: Uint8Array): Promise<void> {
    this.#ready ??= rm(this.#folder, { recursive: true, force: true }).then(() =>
      mkdir(this.#folder, { recursive: true }),
    );
    await this.#ready;
    await writeFile(this.#fileOf(key), bytes);
    this.#kept.delete(key);
    this.#kept.set(key, bytes.length);
    let total = [...this.#kept.values()].reduce((sum, size) => sum + size, 0);
    for (const [oldest, size] of this.#kept) {
      if (this.#kept.size <= this.#most.files && total <= this.#most.bytes) break;
      this.#kept.delete(oldest);
      total -= size;
      await unlink(this.#fileOf(oldest)).catch(() => undefined);
    }
  }

  #fileOf(key: string): string {
    return join(this.#folder, `${key}.pdf`);
  }
}

export const paperCache = new PaperCache(join(config.dataDir, 'papers'));
