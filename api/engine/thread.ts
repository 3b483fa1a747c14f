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
 * Solves a checked design in a new thread, which ends with its answer.
 * @param entry the bundle whose start in a thread serves as solver
 * @throws MappedError what the thread could not do; any other error when the thread itself broke
 */
export function solveInThread(
  entry: URL,
  design: Checked,
  onProgress: (progress: Progress) => void,
): Promise<Prediction> {
  return new Promise((resolve, reject) => {
    const thread = new Worker(entry, { workerData: design });
    thread.on("message", (message: Message) => {
      if (message.kind === "progress") onProgress(message);
      else if (message.kind === "solved") resolve(message.prediction);
      else reject(new MappedError(message.failure));
    });
    thread.on("error", reject);
    thread.on("exit", (code) => reject(new Error(`the solving thread ended early (${code})`)));
  });
}
