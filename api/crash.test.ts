/** The real process, killed for real: what was accepted is done after the next start, once. */
import { type ChildProcess, spawn } from "node:child_process";
import { once } from "node:events";
import { afterAll, expect, it } from "vitest";
import { ResultSchema } from "../meshes/result.ts";
import { type Job, JobListSchema } from "./contract/job.ts";
import { bundleFile, quickDesign, temporaryFolder } from "./fixtures.ts";

const folder = temporaryFolder();
const bundle = bundleFile();
let child: ChildProcess | undefined;
afterAll(() => {
  child?.kill("SIGKILL");
  folder.remove();
});

/** Starts the service; its address, once it has said it. */
async function start(): Promise<string> {
  const args = [bundle, "serve", "--port", "0", "--data", folder.path];
  child = spawn(process.execPath, args, { stdio: ["ignore", "pipe", "inherit"] });
  let said = "";
  for await (const text of child.stdout!) {
    said += String(text);
    const address = /http:\S+/.exec(said)?.[0];
    if (address !== undefined) return address;
  }
  throw new Error(`the service did not start: ${said}`);
}

async function kill(): Promise<void> {
  const exit = once(child!, "exit");
  child!.kill("SIGKILL");
  await exit;
}

/** Submits a job; null when the service died before it answered. */
async function submit(address: string, k: number): Promise<Job | null> {
  const body = JSON.stringify({ kind: "solve", document: quickDesign(`Tarnhollow: billet ${k}`) });
  const headers = { "Content-Type": "application/json", "Idempotency-Key": `billet-${k}` };
  try {
    const response = await fetch(new URL("/v1/jobs", address), { method: "POST", headers, body });
    if (response.status !== 202) throw new Error(await response.text());
    return (await response.json()) as Job;
  } catch (error) {
    if (error instanceof TypeError) return null;
    throw error;
  }
}

const list = async (address: string): Promise<Job[]> =>
  JobListSchema.parse(await (await fetch(new URL("/v1/jobs?limit=200", address))).json()).jobs;

/** Until `done` jobs are done. */
async function untilDone(address: string, done: number): Promise<void> {
  while ((await list(address)).filter(({ state }) => state === "done").length < done) {
    await new Promise((resolve) => setTimeout(resolve, 20));
  }
}

it("15 jobs around three kills of the whole process are done after the last start, each once", async () => {
  const accepted = new Set<string>();
  // Killed in the midst of submitting, in the midst of working, and at once after an answer.
  for (const [round, amid] of [0, 1, 2].entries()) {
    const address = await start();
    const sent = Array.from({ length: 5 }, (_, k) => submit(address, 5 * round + k));
    if (amid === 0) await sent[1];
    if (amid === 1) await untilDone(address, accepted.size + 2);
    if (amid === 2) await Promise.all(sent);
    await kill();
    for (const job of await Promise.all(sent)) if (job !== null) accepted.add(job.id);
  }
  const address = await start();
  // What got no answer is sent again, as a client would: with its key, so that it is no second job.
  for (let k = 0; k < 15; k++) accepted.add((await submit(address, k))!.id);
  expect(accepted.size).toBe(15);
  await untilDone(address, 15);

  const jobs = await list(address);
  expect(jobs.map(({ id }) => id).sort()).toEqual([...accepted].sort());
  for (const { id, name } of jobs) {
    const result = ResultSchema.parse(await (await fetch(new URL(`/v1/jobs/${id}/result`, address))).json());
    expect(result.design.name).toBe(name);
  }
  const exit = once(child!, "exit");
  child!.kill("SIGTERM");
  expect(await exit).toEqual([0, null]);
});
