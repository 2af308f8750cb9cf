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
    const [offset, packed, length] = [
      woff.readUInt32BE(from + 4),
      woff.readUInt32BE(from + 8),
      woff.readUInt32BE(from + 12),
    ];
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

const FAMILY = 1;

/**
 * The same font under the first word of its family's name: `Figtree SemiBold` becomes `Figtree`. Fonts of more than four weights name
 * each weight a family of its own, and a program that knows families by that name alone finds none of them by weight.
 */
export function underFirstName(font: Buffer): Buffer {
  const renamed = Buffer.from(font);
  const at = tableAt(renamed, 'name');
  const texts = at + renamed.readUInt16BE(at + 4);
  for (let record = 0; record < renamed.readUInt16BE(at + 2); record += 1) {
    const entry = at + 6 + 12 * record;
    if (renamed.readUInt16BE(entry + 6) !== FAMILY) continue;
    const from = texts + renamed.readUInt16BE(entry + 10);
    const text = renamed.subarray(from, from + renamed.readUInt16BE(entry + 8));
    const space = text.indexOf(Buffer.from([0, 0x20]));
    if (space > 0) renamed.writeUInt16BE(space, entry + 8);
  }
  return renamed;
}

function tableAt(font: Buffer, tag: string): number {
  for (let table = 0; table < font.readUInt16BE(4); table += 1) {
    const entry = HEADER.sfnt + table * ENTRY.sfnt;
    if (font.toString('latin1', entry, entry + 4) === tag) return font.readUInt32BE(entry + 8);
  }
  throw new Error(`a font without the table ${tag}`);
}
