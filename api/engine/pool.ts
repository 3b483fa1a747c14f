/** The engine of one machine: threads that stay alive, and so warm, between tasks. */
import { fileURLToPath } from "node:url";
import { Piscina } from "piscina";
import { toFailure } from "../errors.ts";
import type { Engine, Hooks, Outcome, Task, TaskProgress } from "./engine.ts";

export interface PoolOptions {
  /** The bundle of pooled.ts. */
  readonly entry: URL;
  readonly threads: number;
  /** Most JavaScript heap of a thread, MB. */
  readonly heapMb: number;
  /** A thread that has not stopped by itself after this long is ended, ms. */
  readonly graceMs: number;
}

/** What goes to a thread. */
export interface Order {
  readonly task: Task;
  /** Told with every progress. */
  readonly run: number;
  /** One number in shared memory; 1 once the task is to stop. */
  readonly stop: Int32Array;
}

/** What a thread says while it works. */
export interface Report {
  readonly run: number;
  readonly progress: TaskProgress;
}

/** Solved once a thread, so that what runs hot is compiled before somebody waits for it. Small: compiling is most of it. */
const warmUpTask: Task = {
  kind: "solve",
  document: {
    coil: {
      conductor: { section: "roundTube", outsideDiameterMm: 8, wallMm: 1, material: "copper" },
      winding: { form: "helix", boreDiameterMm: 42, turns: 1 },
    },
    parts: [
      {
        name: "warm-up",
        shape: "cylinder",
        diameterMm: 28,
        lengthMm: 40,
        material: { resistivityOhmM: 3e-7 },
      },
    ],
    drive: { frequencyHz: 8000, currentA: 100 },
    accuracyPercent: 10,
  },
};

const flag = (): Int32Array => new Int32Array(new SharedArrayBuffer(4));

/** Starts the threads. */
export function threadPool({ entry, threads, heapMb, graceMs }: PoolOptions): Engine {
  const pool = new Piscina<Order, Outcome>({
    filename: fileURLToPath(entry),
    minThreads: threads,
    maxThreads: threads,
    idleTimeout: Number.POSITIVE_INFINITY,
    resourceLimits: { maxOldGenerationSizeMb: heapMb },
    // A thread has to listen for nothing while it works, and is woken without a trip through its event loop.
    atomics: "sync",
    recordTiming: false,
  });
  const listeners = new Map<number, Hooks["onProgress"]>();
  pool.on("message", ({ run, progress }: Report) => listeners.get(run)?.(progress));
  // A thread that dies while idle is replaced by the pool; a task that dies with its thread is told by its own promise.
  pool.on("error", () => {});
  let runs = 0;
  /** Stops warming up: it gives way to the first task. */
  let warming = flag();

  async function run(task: Task, { onProgress, signal }: Hooks): Promise<Outcome> {
    if (signal.aborted) return { state: "stopped" };
    Atomics.store(warming, 0, 1);
    const order: Order = { task, run: ++runs, stop: flag() };
    const end = new AbortController();
    let timer: NodeJS.Timeout | undefined;
    const stop = (): void => {
      Atomics.store(order.stop, 0, 1);
      timer = setTimeout(() => end.abort(), graceMs);
    };
    signal.addEventListener("abort", stop, { once: true });
    listeners.set(order.run, onProgress);
    try {
      return await pool.run(order, { signal: end.signal });
    } catch (error) {
      return signal.aborted ? { state: "stopped" } : { state: "failed", problem: toFailure(error).problem };
    } finally {
      listeners.delete(order.run);
      signal.removeEventListener("abort", stop);
      clearTimeout(timer);
    }
  }

  return {
    slots: threads,
    run,
    async warmUp() {
      warming = flag();
      const order: Order = { task: warmUpTask, run: 0, stop: warming };
      await Promise.allSettled(Array.from({ length: threads }, () => pool.run(order)));
    },
    close: () => pool.destroy(),
  };
}
