/** `/v1/jobs/{id}/events`: the job as it stands, now and after every change, to its end. */
import { createSession } from "better-sse";
import type { Request, Response } from "express";
import { ended } from "../contract/job.ts";
import { eventOf, lastEventId, type Notice } from "../jobs/events.ts";
import { accepted } from "./door.ts";
import type { Service } from "./service.ts";

/** A client whose stream broke comes back after this long, ms. */
const retryMs = 1000;

/** Streams until the job ends, the client leaves or the service ends. Nobody comes back after the last event: 204 tells browsers so. */
export async function streamEvents(
  { jobs, events }: Service,
  request: Request,
  response: Response,
): Promise<void> {
  accepted(request, ["text/event-stream"]);
  const id = String(request.params["id"]);
  const known = await jobs.known(id);
  if (ended(known.state) && request.get("last-event-id") === lastEventId) {
    response.status(204).end();
    return;
  }
  if (request.method === "HEAD") {
    response.type("text/event-stream").end();
    return;
  }
  const session = await createSession(request, response, { retry: retryMs });
  let seen = session.lastId;
  const push = ({ id: eventId, job }: Notice): void => {
    const over = ended(job.state);
    // Progress that a slow reader has not taken yet is not piled up: the next event says more.
    if (seen === eventId || (!over && response.writableNeedDrain)) return;
    seen = eventId;
    session.push(job, eventOf(job.state), eventId);
    if (over) leave();
  };
  const stop = events.listen(id, (notice) => (notice === null ? leave() : push(notice)));
  const leave = (): void => {
    stop();
    response.end();
  };
  response.on("close", stop);
  const before = seen;
  const job = await jobs.known(id).catch(() => known);
  // What came in the meantime is newer than what was just read.
  if (seen === before) push({ id: ended(job.state) ? lastEventId : events.newestId(id), job });
}
