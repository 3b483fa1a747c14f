/** The command line as a user starts it: a process that knows nothing yet, from start to end. */
import { spawn } from "node:child_process";
import { mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import type { Result } from "../../meshes/result.ts";
import { ACCURACIES, atAccuracy, type Errors, errorsOf, TARGET_CASES, type TimedCase } from "./cases.ts";

/** A case at an accuracy; seconds of every run. */
export interface ColdRow {
  readonly name: string;
  readonly accuracy: number;
  /** `npm run --silent emberturn -- solve FILE --json`. */
  readonly command: readonly number[];
  /** `node .ci/emberturn.mjs solve FILE --json`; only of cases with target times. */
  readonly direct: readonly number[];
  /** The solving process's own peak resident set, bytes. */
  readonly peakBytes: readonly number[];
  readonly unknowns: number;
  readonly met: boolean;
  readonly errors: Errors;
}

const BY_NPM = ["npm", "run", "--silent", "emberturn", "--", "solve"] as const;
const DIRECT = [process.execPath, ".ci/emberturn.mjs", "solve"] as const;

/** Cases × accuracies, one after another, the whole round `rounds` times. The bundle is brought up to date first. */
export async function coldRows(
  cases: readonly TimedCase[],
  rounds: number,
  tell: (text: string) => void,
): Promise<ColdRow[]> {
  const folder = mkdtempSync(join(tmpdir(), "emberturn-bench-"));
  const jobs = ACCURACIES.flatMap((accuracy) =>
    cases.map((timed) => {
      const file = join(folder, `${timed.name}-${accuracy}.json`);
      writeFileSync(file, JSON.stringify(atAccuracy(timed.design, accuracy)));
      return {
        timed,
        accuracy,
        file,
        command: [] as number[],
        direct: [] as number[],
        peakBytes: [] as number[],
      };
    }),
  );
  const results = new Map<(typeof jobs)[number], Result>();
  try {
    if (jobs[0] !== undefined) await solved([...DIRECT, jobs[0].file, "--json"]);
    for (let round = 0; round < rounds; round++) {
      for (const job of jobs) {
        const run = await solved([...BY_NPM, job.file, "--json"]);
        job.command.push(run.seconds);
        job.peakBytes.push(run.result.numerics.peakMemoryBytes);
        results.set(job, run.result);
        if (TARGET_CASES.includes(job.timed.name))
          job.direct.push((await solved([...DIRECT, job.file, "--json"])).seconds);
      }
      tell(`commands: round ${round + 1} of ${rounds}`);
    }
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
  return [...results].map(([{ timed, accuracy, command, direct, peakBytes }, result]) => ({
    name: timed.name,
    accuracy,
    command,
    direct,
    peakBytes,
    unknowns: result.numerics.unknowns,
    met: result.numerics.accuracyMet,
    errors: errorsOf(result, timed.truth),
  }));
}

/** Wall time of a command from its start to its end, and the document it prints. @throws Error when it does not end with 0 or 3. */
function solved(command: readonly string[]): Promise<{ seconds: number; result: Result }> {
  return new Promise((resolve, reject) => {
    const started = performance.now();
    const child = spawn(command[0]!, command.slice(1), {
      stdio: ["ignore", "pipe", "pipe"],
      shell: process.platform === "win32",
    });
    const pieces: Buffer[] = [];
    let words = "";
    child.stderr.on("data", (piece: Buffer) => {
      words += piece.toString("utf8");
    });
    child.stdout.on("data", (piece: Buffer) => pieces.push(piece));
    child.on("error", reject);
    child.on("close", (status) => {
      const seconds = (performance.now() - started) / 1000;
      if (status !== 0 && status !== 3)
        reject(new Error(`${command.join(" ")} ended with ${status}: ${words}`));
      else resolve({ seconds, result: JSON.parse(Buffer.concat(pieces).toString("utf8")) as Result });
    });
  });
}
