/**
 * What happens to jobs, for whoever listens. Every event carries the whole job, so that a listener that missed some is up to date
 * with the next: nothing has to be kept but the newest progress of live jobs.
 */
import { randomBytes } from "node:crypto";
import { ended, type Job, type JobEvent, type JobState } from "../contract/job.ts";
import type { TaskProgress } from "../engine/engine.ts";

/** Name of the event that tells this state. */
export const eventOf = (state: JobState): JobEvent =>
  state === "queued" || state === "running" ? "progress" : state;

/** Id of a job's last event: the same in every run of the service, so that whoever comes back with it is known to have it all. */
export const lastEventId = "end";

export interface Notice {
  /** What `Last-Event-ID` will say. */
  readonly id: string;
  readonly job: Job;
}

interface Live {
  readonly progress: TaskProgress;
  readonly id: string;
}

export class JobEvents {
  /** Ids of another run of the service never look like ours. */
  private readonly run = randomBytes(6).toString("hex");
  private told = 0;
  private readonly live = new Map<string, Live>();
  private readonly listeners = new Map<string, Set<(notice: Notice | null) => void>>();

  /** The newest progress of a live job. */
  progressOf(jobId: string): TaskProgress {
    return this.live.get(jobId)?.progress ?? { fraction: 0, stage: "" };
  }

  /** Id of the newest event of a live job: of its waiting, before there was another in this run. */
  newestId(jobId: string): string {
    return this.live.get(jobId)?.id ?? `${this.run}.0`;
  }

  /** Notes how far a job is; then say so by `tell`. */
  note(jobId: string, progress: TaskProgress): void {
    this.live.set(jobId, { progress, id: this.nextId() });
  }

  /** Tells a job's listeners how it stands. */
  tell(job: Job): void {
    const over = ended(job.state);
    if (over) this.live.delete(job.id);
    else if (!this.live.has(job.id)) this.note(job.id, { fraction: 0, stage: "" });
    const notice = { id: over ? lastEventId : this.newestId(job.id), job };
    for (const listener of this.listeners.get(job.id) ?? []) listener(notice);
  }

  /** Forgets the progress of a job that is to start anew. */
  forget(jobId: string): void {
    this.live.delete(jobId);
  }

  /** Calls `listener` with every event of a job, and with null when the service ends; returns how to stop that. */
  listen(jobId: string, listener: (notice: Notice | null) => void): () => void {
    const set = this.listeners.get(jobId) ?? new Set();
    this.listeners.set(jobId, set.add(listener));
    return () => {
      set.delete(listener);
      if (set.size === 0 && this.listeners.get(jobId) === set) this.listeners.delete(jobId);
    };
  }

  /** Ends every listener. */
  close(): void {
    for (const set of [...this.listeners.values()]) for (const listener of [...set]) listener(null);
  }

  private nextId(): string {
    this.told += 1;
    return `${this.run}.${this.told}`;
  }
}
