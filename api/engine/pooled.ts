/** What a thread of the pool runs: one order in, progress and one outcome out. The thread lives on. */
import { parentPort } from "node:worker_threads";
import { gzipSync } from "node:zlib";
import { checkDesign } from "../../meshes/check.ts";
import { Cancelled, type Hooks, type Prediction, predict } from "../../meshes/predict.ts";
import { encodeHeat } from "../contract/heat.ts";
import { encodeFields } from "../contract/stored-fields.ts";
import { toFailure } from "../errors.ts";
import type { Outcome } from "./engine.ts";
import { demandNumbers } from "./finite.ts";
import type { Order, Report } from "./pool.ts";

export { drafted } from "../jobs/request.ts";
export { formed } from "./formed.ts";

/** Progress is told no oftener than this, ms; a new stage at once. */
const progressMs = 100;

/** Runs an order. */
export default function perform(order: Order): Outcome {
  try {
    return packed(predict(checkDesign(order.task.document), hooksOf(order)));
  } catch (error) {
    if (error instanceof Cancelled) return { state: "stopped" };
    return { state: "failed", problem: toFailure(error).problem };
  }
}

function hooksOf({ run, stop }: Order): Hooks {
  let last = Number.NEGATIVE_INFINITY;
  let lastStage = "";
  return {
    fields: true,
    progress(progress) {
      const now = performance.now();
      if (now - last < progressMs && progress.stage === lastStage) return;
      last = now;
      lastStage = progress.stage;
      const report: Report = { run, progress };
      parentPort?.postMessage(report);
    },
    signal: {
      get aborted() {
        return Atomics.load(stop, 0) === 1;
      },
    },
    peakMemoryBytes: () => 1024 * process.resourceUsage().maxRSS,
  };
}

/** Compressed here and not in the service's own thread, which has requests to answer. */
function packed({ result, heat, fields }: Prediction): Outcome {
  demandNumbers(result);
  if (fields === undefined) throw new Error("the solver told no fields");
  return {
    state: "done",
    result: JSON.stringify(result),
    heat: zipped(encodeHeat(heat)),
    fields: zipped(encodeFields(fields)),
  };
}

/** Level 1: a third of the size goes, and no higher level takes more than another hundredth. */
const zipped = (bytes: Uint8Array): Uint8Array => gzipSync(bytes, { level: 1 });
