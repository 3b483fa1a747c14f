/** `npm start`: installs what is missing, then shows the main job on the demo design: the table, and a heat picture beside it. */
import { mkdirSync } from "node:fs";
import { runBundled } from "./bundle.mjs";
import { checkNode, ensureInstalled, root } from "./setup.mjs";

checkNode();
ensureInstalled({ tools: false });
process.chdir(root);
mkdirSync("out", { recursive: true });
await runBundled("api/cli/main.ts", "emberturn", [
  "solve",
  "meshes/examples/demo.json",
  "--picture",
  "out/demo-heat.svg",
]);
