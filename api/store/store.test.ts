/** The store: who may open it, what it refuses to touch, and that a job is ended once. */
import { readFileSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import Database from "better-sqlite3";
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { temporaryFolder } from "../fixtures.ts";
import { storeFile } from "./open.ts";
import { type Draft, openStore, type Store } from "./store.ts";

let folder: ReturnType<typeof temporaryFolder>;
beforeEach(() => {
  folder = temporaryFolder();
});
afterEach(() => folder.remove());

const draft = (id: string, clientKey: string | null = null): Draft => ({
  id,
  kind: "solve",
  name: id,
  document: "{}",
  clientKey,
  fingerprint: `print of ${id}`,
});
const solved = (result: string) => ({ result, heat: Uint8Array.of(1, 2), fields: Uint8Array.of(3) });
const problem = { type: "urn:x", title: "No", status: 500, detail: "no", errors: [] };

/** Runs with an open store, and closes it. */
async function withStore<T>(act: (store: Store) => Promise<T>): Promise<T> {
  const store = await openStore(folder.path);
  try {
    return await act(store);
  } finally {
    await store.close();
  }
}

describe("jobs", () => {
  it("are taken up in the order they came, each once", () =>
    withStore(async (store) => {
      for (const id of ["a", "b", "c"]) await store.insert(draft(id));
      const taken = await Promise.all([store.claim(), store.claim(), store.claim(), store.claim()]);
      expect(taken.map((claimed) => claimed?.job.id)).toEqual(["a", "b", "c", undefined]);
    }));

  it("end once: a second result, a failure or a cancellation after the end changes nothing", () =>
    withStore(async (store) => {
      await store.insert(draft("a"));
      const { seq } = (await store.claim())!.job;
      expect(await store.finish(seq, solved("first"))).toMatchObject({ state: "done" });
      expect(await store.finish(seq, solved("second"))).toBeUndefined();
      expect(await store.fail(seq, problem)).toBeUndefined();
      expect(await store.cancel("a")).toBeUndefined();
      expect(await store.result("a")).toBe("first");
      expect(await store.heat("a")).toEqual(Buffer.of(1, 2));
    }));

  it("that were cancelled while running keep no result", () =>
    withStore(async (store) => {
      await store.insert(draft("a"));
      const { seq } = (await store.claim())!.job;
      await store.cancel("a");
      expect(await store.finish(seq, solved("late"))).toBeUndefined();
      expect(await store.result("a")).toBeUndefined();
    }));

  it("keep what they are when the result cannot be stored beside the end", () =>
    withStore(async (store) => {
      await store.insert(draft("a"));
      const { seq } = (await store.claim())!.job;
      // A result without text breaks a rule of its table, after the state has been set in the same transaction.
      await expect(store.finish(seq, { ...solved(""), result: null as never })).rejects.toThrow(/NOT NULL/);
      expect((await store.job("a"))!.state).toBe("running");
      expect(await store.finish(seq, solved("now"))).toMatchObject({ state: "done" });
    }));

  it("that were running are queued again after a new start, in their old place", async () => {
    await withStore(async (store) => {
      for (const id of ["a", "b"]) await store.insert(draft(id));
      await store.claim();
    });
    await withStore(async (store) => {
      expect(await store.requeueRunning()).toBe(1);
      expect((await store.claim())!.job.id).toBe("a");
    });
  });

  it("with one key are one job", () =>
    withStore(async (store) => {
      const first = await store.insert(draft("a", "key"));
      const again = await store.insert(draft("b", "key"));
      expect([first.created, again.created, again.job.id]).toEqual([true, false, "a"]);
      expect(again.fingerprint).toBe("print of a");
      expect(await store.job("b")).toBeUndefined();
    }));

  it("are removed with their results", () =>
    withStore(async (store) => {
      await store.insert(draft("a"));
      expect(await store.remove("a")).toBe(false);
      await store.finish((await store.claim())!.job.seq, solved("x"));
      expect(await store.remove("a")).toBe(true);
      expect(await store.result("a")).toBeUndefined();
    }));
});

describe("opening", () => {
  const file = (): string => join(folder.path, storeFile);
  /** Opening fails in these words, and leaves the file as it is. */
  async function expectUntouched(words: RegExp): Promise<void> {
    const before = readFileSync(file());
    await expect(openStore(folder.path)).rejects.toThrow(words);
    expect(readFileSync(file()).equals(before)).toBe(true);
  }

  it("is refused to a second service, and allowed after the first has closed", async () => {
    await withStore(() =>
      expect(openStore(folder.path)).rejects.toThrow(/Another emberturn service is using/),
    );
    await withStore((store) => store.insert(draft("a")));
  });

  it("leaves alone what is no store", async () => {
    writeFileSync(file(), "meeting notes ".repeat(1000));
    await expectUntouched(/is damaged .*Nothing was changed/);
  });

  it("leaves another program's database alone", async () => {
    const other = new Database(file());
    other.exec("create table recipes (name text)");
    other.close();
    await expectUntouched(/belongs to another program/);
  });

  it("leaves a damaged store alone", async () => {
    await withStore(async (store) => {
      for (let k = 0; k < 200; k++) await store.insert(draft(`job ${k} ${"x".repeat(200)}`));
    });
    const bytes = readFileSync(file());
    bytes.fill(0xa5, 8192, 24_576);
    writeFileSync(file(), bytes);
    await expectUntouched(/is damaged/);
  });

  it("does not take a store that has lost its content for a new one", async () => {
    writeFileSync(file(), "");
    writeFileSync(`${file()}-wal`, "what was written last");
    await expectUntouched(/is damaged/);
    expect(readFileSync(`${file()}-wal`, "utf8")).toBe("what was written last");
  });

  it("leaves the store of a newer emberturn alone", async () => {
    await withStore((store) => store.insert(draft("a")));
    const newer = new Database(file());
    newer.exec("insert into kysely_migration values ('999-later', '2030-01-01')");
    newer.pragma("wal_checkpoint(truncate)");
    newer.close();
    await expectUntouched(/written by a newer emberturn/);
  });

  it("says so when the folder cannot be one", async () => {
    writeFileSync(join(folder.path, "file"), "");
    await expect(openStore(join(folder.path, "file"))).rejects.toThrow(/cannot be written/);
  });
});
