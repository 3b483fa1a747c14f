#!/usr/bin/env node
/** The `emberturn` command: builds itself silently at need, then runs in this same process. */
import { runEmberturn } from "./bundle.mjs";
import { checkNode } from "./setup.mjs";

checkNode();
await runEmberturn(process.argv.slice(2));
