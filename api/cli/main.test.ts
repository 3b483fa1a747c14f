/** The real command, as a user starts it: bundle, threads, pipes and signals included. */

import { type ChildProcess, spawn } from "node:child_process";
import { mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { fileURLToPath } from "node:url";
import { afterAll, describe, expect, it } from "vitest";
import { ResultSchema } from "../../meshes/result.ts";
import { version } from "../../package.json";

const root = fileURLToPath(new URL("../..", import.meta.url));
const folder = mkdtempSync(join(tmpdir(), "emberturn-cli-"));
afterAll(() => rmSync(folder, { recursive: true, force: true }));

interface Ended {
  readonly status: number | null;
  readonly stdout: string;
  readonly stderr: string;
}

function start(args: readonly string[]): ChildProcess {
  return spawn(process.execPath, [".ci/emberturn.mjs", ...args], { cwd: root, stdio: "pipe" });
}

function ended(child: ChildProcess): Promise<Ended> {
  const said = { stdout: "", stderr: "" };
  child.stdout?.on("data", (text) => {
    said.stdout += String(text);
  });
  child.stderr?.on("data", (text) => {
    said.stderr += String(text);
  });
  return new Promise((resolve) => child.on("close", (status) => resolve({ status, ...said })));
}

/** Runs the command to its end, with `input` on its standard input. */
function run(args: readonly string[], input = ""): Promise<Ended> {
  const child = start(args);
  child.stdin?.on("error", () => {});
  child.stdin?.end(input);
  return ended(child);
}

const demo = JSON.parse(readFileSync(join(root, "meshes/examples/demo.json"), "utf8")) as Record<
  string,
  unknown
>;
const quick = JSON.stringify({ ...demo, accuracyPercent: 2 });

function file(name: string, content: string | Uint8Array): string {
  const path = join(folder, name);
  writeFileSync(path, content);
  return path;
}

/** What every refusal keeps to. */
function expectRefused(end: Ended): void {
  expect(end.status).toBe(2);
  expect(end.stdout).toBe("");
  expect(end.stderr).not.toMatch(/\n\s+at /);
}

describe("emberturn solve", () => {
  it("prints the result document and nothing else with --json, from standard input, the same on every run", async () => {
    const first = await run(["solve", "-", "--json"], quick);
    expect(first.status).toBe(0);
    const result = ResultSchema.parse(JSON.parse(first.stdout));
    expect(result.design.name).toBe(demo["name"]);
    const again = ResultSchema.parse(JSON.parse((await run(["solve", "--json", "-"], quick)).stdout));
    const steady = ({ numerics, ...rest }: typeof result) => ({
      ...rest,
      numerics: { ...numerics, seconds: 0, peakMemoryBytes: 0 },
    });
    expect(steady(again)).toEqual(steady(result));
  });

  it("prints the table and writes the picture", async () => {
    const picture = join(folder, "heat.svg");
    const { status, stdout } = await run(["solve", file("demo.json", quick), "--picture", picture]);
    expect(status).toBe(0);
    expect(stdout).toMatch(/resistance R +[\d.]+ +± [\d.]+/);
    expect(stdout).toContain(`Heat picture: ${picture}`);
    const svg = readFileSync(picture, "utf8");
    expect(svg).toMatch(/^<svg /);
    expect(svg.length).toBeLessThan(1e6);
    expect(svg.match(/<path d="M[^"]+" fill="#[0-9a-f]{6}" stroke=/g)!.length).toBeGreaterThan(10);
  });

  it("stops at once with status 130 when interrupted", async () => {
    const child = start(["solve", "-"]);
    child.stdin?.end(JSON.stringify({ ...demo, accuracyPercent: 0.01 }));
    const end = ended(child);
    // The first words of progress tell that the solve is under way.
    await new Promise((resolve) => child.stderr?.once("data", resolve));
    const asked = Date.now();
    child.kill("SIGINT");
    expect((await end).status).toBe(130);
    expect(Date.now() - asked).toBeLessThan(1000);
  });
});

describe("emberturn materials", () => {
  it("prints the library for people, and as a list with --json", async () => {
    const table = await run(["materials"]);
    expect(table).toMatchObject({ status: 0, stderr: "" });
    expect(table.stdout).toMatch(/^ {2}mild-steel +20 to 1200 /m);
    const { materials } = JSON.parse((await run(["materials", "--json"])).stdout);
    expect(materials[0]).toMatchObject({ id: "copper", range: { fromC: -50, toC: 250 } });
  });
});

describe("refusals", () => {
  it("name the key, the fault with its numbers, and leave stdout empty", async () => {
    const winding = { form: "helix", boreDiameterMm: 42, turns: 5, pitchMm: 7 };
    const tight = JSON.stringify({ ...demo, coil: { ...(demo["coil"] as object), winding } });
    const end = await run(["solve", "-"], tight);
    expectRefused(end);
    expect(end.stderr).toContain("/coil/winding/pitchMm: ");
    expect(end.stderr).toMatch(/accepted: .*8/);
  });

  it("take out of a document's own words what a terminal would obey", async () => {
    const end = await run(["solve", "-"], JSON.stringify({ ...demo, "red\u001b[31m": 1 }));
    expectRefused(end);
    expect(end.stderr).toContain("red [31m");
    expect(end.stderr).not.toContain(String.fromCharCode(27));
  });

  it("are problem documents with --json", async () => {
    const end = await run(["solve", "-", "--json"], JSON.stringify({ ...demo, colour: "red" }));
    expectRefused(end);
    const problem = JSON.parse(end.stderr);
    expect(problem).toMatchObject({ status: 422, errors: [{ pointer: "/colour" }] });
    for (const member of ["type", "title", "detail"]) expect(problem[member]).toMatch(/./);
  });

  it.each([
    ["no such file", ["solve", "nowhere/at-all.json"], "", "there is no file"],
    ["a folder", ["solve", "meshes"], "", "is a folder"],
    ["an empty standard input", ["solve", "-"], "", "is empty"],
    ["what is not JSON", ["solve", "-"], "7 turns, please", "/coil|JSON|line 1"],
    ["no command", ["frobnicate"], "", "unknown command"],
    ["two designs", ["solve", "a.json", "b.json"], "", "too many arguments"],
    ["a picture nowhere", ["solve", "-", "--picture", "nowhere/at/all.svg"], "{}", "cannot be written"],
  ])("cover %s", async (_, args, input, words) => {
    const end = await run(args, input);
    expectRefused(end);
    expect(end.stderr).toMatch(new RegExp(words));
  });

  it("cover bytes that are no text, and files beyond any design", async () => {
    const end = await run(["solve", file("bytes.json", Uint8Array.of(0xff, 0xfe, 0x7b, 0))]);
    expectRefused(end);
    expect(end.stderr).toContain("not UTF-8 text");
    const large = await run(["solve", file("large.json", " ".repeat(17e6))]);
    expectRefused(large);
  });
});

describe("the bundle", () => {
  it("is built safely by two starts at once, and leaves no draft behind", async () => {
    rmSync(join(root, "dist/emberturn.mjs"), { force: true });
    const both = await Promise.all([run(["--version"]), run(["--version"])]);
    for (const end of both) expect(end).toEqual({ status: 0, stdout: `${version}\n`, stderr: "" });
    expect(readdirSync(join(root, "dist")).filter((name) => name.endsWith(".tmp"))).toEqual([]);
  });
});
