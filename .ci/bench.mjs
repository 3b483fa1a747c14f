/** `npm run bench`: measures how fast the program is on this machine; writes validation/bench/TABLE.md. */
import { runBundled } from "./bundle.mjs";
import { checkNode, ensureInstalled, root } from "./setup.mjs";

checkNode();
ensureInstalled({ tools: false });
process.chdir(root);
await runBundled("validation/bench/run.ts", "bench", process.argv.slice(2));
