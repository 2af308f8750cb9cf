import type { Result } from '@/engine';
import { readClock } from './clock';
import { MOST_CUES, sourceFault, type Cue } from './source';

const TIMING = /^(\S+)\s+-->\s+(\S+)(?:\s+.*)?$/;

/**
 * WebVTT (W3C) and SRT: cues with a beginning and an end, without their styling. Cues that roll the last line up again, as live captions do,
 * are said once. What is wrong names its line.
 */
export function readCaptions(text: string, kind: 'webvtt' | 'srt'): Result<readonly Cue[]> {
  const lines = text.replace(/^\ufeff/, '').split(/\r\n|\r|\n/);
  if (kind === 'webvtt' && !/^WEBVTT(?:[ \t]|$)/.test(lines[0] ?? ''))
    return sourceFault(
      'no header',
      1,
      'a WebVTT file begins with WEBVTT',
      'Put that word on the first line, or save it as SRT.',
    );
  const cues: Cue[] = [];
  let i = kind === 'webvtt' ? afterBlock(lines, 0) : 0;
  while (i < lines.length) {
    const line = lines[i] ?? '';
    if (line.trim() === '') {
      i += 1;
    } else if (kind === 'webvtt' && /^(NOTE|STYLE|REGION)(?:\s|$)/.test(line)) {
      i = afterBlock(lines, i);
    } else {
      const read = readCue(lines, i, cues.at(-1));
      if (!read.ok) return read;
      if (read.value.cue.text !== '') cues.push(read.value.cue);
      if (cues.length > MOST_CUES)
        return sourceFault('too many', i + 1, `more than ${MOST_CUES} captions`, 'Bring it in as two parts.');
      i = read.value.next;
    }
  }
  return cues.length > 0
    ? { ok: true, value: sayOnce(cues) }
    : sourceFault('no cues', null, 'no captions were found', 'Check that the file is whole.');
}

function afterBlock(lines: readonly string[], from: number): number {
  let i = from;
  while (i < lines.length && (lines[i] ?? '').trim() !== '') i += 1;
  return i;
}

function readCue(
  lines: readonly string[],
  start: number,
  before: Cue | undefined,
): Result<{ readonly cue: Cue; readonly next: number }> {
  // A name or a number may stand above the times.
  const at = (lines[start] ?? '').includes('-->') ? start : start + 1;
  const line = (lines[at] ?? '').trim();
  const match = TIMING.exec(line);
  if (match === null) {
    const found = line.includes('-->')
      ? `“${cut(line)}” has no two times`
      : `no times stand at “${cut(lines[start] ?? '')}”`;
    return sourceFault(
      'no times',
      (line.includes('-->') ? at : start) + 1,
      found,
      'Write them as 00:01:05.000 --> 00:01:08.000.',
    );
  }
  const [from, to] = [readClock(match[1] ?? ''), readClock(match[2] ?? '')];
  if (from === null || to === null)
    return sourceFault(
      'time',
      at + 1,
      `“${cut((from === null ? match[1] : match[2]) ?? '')}” is no time`,
      'Write it as 00:01:05.000.',
    );
  if (to < from) return sourceFault('backwards', at + 1, 'the caption ends before it begins', 'Swap the two times.');
  if (before?.from != null && from < before.from)
    return sourceFault('order', at + 1, 'this caption begins before the one above it', 'Sort the captions by time.');
  const end = afterBlock(lines, at + 1);
  const text = lines
    .slice(at + 1, end)
    .map(plainLine)
    .filter((said) => said !== '')
    .join('\n');
  return { ok: true, value: { cue: { from, to, text }, next: end } };
}

const cut = (text: string): string => (text.length > 40 ? `${text.slice(0, 40)}…` : text).trim();

const ENTITIES: Readonly<Record<string, string>> = { amp: '&', lt: '<', gt: '>', nbsp: ' ', lrm: '', rlm: '' };
/** Without voices, classes, times within the line and placing. */
const plainLine = (line: string): string =>
  line
    .replace(/<[^>]*>|\{\\[^}]*\}/g, '')
    .replace(/&(amp|lt|gt|nbsp|lrm|rlm);/g, (_, name: string) => ENTITIES[name] ?? '')
    .replace(/\s+/g, ' ')
    .trim();

/** Lines that were already said in the caption before are left away. */
function sayOnce(cues: readonly Cue[]): readonly Cue[] {
  let before: readonly string[] = [];
  return cues.flatMap((cue) => {
    const lines = cue.text.split('\n');
    const fresh = lines.filter((line) => !before.includes(line));
    before = lines;
    return fresh.length === 0 ? [] : [{ ...cue, text: fresh.join(' ') }];
  });
}
