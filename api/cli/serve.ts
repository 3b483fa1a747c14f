/** `emberturn serve`: starts the service, shows the demo's figures where asked for, says the address, and ends in good order. */
import { once } from "node:events";
import { ResultSchema } from "../../meshes/result.ts";
import { type ServeOptions, settingsOf } from "../config.ts";
import { ended, type Job } from "../contract/job.ts";
import { exitStatus } from "../errors.ts";
import { type RunningService, startService } from "../serve.ts";
import { demoRequest } from "./demo.ts";
import { renderSummary } from "./table.ts";

/** Starts the service and returns once the address is said and the threads are warm; signals end the process. Throws what the mapper understands. */
export async function serveCommand(options: ServeOptions, entry: URL): Promise<void> {
  const settings = settingsOf(options, process.env);
  const demo = settings.demo === null ? null : await demoRequest(settings.demo);
  const service = await startService(settings, entry);
  endInOrder(service, settings.shutdownMs);
  if (demo !== null) await showDemo(service, demo);
  process.stdout.write(`emberturn is at ${service.address}\n`);
  // Only now: solving the demo for the first time warms a thread by itself, and is waited for.
  await service.warmUp();
}

/** The first signal ends in good order, a second one at once. */
function endInOrder(service: RunningService, shutdownMs: number): void {
  let asked = false;
  const end = (status: number): void => {
    if (asked) process.exit(status);
    asked = true;
    setTimeout(() => process.exit(status), shutdownMs).unref();
    service.close().then(
      () => process.exit(exitStatus.done),
      (error: unknown) => {
        service.log.error({ err: error }, "the service did not end in good order");
        process.exit(exitStatus.failed);
      },
    );
  };
  process.on("SIGINT", () => end(130));
  process.on("SIGTERM", () => end(143));
}

/** Solves the demo unless an earlier start has, and prints its figures. */
async function showDemo(service: RunningService, demo: { text: string; key: string }): Promise<void> {
  const job = await over(service, await service.jobs.submit(demo.text, demo.key));
  if (job.state === "done") {
    const result = ResultSchema.parse(JSON.parse(await service.jobs.result(job.id)));
    const colour = process.stdout.isTTY === true && process.env["NO_COLOR"] === undefined;
    process.stdout.write(`${renderSummary(result, { colour })}\n`);
  } else {
    process.stderr.write(`The demo was not solved: ${job.problem?.detail ?? job.state}\n`);
  }
}

/** The job at its end. */
async function over({ jobs, events }: RunningService, job: Job): Promise<Job> {
  const told = new AbortController();
  const stop = events.listen(job.id, (notice) => {
    if (notice === null || ended(notice.job.state)) told.abort();
  });
  try {
    // Asked after listening has begun: an end in between is seen by one or the other.
    const now = await jobs.known(job.id);
    if (!ended(now.state) && !told.signal.aborted) await once(told.signal, "abort");
    return await jobs.known(job.id);
  } finally {
    stop();
  }
}
