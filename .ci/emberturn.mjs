#!/usr/bin/env node
/** The `emberturn` command: builds itself silently at need, then runs in this same process. */
import { runBundled } from "./bundle.mjs";
import { checkNode } from "./setup.mjs";

checkNode();
await runBundled("api/cli/main.ts", "emberturn", process.argv.slice(2));
