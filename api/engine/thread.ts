/** Solving in a thread of its own, so that the caller stays awake: to show progress, and to stop at once. */
import { Worker } from "node:worker_threads";
import type { Checked } from "../../meshes/check.ts";
import type { Prediction, Progress } from "../../meshes/predict.ts";
import { type Failure, MappedError } from "../errors.ts";

/** What a solving thread says; plain data. */
export type Message =
  | ({ readonly kind: "progress" } & Progress)
  | { readonly kind: "solved"; readonly prediction: Prediction }
  | { readonly kind: "failed"; readonly failure: Failure };

/**
 * Solves a checked design.
 * @throws MappedError what the thread could not do; any other error when the thread itself broke
 */
export type Solve = (design: Checked, onProgress: (progress: Progress) => void) => Promise<Prediction>;

/**
 * Starts a thread that reads the solver's code while its caller still reads the design, and solves one. Until then it keeps no process
 * alive, and nothing is said of its end.
 * @param entry the bundle whose start in a thread serves as solver
 */
export function startSolver(entry: URL): Solve {
  const thread = new Worker(entry);
  const ended = new Promise<never>((_, reject) => {
    thread.once("error", reject);
    thread.once("exit", (code) => reject(new Error(`the solving thread ended early (${code})`)));
  });
  ended.catch(() => {});
  thread.unref();
  return (design, onProgress) => {
    const answer = new Promise<Prediction>((resolve, reject) => {
      thread.on("message", (message: Message) => {
        if (message.kind === "progress") onProgress(message);
        else if (message.kind === "solved") resolve(message.prediction);
        else reject(new MappedError(message.failure));
      });
    });
    thread.ref();
    thread.postMessage(design);
    return Promise.race([answer, ended]);
  };
}
