/** `npm run dev`: as `npm start`, with the pages rebuilt as they are edited. */
import { begin, checkDataFolder, checkNode, checkPort, install, readTypeScript, run } from './steps.mjs';

await run(async () => {
  checkNode();
  checkDataFolder();
  await checkPort();
  await install();
  await readTypeScript();
  const { greet, startServices, stopOnSignal } = await import('./site.ts');
  const services = await startServices();
  greet();
  const { child, ended } = begin(process.execPath, ['node_modules/astro/astro.js', 'dev']);
  const stop = stopOnSignal(async () => {
    child.kill('SIGTERM');
    await Promise.all([ended, services.stop()]);
  });
  await ended.then(stop);
});
