/**
 * `npm start`: installs what is missing, builds, starts the service with the page, and shows the main job on the demo
 * design: its table, then the address. Arguments go to `emberturn serve`.
 */
import { runEmberturn } from "./bundle.mjs";
import { checkNode, ensureInstalled, root } from "./setup.mjs";

checkNode();
ensureInstalled({ tools: false });
process.chdir(root);
await runEmberturn(["serve", "--demo", "meshes/examples/demo.json", ...process.argv.slice(2)]);
