/** The service's doors, as the page calls them. */
import { type Job, JobListSchema, JobSchema } from "../api/contract/job.ts";
import { type Problem, ProblemSchema } from "../api/contract/problem.ts";
import type { Result } from "../meshes/result.ts";

/** Nobody answered: the service is gone, or not there yet. */
export class Unreachable extends Error {
  override readonly name = "Unreachable";
}

/** The service answered with a problem. */
export class Refused extends Error {
  override readonly name = "Refused";
  readonly problem: Problem;

  constructor(problem: Problem) {
    super(problem.detail);
    this.problem = problem;
  }
}

async function ask(path: string, init?: RequestInit): Promise<Response> {
  let response: Response;
  try {
    response = await fetch(path, init);
  } catch (error) {
    throw new Unreachable("the service does not answer", { cause: error });
  }
  if (response.ok) return response;
  throw new Refused(await problemOf(response));
}

/** What the answer says went wrong; something in between may have answered instead of the service. */
async function problemOf(response: Response): Promise<Problem> {
  const body: unknown = await response.json().catch(() => null);
  const parsed = ProblemSchema.safeParse(body);
  if (parsed.success) return parsed.data;
  const detail = `The answer was ${response.status} ${response.statusText}, and not understood.`;
  return { type: "about:blank", title: "Not understood", status: response.status, detail, errors: [] };
}

const at = (id: string, door = ""): string => `v1/jobs/${encodeURIComponent(id)}${door}`;

/** Asks for a solve; asked again with the same `key` it gives the same job. */
export async function submit(document: unknown, key: string): Promise<Job> {
  const response = await ask("v1/jobs", {
    method: "POST",
    headers: { "content-type": "application/json", "idempotency-key": key },
    body: JSON.stringify({ kind: "solve", document }),
  });
  return JobSchema.parse(await response.json());
}

/** The newest jobs, newest first. */
export async function newest(): Promise<readonly Job[]> {
  const response = await ask("v1/jobs?limit=100");
  return JobListSchema.parse(await response.json()).jobs;
}

export async function jobOf(id: string): Promise<Job> {
  return JobSchema.parse(await (await ask(at(id))).json());
}

/** The document as it was accepted. */
export async function documentOf(id: string): Promise<unknown> {
  return (await ask(at(id, "/document"))).json();
}

export async function resultOf(id: string): Promise<Result> {
  return (await (await ask(at(id, "/result"))).json()) as Result;
}

/** The heat file's bytes. */
export async function heatBytesOf(id: string): Promise<ArrayBuffer> {
  return (await ask(at(id, "/heat"))).arrayBuffer();
}

/** Stops a live job, removes an ended one. */
export async function remove(id: string): Promise<void> {
  await ask(at(id), { method: "DELETE" });
}

/** Whether the service answers. */
export async function alive(): Promise<boolean> {
  return ask("healthz").then(
    () => true,
    () => false,
  );
}

/** Listens to a job until its end; the returned function stops listening. A broken line is taken up again by itself. */
export function listen(id: string, heard: (job: Job) => void, broken: () => void): () => void {
  const source = new EventSource(at(id, "/events"));
  const hear = (event: MessageEvent<string>): void => heard(JobSchema.parse(JSON.parse(event.data)));
  source.addEventListener("progress", hear);
  for (const last of ["done", "failed", "cancelled"]) {
    source.addEventListener(last, (event: MessageEvent<string>) => {
      source.close();
      hear(event);
    });
  }
  source.addEventListener("error", broken);
  return () => source.close();
}
