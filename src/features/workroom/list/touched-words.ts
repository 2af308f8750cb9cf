/** When something was touched, the way one says it: "Today 9:41", "Yesterday", "18 November", "2 March 2025". */
export function touchedWords(
  at: number,
  { now, timeZone }: { readonly now: number; readonly timeZone?: string },
): string {
  const part = (ms: number, options: Intl.DateTimeFormatOptions) =>
    new Intl.DateTimeFormat('en-GB', { timeZone, ...options }).format(ms);
  const day = (ms: number) => part(ms, { year: 'numeric', month: '2-digit', day: '2-digit' });
  if (day(at) === day(now)) return `Today ${part(at, { hour: 'numeric', minute: '2-digit' })}`;
  if (day(at) === day(now - 86_400_000)) return 'Yesterday';
  const sameYear = part(at, { year: 'numeric' }) === part(now, { year: 'numeric' });
  return part(at, { day: 'numeric', month: 'long', ...(sameYear ? {} : { year: 'numeric' }) });
}
