/** Rows of the store → jobs as the doors show them. */
import type { Job } from "../contract/job.ts";
import type { TaskProgress } from "../engine/engine.ts";
import type { JobRow } from "../store/tables.ts";
import type { JobEvents } from "./events.ts";

/** A job as the doors show it. */
export function wireJob(row: JobRow, events: JobEvents): Job {
  const live: TaskProgress = row.state === "running" ? events.progressOf(row.id) : { fraction: 0, stage: "" };
  return {
    id: row.id,
    kind: row.kind,
    name: row.name,
    state: row.state,
    progress: row.state === "done" ? 1 : live.fraction,
    stage: live.stage,
    firstDigits: live.firstDigits ?? null,
    createdAt: row.created_at,
    startedAt: row.started_at,
    endedAt: row.ended_at,
    problem: row.problem === null ? null : JSON.parse(row.problem),
  };
}
