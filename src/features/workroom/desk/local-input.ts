/** A moment as a field for day and time has it, in the time of this machine: "2031-03-14T09:30". */
export function localInput(at: number): string {
  const date = new Date(at);
  const two = (n: number) => String(n).padStart(2, '0');
  const day = `${date.getFullYear()}-${two(date.getMonth() + 1)}-${two(date.getDate())}`;
  return `${day}T${two(date.getHours())}:${two(date.getMinutes())}`;
}

/** How the zone of this machine is called at that time: "GMT+2". */
export function zoneWords(input: string): string {
  const at = new Date(input);
  const parts = new Intl.DateTimeFormat('en-GB', { timeZoneName: 'shortOffset' }).formatToParts(
    Number.isNaN(at.getTime()) ? new Date() : at,
  );
  return parts.find(({ type }) => type === 'timeZoneName')?.value ?? 'UTC';
}

/** "Friday, 14 March 2031 at 09:30", in the time of this machine. */
export const momentWords = (at: number): string =>
  new Intl.DateTimeFormat('en-GB', { dateStyle: 'full', timeStyle: 'short' }).format(at);
