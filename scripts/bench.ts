/**
 * Measurements as JSON lines, each a ratio against a peer in the same run: `npm run bench [-- engine | pdf | sheets | load | typing]`.
 * A time is the median of many rounds; what counts is the ratio, which a busy machine moves far less than the time.
 */
const benches: Readonly<Record<string, () => Promise<void>>> = {
  engine: async () => (await import('./bench/engine')).engineBench(),
  pdf: async () => (await import('./bench/pdf')).pdfBench(),
  load: async () => (await import('./bench/load')).loadBench(),
  typing: async () => (await import('./bench/typing')).typingBench(),
  sheets: async () => (await import('./bench/sheets')).sheetsBench(),
};

const wanted = process.argv[2] ?? 'engine';
const bench = benches[wanted];
if (!bench) {
  console.error(`There is no bench called “${wanted}”. There are: ${Object.keys(benches).join(', ')}.`);
  process.exit(2);
}
bench().catch((error: unknown) => {
  console.error(error);
  process.exitCode = 1;
});
