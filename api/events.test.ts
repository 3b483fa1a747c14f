/** Event streams, cancelling, and what a restart of the service does to both; with real threads. */
import { afterAll, afterEach, beforeEach, describe, expect, it } from "vitest";
import {
  eachEvent,
  eventsOf,
  longDesign,
  quickDesign,
  type SeenEvent,
  type TestService,
  temporaryFolder,
  testService,
} from "./fixtures.ts";

const folder = temporaryFolder();
let service: TestService;
// One thread only, so that what waits and what runs is certain.
const start = async (): Promise<TestService> => testService(folder.path, { workers: 1, graceMs: 700 });
beforeEach(async () => {
  service = await start();
});
afterEach(() => service.close());
afterAll(() => folder.remove());

const follow = (id: string, lastId?: string): Promise<Response> =>
  service.ask(`/v1/jobs/${id}/events`, lastId === undefined ? {} : { headers: { "Last-Event-ID": lastId } });
const cancel = (id: string): Promise<Response> => service.ask(`/v1/jobs/${id}`, { method: "DELETE" });

/** Events until one satisfies; then the stream is left. */
async function until(id: string, fits: (event: SeenEvent) => boolean): Promise<SeenEvent> {
  for await (const event of eachEvent(await follow(id))) if (fits(event)) return event;
  throw new Error("the stream ended before");
}

const working = ({ job }: SeenEvent): boolean => job.state === "running" && job.stage.includes("grid,");

describe("an event stream", () => {
  it("tells progress that only grows, at a bearable rate, then done, and ends", async () => {
    const begun = performance.now();
    const { id } = await service.submit({ ...quickDesign(), accuracyPercent: 0.5 });
    const response = await follow(id);
    expect(response.headers.get("content-type")).toMatch(/^text\/event-stream/);
    expect(response.headers.get("content-encoding")).toBeNull();
    const events = await eventsOf(response);
    const seconds = (performance.now() - begun) / 1000;
    expect(events.slice(0, -1).every(({ event }) => event === "progress")).toBe(true);
    expect(events.at(-1)).toMatchObject({ event: "done", job: { id, state: "done", progress: 1 } });
    const progress = events.map(({ job }) => job.progress);
    expect(progress).toEqual([...progress].sort((a, b) => a - b));
    expect(new Set(events.map((event) => event.id)).size).toBe(events.length);
    const stages = new Set(events.map(({ job }) => job.stage)).size;
    expect(events.length).toBeLessThan(10 * seconds + 2 * stages + 3);
  });

  it("goes on after the event last seen, and has nothing more after the last", async () => {
    const { id } = await service.submit(longDesign());
    const seen = await until(id, working);
    const next = (await eachEvent(await follow(id, seen.id)).next()).value as SeenEvent;
    expect(next.id).not.toBe(seen.id);
    await cancel(id);
    const events = await eventsOf(await follow(id, next.id));
    expect(events).toMatchObject([{ event: "cancelled", job: { state: "cancelled" } }]);
    const nothing = await follow(id, events[0]!.id);
    expect(nothing.status).toBe(204);
  });

  it("ends with the service, and goes on with the next: an old id gets the job as it stands, the last id nothing", async () => {
    const { id: over } = await service.submit(quickDesign());
    const last = (await eventsOf(await follow(over))).at(-1)!;
    const { id } = await service.submit(longDesign());
    const seen = await until(id, working);
    const rest = eventsOf(await follow(id));
    await service.close();
    expect((await rest).every(({ event }) => event === "progress")).toBe(true);

    service = await start();
    expect((await follow(over, last.id)).status).toBe(204);
    const again = (await eachEvent(await follow(id, seen.id)).next()).value as SeenEvent;
    expect(again).toMatchObject({ event: "progress", job: { id } });
    expect(again.id).not.toBe(seen.id);
    await until(id, working);
    await cancel(id);
  });
});

describe("cancelling", () => {
  it("stops the work, so that the next job is taken up within two seconds", async () => {
    const { id } = await service.submit(longDesign());
    await until(id, working);
    const next = await service.submit(quickDesign());
    const asked = performance.now();
    const response = await cancel(id);
    expect(response.status).toBe(202);
    expect(await response.json()).toMatchObject({ id, state: "cancelled" });
    await until(next.id, ({ job }) => job.state !== "queued");
    expect(performance.now() - asked).toBeLessThan(2000);
    expect((await service.end(next.id)).state).toBe("done");
    expect((await service.ask(`/v1/jobs/${id}`)).status).toBe(200);
    expect((await service.ask(`/v1/jobs/${id}/result`)).status).toBe(409);
  });

  it("leaves the process idle", async () => {
    const { id } = await service.submit(longDesign());
    await until(id, working);
    await cancel(id);
    await new Promise((resolve) => setTimeout(resolve, 2000));
    const before = process.cpuUsage();
    await new Promise((resolve) => setTimeout(resolve, 500));
    const { user, system } = process.cpuUsage(before);
    expect((user + system) / 1000).toBeLessThan(100);
  });

  it("reaches a job that waits, which is then never worked on", async () => {
    const { id: first } = await service.submit(longDesign());
    const { id } = await service.submit(quickDesign());
    const early = await service.ask(`/v1/jobs/${id}/result`);
    expect([early.status, await early.text()]).toEqual([409, expect.stringContaining("waits for its turn")]);
    expect((await cancel(id)).status).toBe(202);
    await cancel(first);
    expect(await service.end(id)).toMatchObject({ state: "cancelled", startedAt: null });
    // Ended now: asked again, it is removed.
    expect((await cancel(id)).status).toBe(204);
  });

  it("holds though the service ends before the work has stopped", async () => {
    const { id } = await service.submit(longDesign());
    await until(id, working);
    await cancel(id);
    await service.close();
    service = await start();
    expect(await service.end(id)).toMatchObject({ state: "cancelled" });
  });
});

describe("closing", () => {
  it("is quick, and what was running or waiting is done by the next service", async () => {
    const long = await service.submit(longDesign());
    const quick = await service.submit(quickDesign());
    await until(long.id, working);
    const asked = performance.now();
    await service.close();
    expect(performance.now() - asked).toBeLessThan(3000);
    service = await start();
    await until(long.id, working);
    await cancel(long.id);
    expect((await service.end(quick.id)).state).toBe("done");
  });
});
