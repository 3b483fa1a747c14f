/** The pool of threads against threads that misbehave; stand-ins, so that each does so for certain. */
import { writeFileSync } from "node:fs";
import { join } from "node:path";
import { pathToFileURL } from "node:url";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { bundleFile, quickDesign, temporaryFolder } from "../fixtures.ts";
import type { Engine, Outcome } from "./engine.ts";
import { threadPool } from "./pool.ts";

const standIn = `
import { parentPort } from "node:worker_threads";
export default function perform({ task, run, stop }) {
  parentPort.postMessage({ run, progress: { fraction: 0.5, stage: task.document } });
  if (task.document === "obeys") {
    while (Atomics.load(stop, 0) === 0);
    return { state: "stopped" };
  }
  while (task.document === "deaf");
  if (task.document === "throws") throw new TypeError("a slip of ours");
  if (task.document === "exits") process.exit(3);
  const hoard = [];
  while (task.document === "hoards") hoard.push(Array.from({ length: 1e5 }, (_, k) => ({ k })));
  return { state: "done", result: "{}", heat: new Uint8Array(1), fields: new Uint8Array(1) };
}
`;

const graceMs = 300;
const folder = temporaryFolder();
let engine: Engine;
beforeAll(() => {
  const file = join(folder.path, "stand-in.mjs");
  writeFileSync(file, standIn);
  engine = threadPool({ entry: pathToFileURL(file), threads: 1, heapMb: 64, graceMs });
});
afterAll(async () => {
  await engine.close();
  folder.remove();
});

const run = (document: string, signal = new AbortController().signal): Promise<Outcome> =>
  engine.run({ kind: "solve", document }, { signal, onProgress: () => {} });

/** Runs until the thread has spoken, then aborts; how it ended, and how long after. */
async function aborted(document: string): Promise<{ outcome: Outcome; ms: number }> {
  const abort = new AbortController();
  let asked = 0;
  const outcome = await engine.run(
    { kind: "solve", document },
    {
      signal: abort.signal,
      onProgress: () => {
        asked = performance.now();
        abort.abort();
      },
    },
  );
  return { outcome, ms: performance.now() - asked };
}

/** The pool has a working thread. */
const expectAlive = async (): Promise<void> => expect((await run("well")).state).toBe("done");

describe("a thread", () => {
  it("that looks at the flag stops at once and lives on", async () => {
    const { outcome, ms } = await aborted("obeys");
    expect(outcome).toEqual({ state: "stopped" });
    expect(ms).toBeLessThan(graceMs);
    await expectAlive();
  });

  it("that is deaf is ended after the grace, and replaced", async () => {
    const { outcome, ms } = await aborted("deaf");
    expect(outcome).toEqual({ state: "stopped" });
    expect(ms).toBeGreaterThan(graceMs - 50);
    expect(ms).toBeLessThan(2000);
    await expectAlive();
  });

  it.each([
    ["throws", "urn:emberturn:problem:internal", /our fault.*a slip of ours/],
    ["hoards", "urn:emberturn:problem:memory", /not enough memory/],
    ["exits", "urn:emberturn:problem:internal", /our fault/],
  ])("that %s fails its task in words, and the pool lives on", async (document, type, words) => {
    const outcome = await run(document);
    expect(outcome).toMatchObject({ state: "failed", problem: { type, status: 500 } });
    if (outcome.state === "failed") expect(outcome.problem.detail).toMatch(words);
    await expectAlive();
  });

  it("is not asked for what was given up before it began", async () => {
    expect(await run("deaf", AbortSignal.abort())).toEqual({ state: "stopped" });
    await expectAlive();
  });
});

describe("warming up", () => {
  it("is solved by the real thread, and gives way to the first task", async () => {
    const real = threadPool({
      entry: new URL("pooled.mjs", pathToFileURL(bundleFile())),
      threads: 1,
      heapMb: 512,
      graceMs,
    });
    try {
      const begun = performance.now();
      await real.warmUp();
      const undisturbed = performance.now() - begun;
      const again = real.warmUp();
      const hooks = { signal: new AbortController().signal, onProgress: () => {} };
      const outcome = await real.run({ kind: "solve", document: quickDesign() }, hooks);
      expect(outcome.state).toBe("done");
      await again;
      expect(undisturbed).toBeGreaterThan(50);
    } finally {
      await real.close();
    }
  });
});
