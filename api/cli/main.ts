/** The bundle's entry: the command line in the main thread, the solver when started as a thread. */
import { isMainThread } from "node:worker_threads";

// Imported only where needed, so that neither side pays for starting the other.
if (isMainThread) {
  const entry = new URL(import.meta.url);
  const args = process.argv.slice(2);
  const { startSolver } = await import("../engine/thread.ts");
  // The solver's thread gets ready while this one reads the words and the design.
  const solver = args[0] === "solve" ? startSolver(entry) : undefined;
  const { runProgram } = await import("./program.ts");
  await runProgram(args, entry, solver);
} else {
  const { serveThread } = await import("../engine/worker.ts");
  serveThread();
}
