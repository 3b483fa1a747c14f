/** `npm run validate`: runs the checks against the published world; they write validation/REPORT.md. */
import { runBundled } from "./bundle.mjs";
import { checkNode, ensureInstalled, root } from "./setup.mjs";

checkNode();
ensureInstalled({ tools: false });
process.chdir(root);
await runBundled("validation/run.ts", "validate", process.argv.slice(2));
