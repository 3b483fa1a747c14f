/**
 * What solves jobs: one interface for the local pool of threads, and for whatever may take its place. Everything that crosses it
 * is plain data, so that the other side may be another thread or another machine.
 */
import type { FirstDigits } from "../../meshes/first-digits.ts";
import type { JobKind } from "../contract/job.ts";
import type { Problem } from "../contract/problem.ts";

/** One piece of work; `document` is as accepted, completed. */
export interface Task {
  readonly kind: JobKind;
  readonly document: unknown;
}

/** How far a task has come. */
export interface TaskProgress {
  /** 0 … 1 of the whole. */
  readonly fraction: number;
  readonly stage: string;
  readonly firstDigits?: FirstDigits;
}

/** What a solve leaves behind, in the form it is stored in. */
export interface Solved {
  /** The result document, JSON text. */
  readonly result: string;
  /** The heat file (api/contract/heat.ts), compressed by gzip. */
  readonly heat: Uint8Array;
  /** The fields' file (api/contract/stored-fields.ts), compressed by gzip. */
  readonly fields: Uint8Array;
}

/** How a task ended. Nothing is thrown for a task: what it could not do is told. */
export type Outcome =
  | ({ readonly state: "done" } & Solved)
  | { readonly state: "failed"; readonly problem: Problem }
  /** Stopped because the signal was aborted. */
  | { readonly state: "stopped" };

export interface Hooks {
  /** Called now and then, at most about ten times a second. */
  readonly onProgress: (progress: TaskProgress) => void;
  /** Once aborted, the work stops within two seconds, and the task ends as "stopped" unless it was done just then. */
  readonly signal: AbortSignal;
}

export interface Engine {
  /** Tasks worked on at the same time; more may be given and wait. */
  readonly slots: number;
  run(task: Task, hooks: Hooks): Promise<Outcome>;
  /** Makes the first task about as quick as the later ones; gives way to it when it comes earlier. */
  warmUp(): Promise<void>;
  /** Ends all threads; what still runs is given up. */
  close(): Promise<void>;
}
