/** `14 March 2031`, the same for every reader and server: UTC. */
export function dayWords(date: Date): string {
  return new Intl.DateTimeFormat('en-GB', { day: 'numeric', month: 'long', year: 'numeric', timeZone: 'UTC' }).format(
    date,
  );
}
