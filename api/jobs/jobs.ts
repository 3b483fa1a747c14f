/** What the doors do with jobs: submit, look, cancel, remove. */
import { ended, type Job, type JobList } from "../contract/job.ts";
import type { Desk } from "../engine/desk.ts";
import { DoorError } from "../errors.ts";
import type { Page, Store } from "../store/store.ts";
import type { JobRow } from "../store/tables.ts";
import type { JobEvents } from "./events.ts";
import type { Runner } from "./runner.ts";
import { wireJob } from "./wire.ts";

export type Jobs = ReturnType<typeof jobsOf>;

export function jobsOf(store: Store, desk: Desk, events: JobEvents, runner: Runner) {
  const wire = (row: JobRow): Job => wireJob(row, events);

  async function known(id: string): Promise<Job> {
    const row = await store.job(id);
    if (row === undefined) throw unknownJob();
    return wire(row);
  }

  /** What a job leaves behind. @throws DoorError 404, or 409 with the reason while there is nothing */
  async function leftBehind<T>(id: string, read: (id: string) => Promise<T | undefined>): Promise<T> {
    const found = await read(id);
    if (found !== undefined) return found;
    throw noResult(await known(id));
  }

  return {
    known,

    /**
     * Stores a job and sees that it runs. With a key that came before, the job that came with it.
     * @throws MappedError when request or document are not fit; DoorError 422 for a key that came with another request
     */
    async submit(text: string, clientKey: string | null): Promise<Job> {
      const draft = await desk.drafted({ text, clientKey });
      const { job, fingerprint, created } = await store.insert(draft);
      if (fingerprint !== draft.fingerprint) throw keyTaken();
      if (created) runner.wake();
      return wire(job);
    },

    async list(page: Page): Promise<JobList> {
      // One more than asked for tells whether there is another page.
      const rows = await store.list({ ...page, limit: page.limit + 1 });
      const shown = rows.slice(0, page.limit);
      const next = rows.length > page.limit ? String(shown.at(-1)!.seq) : null;
      return { jobs: shown.map(wire), next };
    },

    async document(id: string): Promise<string> {
      const found = await store.document(id);
      if (found === undefined) throw unknownJob();
      return found;
    },

    result: (id: string): Promise<string> => leftBehind(id, store.result),
    heat: (id: string): Promise<Buffer> => leftBehind(id, store.heat),
    fields: (id: string): Promise<Buffer> => leftBehind(id, store.fields),

    /** Cancels a live job, then the job; removes an ended one, then null. */
    async end(id: string): Promise<Job | null> {
      const cancelled = await store.cancel(id);
      if (cancelled === undefined) {
        if (!(await store.remove(id))) throw unknownJob();
        return null;
      }
      // Stored first: what the thread still brings is dropped, and a crash now does not bring the job back.
      runner.stop(id);
      const job = wire(cancelled);
      events.tell(job);
      return job;
    },
  };
}

function unknownJob(): DoorError {
  return new DoorError(404, "unknown", "There is no such job", "No job has this id, or it has been removed.");
}

function noResult(job: Job): DoorError {
  const why = {
    queued: "The job waits for its turn; its result comes later.",
    running: "The job is being worked on; its result comes later.",
    failed: "The job failed and left no result; its problem says why.",
    cancelled: "The job was cancelled and left no result.",
    done: "The job left nothing of this kind.",
  }[job.state];
  return new DoorError(409, ended(job.state) ? "no-result" : "not-yet", "There is no result", why);
}

function keyTaken(): DoorError {
  return new DoorError(
    422,
    "key-taken",
    "The Idempotency-Key was used before",
    "This Idempotency-Key came before with another request. Give every new request a key of its own.",
  );
}
