/** From nothing to a running site: `npm start`. */
import { build, checkDataFolder, checkNode, checkPort, install, readTypeScript, run } from './steps.mjs';

await run(async () => {
  checkNode();
  checkDataFolder();
  await checkPort();
  await install();
  await build();
  process.env.NODE_ENV ??= 'production';
  await readTypeScript();
  const { startSite } = await import('./site.ts');
  await startSite();
});
