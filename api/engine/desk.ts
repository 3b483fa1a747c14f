/**
 * A thread apart from the solving ones, which may be busy for minutes: it does what would keep the service's own thread from
 * answering others. It is there only while wanted.
 */
import { fileURLToPath } from "node:url";
import { Piscina } from "piscina";
import { MappedError } from "../errors.ts";
import { type Drafted, drafted, type RequestText } from "../jobs/request.ts";
import type { Draft } from "../store/store.ts";
import type { FormOrder } from "./formed.ts";

/** Requests up to this length are checked in a few milliseconds, sooner than another thread has been asked. */
const shortText = 10_000;
/** The thread ends after so long without work, ms. */
const idleMs = 60_000;

export interface Desk {
  /** The array as text or bytes, see formed.ts. */
  formed(order: FormOrder): Promise<string | Uint8Array | null>;
  /** The job a request asks for. @throws MappedError when it is not fit */
  drafted(request: RequestText): Promise<Draft>;
  close(): Promise<void>;
}

/** @param entry the bundle of pooled.ts */
export function deskThread(entry: URL): Desk {
  const pool = new Piscina({
    filename: fileURLToPath(entry),
    minThreads: 0,
    maxThreads: 1,
    idleTimeout: idleMs,
    recordTiming: false,
  });
  pool.on("error", () => {});
  return {
    formed: (order) => pool.run(order, { name: "formed" }),
    async drafted(request) {
      const told: Drafted =
        request.text.length <= shortText ? drafted(request) : await pool.run(request, { name: "drafted" });
      if ("failure" in told) throw new MappedError(told.failure);
      return told.draft;
    },
    close: () => pool.destroy(),
  };
}
