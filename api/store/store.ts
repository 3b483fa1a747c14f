/** The store: the truth about jobs and results. Every change of state is one transaction, guarded by the state before it. */
import type { Kysely } from "kysely";
import type { JobKind, JobState } from "../contract/job.ts";
import type { Problem } from "../contract/problem.ts";
import type { Solved } from "../engine/engine.ts";
import { openDatabase } from "./open.ts";
import type { JobRow, Tables } from "./tables.ts";

/** A job about to be stored. */
export interface Draft {
  readonly id: string;
  readonly kind: JobKind;
  readonly name: string;
  /** JSON text. */
  readonly document: string;
  readonly clientKey: string | null;
  readonly fingerprint: string;
}

/** Which page of the list of jobs; newest first. */
export interface Page {
  readonly limit: number;
  /** Only jobs before this one in order of submission. */
  readonly before: number | null;
  readonly state: JobState | null;
}

/** A job that has been taken up. */
export interface Claimed {
  readonly job: JobRow;
  /** JSON text. */
  readonly document: string;
}

const columns = [
  "seq",
  "id",
  "kind",
  "name",
  "state",
  "created_at",
  "started_at",
  "ended_at",
  "problem",
] as const;

const now = (): string => new Date().toISOString();

export type Store = ReturnType<typeof storeOn>;

/** Opens the store of a data folder. @throws DoorError, see open.ts */
export async function openStore(folder: string): Promise<Store> {
  return storeOn(await openDatabase(folder));
}

function storeOn(db: Kysely<Tables>) {
  const find = (id: string) => db.selectFrom("jobs").where("id", "=", id);
  /** What job `id` left behind; no row before there is something. */
  const resultOf = (id: string) =>
    db.selectFrom("results").innerJoin("jobs", "jobs.seq", "results.seq").where("jobs.id", "=", id);

  return {
    /** Stores a new job, queued. Where its key is known already nothing is stored: the job that came with the key, and its fingerprint. */
    insert(draft: Draft): Promise<{ job: JobRow; fingerprint: string; created: boolean }> {
      return db.transaction().execute(async (trx) => {
        if (draft.clientKey !== null) {
          const known = await trx
            .selectFrom("jobs")
            .select([...columns, "fingerprint"])
            .where("client_key", "=", draft.clientKey)
            .executeTakeFirst();
          if (known !== undefined) {
            const { fingerprint, ...job } = known;
            return { job, fingerprint, created: false };
          }
        }
        const job = await trx
          .insertInto("jobs")
          .values({
            id: draft.id,
            kind: draft.kind,
            name: draft.name,
            state: "queued",
            document: draft.document,
            created_at: now(),
            client_key: draft.clientKey,
            fingerprint: draft.fingerprint,
          })
          .returning(columns)
          .executeTakeFirstOrThrow();
        return { job, fingerprint: draft.fingerprint, created: true };
      });
    },

    job: (id: string): Promise<JobRow | undefined> => find(id).select(columns).executeTakeFirst(),

    list({ limit, before, state }: Page): Promise<JobRow[]> {
      let query = db.selectFrom("jobs").select(columns).orderBy("seq", "desc").limit(limit);
      if (before !== null) query = query.where("seq", "<", before);
      if (state !== null) query = query.where("state", "=", state);
      return query.execute();
    },

    /** JSON text. */
    document: async (id: string): Promise<string | undefined> =>
      (await find(id).select("document").executeTakeFirst())?.document,

    /** JSON text. */
    result: async (id: string): Promise<string | undefined> =>
      (await resultOf(id).select("results.result").executeTakeFirst())?.result,

    /** Compressed by gzip. */
    heat: async (id: string): Promise<Buffer | undefined> =>
      (await resultOf(id).select("results.heat").executeTakeFirst())?.heat,

    /** Compressed by gzip. */
    fields: async (id: string): Promise<Buffer | undefined> =>
      (await resultOf(id).select("results.fields").executeTakeFirst())?.fields,

    /** Puts what an earlier run of the service left running back into the queue; how many these were. */
    async requeueRunning(): Promise<number> {
      const done = await db
        .updateTable("jobs")
        .set({ state: "queued", started_at: null })
        .where("state", "=", "running")
        .executeTakeFirst();
      return Number(done.numUpdatedRows);
    },

    /** Takes up the job that waits longest. */
    async claim(): Promise<Claimed | undefined> {
      const claimed = await db
        .updateTable("jobs")
        .set({ state: "running", started_at: now() })
        .where("seq", "=", (q) =>
          q.selectFrom("jobs").select("seq").where("state", "=", "queued").orderBy("seq").limit(1),
        )
        .returning([...columns, "document"])
        .executeTakeFirst();
      if (claimed === undefined) return undefined;
      const { document, ...job } = claimed;
      return { job, document };
    },

    /** Stores the result and ends the job in one; undefined, and nothing stored, when the job runs no more. */
    finish(seq: number, { result, heat, fields }: Solved): Promise<JobRow | undefined> {
      return db.transaction().execute(async (trx) => {
        const job = await trx
          .updateTable("jobs")
          .set({ state: "done", ended_at: now() })
          .where("seq", "=", seq)
          .where("state", "=", "running")
          .returning(columns)
          .executeTakeFirst();
        if (job === undefined) return undefined;
        await trx
          .insertInto("results")
          .values({ seq, result, heat: Buffer.from(heat), fields: Buffer.from(fields) })
          .execute();
        return job;
      });
    },

    /** Ends a running job as failed; undefined when it runs no more. */
    fail: (seq: number, problem: Problem): Promise<JobRow | undefined> =>
      db
        .updateTable("jobs")
        .set({ state: "failed", ended_at: now(), problem: JSON.stringify(problem) })
        .where("seq", "=", seq)
        .where("state", "=", "running")
        .returning(columns)
        .executeTakeFirst(),

    /** Ends a live job as cancelled; undefined when it is not live. */
    cancel: (id: string): Promise<JobRow | undefined> =>
      db
        .updateTable("jobs")
        .set({ state: "cancelled", ended_at: now() })
        .where("id", "=", id)
        .where("state", "in", ["queued", "running"])
        .returning(columns)
        .executeTakeFirst(),

    /** Removes an ended job with its result; false when there is none. */
    async remove(id: string): Promise<boolean> {
      const done = await db
        .deleteFrom("jobs")
        .where("id", "=", id)
        .where("state", "in", ["done", "failed", "cancelled"])
        .executeTakeFirst();
      return done.numDeletedRows > 0n;
    },

    close: (): Promise<void> => db.destroy(),
  };
}
