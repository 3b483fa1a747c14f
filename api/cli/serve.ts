/** `emberturn serve`: starts the service, shows the demo's figures where asked for, says the address, and ends in good order. */
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
  try {
    if (demo !== null && !(await showDemo(service, demo))) return;
  } catch (error) {
    await service.close();
    throw error;
  }
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

/** Solves the demo unless an earlier start has, and prints its figures; false when the service ends before. */
async function showDemo(service: RunningService, demo: { text: string; key: string }): Promise<boolean> {
  const job = await over(service, await service.jobs.submit(demo.text, demo.key));
  if (job === null) return false;
  if (job.state === "done") {
    const result = ResultSchema.parse(JSON.parse(await service.jobs.result(job.id)));
    const colour = process.stdout.isTTY === true && process.env["NO_COLOR"] === undefined;
    process.stdout.write(`${renderSummary(result, { colour })}\n`);
  } else {
    process.stderr.write(`The demo was not solved: ${job.problem?.detail ?? job.state}\n`);
  }
  return true;
}

/** The job at its end; null when the service ends before. */
function over({ jobs, events }: RunningService, { id }: Job): Promise<Job | null> {
  return new Promise((resolve, reject) => {
    const stop = events.listen(id, (notice) => {
      if (notice === null) tell(null);
      else if (ended(notice.job.state)) tell(notice.job);
    });
    const tell = (job: Job | null): void => {
      stop();
      resolve(job);
    };
    // Asked after listening has begun: an end in between is seen by one or the other.
    jobs.known(id).then((job) => {
      if (ended(job.state)) tell(job);
    }, reject);
  });
}
