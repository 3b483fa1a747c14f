/** The inside of a solving thread: one design in, progress and one answer out. */
import { parentPort } from "node:worker_threads";
import type { Checked } from "../../meshes/check.ts";
import { predict } from "../../meshes/predict.ts";
import { toFailure } from "../errors.ts";
import type { Message } from "./thread.ts";

/** Waits for one design, solves it and posts the answer to the parent. */
export function serveThread(): void {
  parentPort?.once("message", solve);
}

function solve(design: Checked): void {
  const post = (message: Message, transfer: ArrayBuffer[] = []): void =>
    parentPort?.postMessage(message, transfer);
  try {
    const prediction = predict(design, {
      progress: (progress) => post({ kind: "progress", ...progress }),
      peakMemoryBytes: () => 1024 * process.resourceUsage().maxRSS,
    });
    const { corners, density } = prediction.heat;
    post({ kind: "solved", prediction }, [corners.buffer as ArrayBuffer, density.buffer as ArrayBuffer]);
  } catch (error) {
    post({ kind: "failed", failure: toFailure(error) });
  }
}
