import type { Result } from '@/engine';
import { readClock } from './clock';
import { readCaptions } from './read-captions';
import { LONGEST_SOURCE, sourceFault, type Cue, type SourceKind } from './source';

/** `[4:05] Score the lid`, `4:05 Score the lid`, `(1:02:03)`: a time that begins a line. */
const STAMP =
  /^\s*(?:\[\s*(\d[\d:.,]*:[\d:.,]*\d)\s*\]|\(\s*(\d[\d:.,]*:[\d:.,]*\d)\s*\)|(\d{1,3}:\d{2}(?::\d{2})?)(?=\s|$))\s*[-–—:]?\s*(.*)$/;

/** What a text is, by its name and its first lines. */
export function kindOf(text: string, name = ''): SourceKind {
  if (/^\ufeff?WEBVTT/.test(text) || /\.vtt$/i.test(name)) return 'webvtt';
  if (/\.srt$/i.test(name) || /^\ufeff?\s*\d+\s*[\r\n]+\s*[\d:.,]+\s+-->/.test(text)) return 'srt';
  if (
    /\.html?$/i.test(name) ||
    /^\ufeff?\s*<(?:!doctype|html|body|div|p|h[1-6]|ol|ul|section|article|meta)\b/i.test(text)
  )
    return 'html';
  const lines = text.split(/\r\n|\r|\n/).filter((line) => line.trim() !== '');
  const stamped = lines.filter((line) => STAMP.test(line)).length;
  return stamped >= 2 && stamped * 4 >= lines.length ? 'stamped' : 'plain';
}

/** Text of any kind but HTML as cues. What is wrong with it names its line. */
export function readSource(text: string, kind: Exclude<SourceKind, 'html'>): Result<readonly Cue[]> {
  if (text.trim() === '')
    return sourceFault('empty', null, 'there is nothing in it', 'Paste the text, or choose another file.');
  if (text.length > LONGEST_SOURCE)
    return sourceFault(
      'too long',
      null,
      `it has ${text.length} characters`,
      `Bring in no more than ${LONGEST_SOURCE} at a time.`,
    );
  if (text.includes('\0'))
    return sourceFault('not text', null, 'this is no text file', 'Save it as plain text, WebVTT or SRT.');
  if (kind === 'webvtt' || kind === 'srt') return readCaptions(text, kind);
  return kind === 'stamped' ? readStamped(text) : { ok: true, value: readPlain(text) };
}

/** A cue ends where the next one begins; the last one has no end. */
function readStamped(text: string): Result<readonly Cue[]> {
  const cues: { from: number | null; to: number | null; text: string }[] = [];
  for (const [n, line] of text
    .replace(/^\ufeff/, '')
    .split(/\r\n|\r|\n/)
    .entries()) {
    const match = STAMP.exec(line);
    const last = cues.at(-1);
    if (match === null) {
      if (line.trim() === '') continue;
      if (last === undefined) cues.push({ from: null, to: null, text: line.trim() });
      else last.text = `${last.text} ${line.trim()}`.trim();
      continue;
    }
    const stamp = match[1] ?? match[2] ?? match[3] ?? '';
    const from = readClock(stamp);
    if (from === null) return sourceFault('time', n + 1, `“${stamp}” is no time`, 'Write it as 4:05 or 1:04:05.');
    const before = cues.findLast((cue) => cue.from !== null)?.from ?? 0;
    if (from < before)
      return sourceFault(
        'order',
        n + 1,
        `${stamp} comes before the time above it`,
        'Put the lines in the order of the film.',
      );
    if (last !== undefined) last.to = from;
    cues.push({ from, to: null, text: (match[4] ?? '').trim() });
  }
  return { ok: true, value: cues.filter((cue) => cue.text !== '') };
}

/** Paragraphs: parted by an empty line, or each its own line where there are none. */
function readPlain(text: string): readonly Cue[] {
  const plain = text.replace(/^\ufeff/, '').replace(/\r\n?/g, '\n');
  const parts = /\n\s*\n/.test(plain.trim()) ? plain.split(/\n\s*\n/) : plain.split('\n');
  return parts
    .map((part) => part.replace(/\s+/g, ' ').trim())
    .filter((part) => part !== '')
    .map((part) => ({ from: null, to: null, text: part }));
}
