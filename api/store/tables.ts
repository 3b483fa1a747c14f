/** The store's tables as they are now, and how they came to be: migrations in code, so that the bundle carries them. */
import { type Generated, type Kysely, type Migration, type Selectable, sql } from "kysely";
import type { JobKind, JobState } from "../contract/job.ts";

export interface Tables {
  readonly jobs: JobTable;
  readonly results: ResultTable;
}

interface JobTable {
  /** Order of submission; never given twice. */
  readonly seq: Generated<number>;
  /** What the outside calls it. */
  readonly id: string;
  readonly kind: JobKind;
  readonly name: string;
  readonly state: JobState;
  /** The document as accepted, completed; JSON text. */
  readonly document: string;
  /** Times are ISO 8601 in UTC. */
  readonly created_at: string;
  readonly started_at: string | null;
  readonly ended_at: string | null;
  /** Why it failed; JSON text. */
  readonly problem: string | null;
  /** The client's Idempotency-Key; no two jobs have the same. */
  readonly client_key: string | null;
  /** Digest of the request that came with it. */
  readonly fingerprint: string;
}

interface ResultTable {
  /** The job's; as primary key it makes a second result of the same job impossible. */
  readonly seq: number;
  /** JSON text. */
  readonly result: string;
  /** Compressed by gzip. */
  readonly heat: Buffer;
  /** Compressed by gzip. */
  readonly fields: Buffer;
}

export type JobRow = Omit<Selectable<JobTable>, "document" | "client_key" | "fingerprint">;

/** Marks a SQLite file as ours: "EMBT". */
export const APPLICATION_ID = 0x454d4254;

const first: Migration = {
  async up(db: Kysely<unknown>) {
    await db.schema
      .createTable("jobs")
      .addColumn("seq", "integer", (c) => c.primaryKey().autoIncrement())
      .addColumn("id", "text", (c) => c.notNull().unique())
      .addColumn("kind", "text", (c) => c.notNull())
      .addColumn("name", "text", (c) => c.notNull())
      .addColumn("state", "text", (c) =>
        c.notNull().check(sql`state in ('queued', 'running', 'done', 'failed', 'cancelled')`),
      )
      .addColumn("document", "text", (c) => c.notNull())
      .addColumn("created_at", "text", (c) => c.notNull())
      .addColumn("started_at", "text")
      .addColumn("ended_at", "text")
      .addColumn("problem", "text")
      .addColumn("client_key", "text", (c) => c.unique())
      .addColumn("fingerprint", "text", (c) => c.notNull())
      .execute();
    await db.schema.createIndex("jobs_by_state").on("jobs").columns(["state", "seq"]).execute();
    await db.schema
      .createTable("results")
      .addColumn("seq", "integer", (c) => c.primaryKey().references("jobs.seq").onDelete("cascade"))
      .addColumn("result", "text", (c) => c.notNull())
      .addColumn("heat", "blob", (c) => c.notNull())
      .addColumn("fields", "blob", (c) => c.notNull())
      .execute();
  },
};

/** Every migration by its name; run in the order of their names, each once. What was released never changes. */
export const migrations: Readonly<Record<string, Migration>> = { "001-jobs-and-results": first };
