/** `emberturn serve` as a process: what it prints, what it refuses, how it ends. */
import { type ChildProcess, spawn } from "node:child_process";
import { once } from "node:events";
import { writeFileSync } from "node:fs";
import { join } from "node:path";
import { afterAll, describe, expect, it } from "vitest";
import { JobListSchema } from "../contract/job.ts";
import { bundleFile, longDesign, quickDesign, temporaryFolder } from "../fixtures.ts";

const folder = temporaryFolder();
const bundle = bundleFile();
const children: ChildProcess[] = [];
afterAll(() => {
  for (const child of children) child.kill("SIGKILL");
  folder.remove();
});

/** A started service: what it has said once `words` came, or all when it has ended. */
async function serve(args: readonly string[], words = /emberturn is at \S+/) {
  const child = spawn(process.execPath, [bundle, "serve", "--port", "0", ...args], { stdio: "pipe" });
  children.push(child);
  const said = { stdout: "", stderr: "" };
  const exit = once(child, "close");
  await new Promise<void>((resolve) => {
    const hear = (stream: "stdout" | "stderr") => (text: unknown) => {
      said[stream] += String(text);
      if (words.test(said[stream])) resolve();
    };
    child.stdout.on("data", hear("stdout"));
    child.stderr.on("data", hear("stderr"));
    child.on("close", () => resolve());
  });
  const address = /http:\S+/.exec(said.stdout)?.[0] ?? "";
  return { child, exit, said, address };
}

const data = (name: string): string[] => ["--data", join(folder.path, name)];

describe("emberturn serve", () => {
  it("solves the demo at the first start only, and prints its figures and the address at every start", async () => {
    const file = join(folder.path, "demo.json");
    writeFileSync(file, JSON.stringify(quickDesign("Tarnhollow: shown first")));
    const seen: string[] = [];
    for (const _ of [1, 2]) {
      const { child, exit, said, address } = await serve([...data("demo"), "--demo", file]);
      const [table, rest] = said.stdout.split("emberturn is at");
      expect(table).toMatch(
        /^Tarnhollow: shown first\n[\s\S]*resistance R[\s\S]*inductance L[\s\S]*total[\s\S]*efficiency/,
      );
      expect(table).not.toContain("TURNS");
      expect(rest).toMatch(/^ http:\/\/127\.0\.0\.1:\d+\/\n$/);
      expect(said.stderr).toBe("");
      const { jobs } = JobListSchema.parse(await (await fetch(new URL("/v1/jobs", address))).json());
      expect(jobs).toMatchObject([{ name: "Tarnhollow: shown first", state: "done" }]);
      seen.push(jobs[0]!.id);
      child.kill("SIGINT");
      expect(await exit).toEqual([0, null]);
    }
    expect(seen[0]).toBe(seen[1]);
  });

  it("ends in good order within seconds, with work under way and a stream open", async () => {
    const { child, exit, address } = await serve(data("busy"));
    const post = await fetch(new URL("/v1/jobs", address), {
      method: "POST",
      headers: { "Content-Type": "application/json" },
      body: JSON.stringify({ kind: "solve", document: longDesign() }),
    });
    const stream = await fetch(new URL(`${post.headers.get("location")}/events`, address));
    const text = stream.text();
    const asked = performance.now();
    child.kill("SIGTERM");
    expect(await exit).toEqual([0, null]);
    expect(performance.now() - asked).toBeLessThan(4000);
    expect(await text).toContain("event:progress");
  });
});

describe("refuses in words", () => {
  it("a folder that another service uses, and a port that is taken", async () => {
    const first = await serve(data("one"));
    const again = await serve(data("one"));
    expect(await again.exit).toEqual([1, null]);
    expect(again.said.stderr).toMatch(/^The service could not start: Another emberturn service is using/);
    const taken = await serve([...data("two"), "--port", new URL(first.address).port]);
    expect(await taken.exit).toEqual([1, null]);
    expect(taken.said.stderr).toMatch(/^The service could not start: Port \d+ of 127\.0\.0\.1 is taken/);
  });

  it.each([
    [["--host", "0.0.0.0"], /not this machine alone/],
    [["--demo", "nowhere.json"], /there is no file nowhere\.json/],
    [["--data", join(bundle, "inside")], /cannot be written/],
  ])("%j", async (args, words) => {
    const { exit, said } = await serve([...data("three"), ...args]);
    const [status] = await exit;
    expect(status === 1 || status === 2).toBe(true);
    expect(said.stderr).toMatch(words);
    expect(said.stderr).not.toMatch(/\n\s+at /);
    expect(said.stdout).toBe("");
  });
});
