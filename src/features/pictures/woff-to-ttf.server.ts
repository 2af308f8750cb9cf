import { inflateSync } from 'node:zlib';

const HEADER = { woff: 44, sfnt: 12 };
const ENTRY = { woff: 20, sfnt: 16 };

/**
 * The TrueType or OpenType font inside a WOFF 1.0 file (W3C recommendation of 2012): the same tables, each deflated, behind a
 * directory that states both lengths. For programs that read no WOFF. Throws for bytes that are not WOFF 1.0.
 */
export function woffToTtf(woff: Buffer): Buffer {
  if (woff.toString('latin1', 0, 4) !== 'wOFF') throw new Error('not a WOFF 1.0 file');
  const count = woff.readUInt16BE(12);
  const directory = Buffer.alloc(HEADER.sfnt + count * ENTRY.sfnt);
  const power = Math.floor(Math.log2(count));
  directory.writeUInt32BE(woff.readUInt32BE(4), 0);
  directory.writeUInt16BE(count, 4);
  directory.writeUInt16BE(16 * 2 ** power, 6);
  directory.writeUInt16BE(power, 8);
  directory.writeUInt16BE(16 * (count - 2 ** power), 10);

  const parts: Buffer[] = [directory];
  let at = directory.length;
  for (let table = 0; table < count; table += 1) {
    const from = HEADER.woff + table * ENTRY.woff;
    const [offset, packed, length] = [woff.readUInt32BE(from + 4), woff.readUInt32BE(from + 8), woff.readUInt32BE(from + 12)];
    const stored = woff.subarray(offset, offset + packed);
    const content = packed < length ? inflateSync(stored) : stored;
    const to = HEADER.sfnt + table * ENTRY.sfnt;
    woff.copy(directory, to, from, from + 4); // tag
    woff.copy(directory, to + 4, from + 16, from + 20); // checksum
    directory.writeUInt32BE(at, to + 8);
    directory.writeUInt32BE(length, to + 12);
    const filler = Buffer.alloc(-length & 3);
    parts.push(content, filler);
    at += length + filler.length;
  }
  return Buffer.concat(parts);
}
