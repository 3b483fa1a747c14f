/** A thread apart from the solving ones, which may be busy for minutes: it writes large downloads, and is there only while wanted. */
import { fileURLToPath } from "node:url";
import { Piscina } from "piscina";
import type { FormOrder } from "./formed.ts";

export interface Forms {
  /** See formed.ts. */
  formed(order: FormOrder): Promise<string | Uint8Array | null>;
  close(): Promise<void>;
}

/** The thread ends after so long without work, ms. */
const idleMs = 60_000;

export function formsThread(entry: URL): Forms {
  const pool = new Piscina<FormOrder, string | Uint8Array | null>({
    filename: fileURLToPath(entry),
    name: "formed",
    minThreads: 0,
    maxThreads: 1,
    idleTimeout: idleMs,
    recordTiming: false,
  });
  pool.on("error", () => {});
  return { formed: (order) => pool.run(order), close: () => pool.destroy() };
}
