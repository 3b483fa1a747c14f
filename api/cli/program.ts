/** The `emberturn` command: its words, its options, its exit statuses, and what happens when a pipe breaks or a key stops it. */
import { Command, CommanderError } from "commander";
import { version } from "../../package.json";
import { defaults, type ServeOptions } from "../config.ts";
import { type Solve, startSolver } from "../engine/thread.ts";
import { exitStatus, type Failure, toFailure, UsageError } from "../errors.ts";
import { printable } from "../format/sentence.ts";
import type { MaterialsOptions } from "./materials.ts";
import { type SolveOptions, solveCommand } from "./solve.ts";

/**
 * Runs one command line and sets the process's exit status; `entry` is the bundle to start threads from, `solver` a thread
 * started already.
 */
export async function runProgram(args: readonly string[], entry: URL, solver?: Solve): Promise<void> {
  catchBrokenPipes();
  const json = args.includes("--json");
  try {
    await commands(entry, solver).parseAsync(args, { from: "user" });
  } catch (error) {
    if (error instanceof CommanderError && error.exitCode === 0) return;
    if (error instanceof CommanderError && error.code === "commander.help") {
      // No command at all: the help has been shown on stderr, which is answer enough.
      process.exitCode = exitStatus.refused;
      return;
    }
    const mapped =
      error instanceof CommanderError ? new UsageError(error.message.replace(/^error: /, "")) : error;
    complain(toFailure(mapped), json);
  }
}

function complain({ problem, words, exit }: Failure, json: boolean): void {
  // A document's own keys and names are quoted in the words; what a terminal would obey in them is taken out.
  const safe = words.split("\n").map(printable).join("\n");
  process.stderr.write(json ? `${JSON.stringify(problem, null, 2)}\n` : `${safe}\n`);
  process.exitCode = exit;
}

/** Ends at once when stopped. The service has something to put in order first, and does so itself. */
function endOnSignals(): void {
  process.on("SIGINT", () => process.exit(130));
  process.on("SIGTERM", () => process.exit(143));
}

/** Ends quietly when nobody reads any more. */
function catchBrokenPipes(): void {
  for (const stream of [process.stdout, process.stderr]) {
    stream.on("error", (error: NodeJS.ErrnoException) => {
      if (error.code === "EPIPE") process.exit(process.exitCode ?? exitStatus.done);
      process.exit(exitStatus.failed);
    });
  }
}

function commands(entry: URL, solver?: Solve): Command {
  const program = new Command("emberturn")
    .description(
      "What an induction coil will measure, and where its part gets hot, before the copper is bent.",
    )
    .version(version)
    .exitOverride()
    // Usage errors are thrown and said once, by the mapper; help asked for goes to stdout as usual.
    .configureOutput({ outputError: () => {} });
  program
    .command("solve")
    .description("Work out R, L, Q, powers and heat of one design.")
    .argument("<design>", "the design document's file, or - for standard input")
    .option("--json", "print the result document instead of the table")
    .option("--picture <file.svg>", "write a picture of where the heat sits")
    .addHelpText(
      "after",
      "\nExit status: 0 done; 2 the document is refused; 3 solved, but short of accuracyPercent; 1 anything else.",
    )
    .action((design: string, options: SolveOptions) => {
      endOnSignals();
      return solveCommand(design, options, solver ?? startSolver(entry));
    });
  program
    .command("materials")
    .description("List the library of materials that a design may name.")
    .option("--json", "print every number with its source instead of the table")
    .action(async (options: MaterialsOptions) => {
      const { materialsCommand } = await import("./materials.ts");
      materialsCommand(options);
    });
  program
    .command("serve")
    .description("Start the service with its page in the browser.")
    .option("--port <number>", "port to listen on; 0 takes any free one", String(defaults.port))
    .option("--host <address>", "address to listen on; this machine alone for now", defaults.host)
    .option("--data <folder>", "folder of the store, made if it is not there", defaults.data)
    .option("--demo <design>", "solve this design at the first start, and print its figures at every start")
    .addHelpText(
      "after",
      "\nEMBERTURN_LOG=silent | error | warn | info | debug says what is told on stderr (default warn).\nSIGINT and SIGTERM end it; what is not done by then is done after the next start.",
    )
    .action(async (options: ServeOptions) => {
      // Read only here: a single solve starts without the service's libraries.
      const { serveCommand } = await import("./serve.ts");
      await serveCommand(options, entry);
    });
  return program;
}
