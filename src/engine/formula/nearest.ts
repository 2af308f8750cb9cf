/** The known name that was probably meant, or null when none is close. Small edits and swapped words count as near. */
export function nearestName(typed: string, known: Iterable<string>): string | null {
  const wanted = typed.toLowerCase();
  let best: string | null = null;
  let fewest = Math.max(2, Math.floor(wanted.length / 3)) + 0.5;
  for (const name of known) {
    const edits = Math.min(distance(wanted, name.toLowerCase()), wordDistance(wanted, name.toLowerCase()));
    if (edits < fewest) {
      fewest = edits;
      best = name;
    }
  }
  return best;
}

/** Edits between the words sorted, plus one: "width inside" is near "inside width". */
function wordDistance(a: string, b: string): number {
  const sorted = (text: string) => text.split(' ').sort().join(' ');
  return distance(sorted(a), sorted(b)) + 1;
}

/** Levenshtein distance. */
function distance(a: string, b: string): number {
  let row = Array.from({ length: b.length + 1 }, (_, index) => index);
  for (let i = 1; i <= a.length; i += 1) {
    const next = [i];
    for (let j = 1; j <= b.length; j += 1) {
      const change = (row[j - 1] ?? 0) + (a[i - 1] === b[j - 1] ? 0 : 1);
      next.push(Math.min(change, (row[j] ?? 0) + 1, (next[j - 1] ?? 0) + 1));
    }
    row = next;
  }
  return row[b.length] ?? 0;
}
