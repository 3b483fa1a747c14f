/** Every setting of the service, in one place: its type, where it may be set, its default, and what is accepted. */
import { availableParallelism, totalmem } from "node:os";
import { resolve } from "node:path";
import { UsageError } from "./errors.ts";

/** Log levels of EMBERTURN_LOG, quietest first. */
const logLevels = ["silent", "error", "warn", "info", "debug"] as const;
export type LogLevel = (typeof logLevels)[number];

export interface Settings {
  /** Address listened on; loopback only. `--host` */
  readonly host: string;
  /** TCP port; 0 takes any free one. `--port` */
  readonly port: number;
  /** Folder of the store, absolute. `--data` */
  readonly data: string;
  /** File of a design to be solved at the first start and shown at every start; null = none. `--demo` */
  readonly demo: string | null;
  /** What is told on stderr. `EMBERTURN_LOG` */
  readonly logLevel: LogLevel;
  /** Solving threads. */
  readonly workers: number;
  /** Most JavaScript heap of one solving thread, MB. */
  readonly workerHeapMb: number;
  /** Largest body of a request, bytes. */
  readonly bodyBytes: number;
  /** A cancelled solve that has not stopped by itself after this long loses its thread, ms. */
  readonly graceMs: number;
  /** Shutting down takes no longer than this, ms. */
  readonly shutdownMs: number;
}

/** What the command line gives, as text. */
export interface ServeOptions {
  readonly host?: string;
  readonly port?: string;
  readonly data?: string;
  readonly demo?: string;
}

export const defaults = { host: "127.0.0.1", port: 7420, data: "data" } as const;

/** More threads than this do not pay: a solve is bound by memory, not by arithmetic. */
const mostWorkers = 8;
/** Memory that a solve at the largest grid takes, bytes; so many fit beside each other. */
const workerBytes = 1.5e9;

/**
 * The settings of one start.
 * @throws UsageError for an option that is not understood, or that is refused for safety
 */
export function settingsOf(options: ServeOptions, env: NodeJS.ProcessEnv): Settings {
  return {
    host: loopback(options.host ?? defaults.host),
    port: portOf(options.port ?? String(defaults.port)),
    data: resolve(options.data ?? defaults.data),
    demo: options.demo ?? null,
    logLevel: logLevelOf(env["EMBERTURN_LOG"] ?? "warn"),
    workers: Math.max(1, Math.min(availableParallelism(), mostWorkers, Math.floor(totalmem() / workerBytes))),
    workerHeapMb: 2048,
    bodyBytes: 16e6,
    graceMs: 1000,
    shutdownMs: 5000,
  };
}

function portOf(text: string): number {
  const port = /^\d{1,5}$/.test(text) ? Number(text) : Number.NaN;
  if (port <= 65_535) return port;
  throw new UsageError(`--port: ${text} is no port; accepted are 0 (any free one) to 65535`);
}

/** The service has no tokens yet: whoever reaches it may use it, so that it listens where only this machine reaches it. */
function loopback(host: string): string {
  if (host === "localhost" || host === "::1" || /^127(\.\d{1,3}){3}$/.test(host)) return host;
  throw new UsageError(
    `--host: ${host} is not this machine alone, and the service does not ask who is calling yet; accepted are 127.0.0.1, ::1 and localhost`,
  );
}

function logLevelOf(text: string): LogLevel {
  const level = logLevels.find((known) => known === text);
  if (level !== undefined) return level;
  throw new UsageError(`EMBERTURN_LOG: ${text} is not known; accepted are ${logLevels.join(", ")}`);
}
