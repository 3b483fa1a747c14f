/** What the service's tests share: the bundle, a running service on a free port, designs, and a reader of event streams. */
import { execFileSync } from "node:child_process";
import { mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { fileURLToPath, pathToFileURL } from "node:url";
import { type Settings, settingsOf } from "./config.ts";
import type { Job } from "./contract/job.ts";
import { type RunningService, startService } from "./serve.ts";

const root = fileURLToPath(new URL("..", import.meta.url));

let bundle: string | undefined;

/** The program's bundle, built at need; threads start from what lies beside it. */
export function bundleFile(): string {
  if (bundle === undefined) execFileSync(process.execPath, [join(root, ".ci/emberturn.mjs"), "--version"]);
  bundle = join(root, "dist/emberturn.mjs");
  return bundle;
}

/** A folder of its own, and how to be rid of it. */
export function temporaryFolder(): { path: string; remove: () => void } {
  const path = mkdtempSync(join(tmpdir(), "emberturn-service-"));
  return { path, remove: () => rmSync(path, { recursive: true, force: true }) };
}

export interface TestService extends RunningService {
  /** fetch at a path of the service. */
  ask(path: string, init?: RequestInit): Promise<Response>;
  post(body: unknown, headers?: Record<string, string>): Promise<Response>;
  /** Submits a design; the job. */
  submit(design: unknown): Promise<Job>;
  /** The job once it has ended. */
  end(id: string): Promise<Job>;
}

/** A service in this process on a free port, its threads real ones. */
export async function testService(data: string, changes: Partial<Settings> = {}): Promise<TestService> {
  const settings = { ...settingsOf({ port: "0", data }, { EMBERTURN_LOG: "silent" }), ...changes };
  const service = await startService(settings, pathToFileURL(bundleFile()));
  const ask = (path: string, init?: RequestInit): Promise<Response> =>
    fetch(new URL(path, service.address), init);
  const post = (body: unknown, headers: Record<string, string> = {}): Promise<Response> =>
    ask("/v1/jobs", {
      method: "POST",
      headers: { "Content-Type": "application/json", ...headers },
      body: typeof body === "string" ? body : JSON.stringify(body),
    });
  return {
    ...service,
    ask,
    post,
    async submit(document) {
      const response = await post({ kind: "solve", document });
      if (response.status !== 202) throw new Error(await response.text());
      return (await response.json()) as Job;
    },
    async end(id) {
      const events = await eventsOf(await ask(`/v1/jobs/${id}/events`));
      return events.at(-1)!.job;
    },
  };
}

export interface SeenEvent {
  readonly event: string;
  readonly id: string;
  readonly job: Job;
}

/** Events of a stream as they come. */
export async function* eachEvent(response: Response): AsyncGenerator<SeenEvent> {
  let text = "";
  const decoder = new TextDecoder();
  for await (const chunk of response.body ?? []) {
    text += decoder.decode(chunk as Uint8Array, { stream: true });
    const blocks = text.split("\n\n");
    text = blocks.pop() ?? "";
    for (const block of blocks) {
      const field = (name: string): string => new RegExp(`^${name}: ?(.*)$`, "m").exec(block)?.[1] ?? "";
      if (field("data") !== "")
        yield { event: field("event"), id: field("id"), job: JSON.parse(field("data")) };
    }
  }
}

/** All events of a stream, to its end. */
export async function eventsOf(response: Response): Promise<SeenEvent[]> {
  const seen: SeenEvent[] = [];
  for await (const event of eachEvent(response)) seen.push(event);
  return seen;
}

/** One ring and a small billet: solved in a blink. */
export const quickDesign = (name = "Tarnhollow: one ring") => ({
  name,
  coil: {
    conductor: { section: "roundBar", outsideDiameterMm: 6, material: "copper" },
    winding: { form: "rings", centresMm: [[30, 0]] },
  },
  parts: [
    { name: "billet", shape: "cylinder", diameterMm: 30, lengthMm: 30, material: { resistivityOhmM: 1e-6 } },
  ],
  drive: { frequencyHz: 3000, currentA: 100 },
  accuracyPercent: 10,
});

/** The same without a part. */
export const emptyDesign = () => ({ ...quickDesign("Tarnhollow: bare ring"), parts: [] });

/** A design that keeps a thread busy for ten seconds or so: many turns, a sharp magnetic part, all the accuracy there is. */
export const longDesign = () => ({
  ...quickDesign("Tarnhollow: long work"),
  coil: {
    conductor: { section: "roundTube", outsideDiameterMm: 8, wallMm: 1, material: "copper" },
    winding: { form: "helix", boreDiameterMm: 50, turns: 24, pitchMm: 10 },
  },
  parts: [
    {
      name: "shaft",
      shape: "cylinder",
      diameterMm: 30,
      boreDiameterMm: 12,
      lengthMm: 90,
      material: { resistivityOhmM: 2.5e-7, relativePermeability: 60 },
    },
  ],
  drive: { frequencyHz: 20_000, currentA: 100 },
  accuracyPercent: 0.01,
});
