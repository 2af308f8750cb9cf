/** `npm run build`: dist/ anew, whatever was there. */
import { build, checkNode, install, run } from './steps.mjs';

await run(async () => {
  checkNode();
  await install();
  await build({ always: true });
});
