/** `1:02:03.500`, `2:03`, `00:02:03,5` as seconds; null when it is no time, such as 1:75. */
export function readClock(text: string): number | null {
  const match = /^(?:(\d{1,3}):)?(\d{1,3}):(\d{2})(?:[.,](\d{1,3}))?$/.exec(text.trim());
  if (match === null) return null;
  const [hours, minutes, seconds] = [Number(match[1] ?? 0), Number(match[2]), Number(match[3])];
  if (seconds > 59 || (match[1] !== undefined && minutes > 59)) return null;
  return hours * 3600 + minutes * 60 + seconds + Number((match[4] ?? '0').padEnd(3, '0')) / 1000;
}
