/** Predictions in a thread that has solved before: designs it has not seen, and changes of one number of the design just solved. */
import { parentPort, Worker } from "node:worker_threads";
import { build } from "../../meshes/build.ts";
import { checkDesign } from "../../meshes/check.ts";
import { predict } from "../../meshes/predict.ts";
import type { Result } from "../../meshes/result.ts";
import {
  ACCURACIES,
  atAccuracy,
  type Errors,
  errorsOf,
  otherFrequency,
  otherMaterial,
  TARGET_CASES,
  type TimedCase,
  unseen,
} from "./cases.ts";

/** A case at an accuracy; seconds of every run, the change's divided by those of the fresh solve right before. */
export interface WarmRow {
  readonly name: string;
  readonly accuracy: number;
  readonly fresh: readonly number[];
  readonly frequency: readonly number[];
  readonly material: readonly number[];
  /** Whether the changed designs were solved on the very patches of the fresh one, every time. */
  readonly sameGrid: { readonly frequency: boolean; readonly material: boolean };
  readonly unknowns: number;
  readonly met: boolean;
  readonly errors: Errors;
}

interface Timing {
  readonly seconds: number;
  readonly result: Result;
  /** Number of the patches it was solved on, in order of first appearance. */
  readonly mesh: number;
}

/** In the thread: every message is a design, every answer its timing. */
export function serveTimings(): void {
  const meshes = new WeakMap<object, number>();
  let seen = 0;
  parentPort?.on("message", (design: unknown) => {
    const started = performance.now();
    const checked = checkDesign(design);
    const { result } = predict(checked);
    const seconds = (performance.now() - started) / 1000;
    // Kept from the solve just made, and the same object as before where the grid was kept.
    const { mesh } = build(checked.scene);
    const timing: Timing = { seconds, result, mesh: meshes.get(mesh) ?? ++seen };
    meshes.set(mesh, timing.mesh);
    parentPort?.postMessage(timing);
  });
}

/** Rounds over cases × accuracies after a round that is not counted; changes of one number where times are set. */
export async function warmRows(
  entry: URL,
  cases: readonly TimedCase[],
  rounds: number,
  tell: (text: string) => void,
): Promise<WarmRow[]> {
  const thread = new Worker(entry, { argv: ["warm"] });
  const timed = (design: unknown): Promise<Timing> =>
    new Promise((resolve, reject) => {
      thread.removeAllListeners();
      thread.once("error", reject).once("message", resolve);
      thread.postMessage(design);
    });
  let seen = 0;
  const jobs = ACCURACIES.flatMap((accuracy) =>
    cases.map((of) => ({ of, accuracy, times: newTimes(), sameGrid: { frequency: true, material: true } })),
  );
  const results = new Map<(typeof jobs)[number], Result>();
  try {
    for (const { design } of cases) await timed(atAccuracy(unseen(design, ++seen), 0.2));
    for (let round = 0; round < rounds; round++) {
      for (const job of jobs) {
        const design = atAccuracy(unseen(job.of.design, ++seen), job.accuracy);
        const fresh = await timed(design);
        job.times.fresh.push(fresh.seconds);
        results.set(job, fresh.result);
        if (!TARGET_CASES.includes(job.of.name)) continue;
        for (const [key, change] of [
          ["frequency", otherFrequency],
          ["material", otherMaterial],
        ] as const) {
          const { seconds, mesh } = await timed(atAccuracy(change(design), job.accuracy));
          job.times[key].push(seconds / fresh.seconds);
          job.sameGrid[key] &&= mesh === fresh.mesh;
        }
      }
      tell(`warm thread: round ${round + 1} of ${rounds}`);
    }
  } finally {
    await thread.terminate();
  }
  return [...results].map(([{ of, accuracy, times, sameGrid }, result]) => ({
    name: of.name,
    accuracy,
    ...times,
    sameGrid,
    unknowns: result.numerics.unknowns,
    met: result.numerics.accuracyMet,
    errors: errorsOf(result, of.truth),
  }));
}

const newTimes = () => ({ fresh: [] as number[], frequency: [] as number[], material: [] as number[] });
