/** Keeps the engine busy with what waits in the store, in order of submission, and writes down how it ends. */
import type { Logger } from "pino";
import { ended } from "../contract/job.ts";
import type { Engine, Outcome, Task } from "../engine/engine.ts";
import type { Claimed, Store } from "../store/store.ts";
import type { JobRow } from "../store/tables.ts";
import type { JobEvents } from "./events.ts";
import { wireJob } from "./wire.ts";

/** The store is asked again after this long when it could not be written, ms. */
const retryMs = 500;

export interface Runner {
  /** Something new waits. */
  wake(): void;
  /** Stops the work on a job, if it is being worked on. */
  stop(jobId: string): void;
  /** Takes up nothing more, stops what runs and leaves it to run again; resolves when all has stopped. */
  close(): Promise<void>;
}

export function startRunner(store: Store, engine: Engine, events: JobEvents, log: Logger): Runner {
  const running = new Map<string, { readonly abort: AbortController; readonly end: Promise<void> }>();
  const closing = new AbortController();
  let filling = Promise.resolve();

  /** Takes up jobs while there are slots and jobs. */
  async function fill(): Promise<void> {
    while (running.size < engine.slots && !closing.signal.aborted) {
      const claimed = await attempt("take up the next job", () => store.claim());
      if (claimed === undefined) return;
      start(claimed);
    }
  }

  /** One after the other, so that no job overtakes another and no slot is filled twice. */
  function wake(): void {
    filling = filling.then(fill);
  }

  function start({ job, document }: Claimed): void {
    const abort = new AbortController();
    const end = work(job, document, abort.signal).finally(() => {
      running.delete(job.id);
      wake();
    });
    running.set(job.id, { abort, end });
    if (closing.signal.aborted) abort.abort();
  }

  async function work(row: JobRow, document: string, signal: AbortSignal): Promise<void> {
    const id = row.id;
    // Cancelled in the moment between being taken up and being known here: nobody else would stop it.
    const current = await attempt("read a job", () => store.job(id));
    if (current?.state !== "running" || signal.aborted) return;
    log.info({ job: id, name: row.name }, "job started");
    events.forget(id);
    events.tell(wireJob(row, events));
    const task: Task = { kind: row.kind, document: JSON.parse(document) };
    const outcome = await engine.run(task, {
      signal,
      onProgress(progress) {
        if (signal.aborted) return;
        events.note(id, progress);
        events.tell(wireJob(row, events));
      },
    });
    if (outcome.state === "stopped") {
      events.forget(id);
      log.info({ job: id }, "job stopped");
    } else {
      await settle(row, outcome);
    }
  }

  /** Writes the end down, however long the store cannot be written; a job that was cancelled meanwhile stays so. */
  async function settle(row: JobRow, outcome: Exclude<Outcome, { state: "stopped" }>): Promise<void> {
    const over = await attempt(`write down the end of job ${row.id}`, () =>
      outcome.state === "done" ? store.finish(row.seq, outcome) : store.fail(row.seq, outcome.problem),
    );
    if (over === undefined) return;
    const job = wireJob(over, events);
    if (job.state === "failed") log.warn({ job: job.id, problem: job.problem }, "job failed");
    else log.info({ job: job.id }, "job done");
    if (ended(job.state)) events.tell(job);
  }

  /** Tries until it works or the service ends; undefined then, and when there was nothing. */
  async function attempt<T>(what: string, act: () => Promise<T | undefined>): Promise<T | undefined> {
    for (;;) {
      try {
        return await act();
      } catch (error) {
        log.error({ err: error }, `could not ${what}; trying again`);
        if (closing.signal.aborted) return undefined;
        await new Promise((resolve) => setTimeout(resolve, retryMs));
      }
    }
  }

  return {
    wake,
    stop: (jobId) => running.get(jobId)?.abort.abort(),
    async close() {
      closing.abort();
      for (const { abort } of running.values()) abort.abort();
      await filling;
      await Promise.all([...running.values()].map(({ end }) => end));
    },
  };
}
