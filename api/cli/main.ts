/** The bundle's entry: the command line in the main thread, the solver when started as a thread. */
import { isMainThread } from "node:worker_threads";

// Imported only where needed, so that neither side pays for starting the other.
if (isMainThread) {
  const { runProgram } = await import("./program.ts");
  await runProgram(process.argv.slice(2), new URL(import.meta.url));
} else {
  const { serveThread } = await import("../engine/worker.ts");
  serveThread();
}
