import type { VideoMoment } from './document';

/** A place in a video as a player shows it: `4:12`, `1:04:12`. */
export function momentText(seconds: number): string {
  const [hours, minutes, rest] = [Math.floor(seconds / 3600), Math.floor(seconds / 60) % 60, seconds % 60];
  const two = (n: number) => String(n).padStart(2, '0');
  return hours > 0 ? `${hours}:${two(minutes)}:${two(rest)}` : `${minutes}:${two(rest)}`;
}

/** Seconds in what is typed: `4:12`, `1:04:12`, or `252` alone. Null when it is no time within a day. */
export function readMoment(typed: string): number | null {
  const parts = /^(?:(?:(\d{1,2}):)?(\d{1,3}):)?(\d{1,5})$/.exec(typed.trim());
  if (!parts) return null;
  const [hours, minutes, seconds] = parts.slice(1).map((part) => (part === undefined ? null : Number(part)));
  if (minutes !== null && (seconds ?? 0) > 59) return null;
  if (hours !== null && (minutes ?? 0) > 59) return null;
  const all = (hours ?? 0) * 3600 + (minutes ?? 0) * 60 + (seconds ?? 0);
  return all < 86_400 ? all : null;
}

/** Where the video begins at the moment, by the fragment that players of the open web read; an address that has one keeps it. */
export const momentHref = ({ address, seconds }: VideoMoment): string | null =>
  address === null ? null : address.includes('#') ? address : `${address}#t=${seconds}`;
