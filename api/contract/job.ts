/** The wire form of jobs: what is asked for, how it stands, and what its events carry. */
import * as z from "zod";
import { ProblemSchema } from "./problem.ts";

export const JobKindSchema = z.enum(["solve"]);
export const JobStateSchema = z.enum(["queued", "running", "done", "failed", "cancelled"]);

/** Body of `POST /v1/jobs`; the document is checked by the kind's own schema. */
export const JobRequestSchema = z.strictObject({ kind: JobKindSchema, document: z.unknown() });

/** R and L of the grids solved so far, before there is a result; leads included. */
const FirstDigitsSchema = z.object({
  emptyOhm: z.number(),
  emptyH: z.number(),
  /** null without a part. */
  loadedOhm: z.number().nullable(),
  loadedH: z.number().nullable(),
  /** Largest bar of these and of the parts' powers; null after the first grid, which is good to about 1 % and tells no bar. */
  withinPercent: z.number().nullable(),
});

/** A job as it stands; times are ISO 8601 in UTC. */
export const JobSchema = z.object({
  id: z.string(),
  kind: JobKindSchema,
  /** The document's name. */
  name: z.string(),
  state: JobStateSchema,
  /** 0 … 1 of the whole, as far as can be told. */
  progress: z.number().min(0).max(1),
  /** What is being done, in words; "" before it starts. */
  stage: z.string(),
  /** While running, once a grid is solved; else null. */
  firstDigits: FirstDigitsSchema.nullable(),
  createdAt: z.iso.datetime(),
  startedAt: z.iso.datetime().nullable(),
  endedAt: z.iso.datetime().nullable(),
  /** Why it failed; null in every other state. */
  problem: ProblemSchema.nullable(),
});

/** Answer of `GET /v1/jobs`: newest first; `next` asks for the page after this one (`?after=`), null at the end. */
export const JobListSchema = z.object({ jobs: z.array(JobSchema), next: z.string().nullable() });

/** Names of the events of `GET /v1/jobs/{id}/events`; each carries the job as it stands. The last three end the stream. */
export const jobEvents = ["progress", "done", "failed", "cancelled"] as const;

export type JobKind = z.infer<typeof JobKindSchema>;
export type JobState = z.infer<typeof JobStateSchema>;
export type Job = z.infer<typeof JobSchema>;
export type JobList = z.infer<typeof JobListSchema>;
export type JobEvent = (typeof jobEvents)[number];

/** Whether a job has come to its end. */
export const ended = (state: JobState): boolean => state !== "queued" && state !== "running";
