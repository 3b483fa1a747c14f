/** Starts and stops the service: store, engine, runner, application, in this order, and back. */
import { createServer, type Server } from "node:http";
import type { AddressInfo } from "node:net";
import { destination, type Logger, pino } from "pino";
import { buildApp } from "./app.ts";
import type { Settings } from "./config.ts";
import { deskThread } from "./engine/desk.ts";
import { threadPool } from "./engine/pool.ts";
import { notStarted } from "./errors.ts";
import { JobEvents } from "./jobs/events.ts";
import { type Jobs, jobsOf } from "./jobs/jobs.ts";
import { startRunner } from "./jobs/runner.ts";
import { openStore } from "./store/store.ts";

export interface RunningService {
  /** Where it listens, e.g. "http://127.0.0.1:7420/". */
  readonly address: string;
  readonly jobs: Jobs;
  readonly events: JobEvents;
  readonly log: Logger;
  /** Makes the first solve as quick as the later ones; resolves when the threads are warm. */
  warmUp(): Promise<void>;
  /** Takes no more requests, stops the work (it runs again at the next start) and closes the store. */
  close(): Promise<void>;
}

/**
 * Starts the service.
 * @param entry the program's bundle: the threads' bundle and the page lie beside it
 * @throws DoorError in words when it cannot start
 */
export async function startService(settings: Settings, entry: URL): Promise<RunningService> {
  const log = pino({ level: settings.logLevel, base: null }, destination({ fd: 2, sync: true }));
  const store = await openStore(settings.data);
  const again = await store.requeueRunning();
  if (again > 0) log.info({ jobs: again }, "jobs of the last run are run again");
  const threads = new URL("pooled.mjs", entry);
  const desk = deskThread(threads);
  const engine = threadPool({
    entry: threads,
    threads: settings.workers,
    heapMb: settings.workerHeapMb,
    graceMs: settings.graceMs,
  });
  const events = new JobEvents();
  const runner = startRunner(store, engine, events, log);
  const jobs = jobsOf(store, desk, events, runner);
  let state: "starting" | "up" | "closing" = "starting";
  const app = buildApp({
    settings,
    jobs,
    events,
    desk,
    log,
    viewer: new URL("viewer/", entry),
    ready: () => state === "up",
    closing: () => state === "closing",
  });
  const server = createServer(app);
  try {
    await listening(server, settings);
  } catch (error) {
    await Promise.all([engine.close(), desk.close()]);
    await store.close();
    throw error;
  }
  state = "up";
  runner.wake();

  async function close(): Promise<void> {
    state = "closing";
    const closed = new Promise((resolve) => server.close(resolve));
    events.close();
    server.closeIdleConnections();
    await runner.close();
    server.closeAllConnections();
    await closed;
    await Promise.all([engine.close(), desk.close()]);
    await store.close();
  }

  return { address: addressOf(server), jobs, events, log, warmUp: engine.warmUp, close };
}

function addressOf(server: Server): string {
  const { address, port, family } = server.address() as AddressInfo;
  return `http://${family === "IPv6" ? `[${address}]` : address}:${port}/`;
}

function listening(server: Server, { host, port }: Settings): Promise<void> {
  return new Promise((resolve, reject) => {
    server.once("error", (error: NodeJS.ErrnoException) => reject(inWords(error, host, port)));
    server.listen(port, host, resolve);
  });
}

function inWords(error: NodeJS.ErrnoException, host: string, port: number): Error {
  const said: Record<string, string> = {
    EADDRINUSE: `Port ${port} of ${host} is taken, maybe by another emberturn. Stop that one, or choose another port: --port 0 takes any free one.`,
    EACCES: `Port ${port} may not be used by this user. Choose one above 1023 by --port.`,
    EADDRNOTAVAIL: `This machine has no address ${host}. Choose another one by --host.`,
    ENOTFOUND: `This machine has no address ${host}. Choose another one by --host.`,
  };
  const words = said[error.code ?? ""];
  return words === undefined ? error : notStarted(words);
}
