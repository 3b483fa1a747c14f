/** The real service in a process of its own, as `npm start` runs it, on a free port and a data folder of its own. */
import { type ChildProcess, spawn } from "node:child_process";
import { once } from "node:events";
import { mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";

export interface Served {
  readonly address: string;
  /** Stops the process as a crash would. */
  kill(): Promise<void>;
  /** Starts it again on the same port and data. */
  again(): Promise<void>;
  /** Ends it and takes its data away. */
  close(): Promise<void>;
}

/** Starts the service with the demo design; resolves when it says its address. */
export async function serve(): Promise<Served> {
  const data = mkdtempSync(join(tmpdir(), "emberturn-page-"));
  let { child, address } = await started(data, 0);
  const stop = async (signal: NodeJS.Signals): Promise<void> => {
    if (child.exitCode !== null || child.signalCode !== null) return;
    const exit = once(child, "exit");
    child.kill(signal);
    await exit;
  };
  return {
    address,
    kill: () => stop("SIGKILL"),
    async again() {
      ({ child } = await started(data, Number(new URL(address).port)));
    },
    async close() {
      await stop("SIGTERM");
      rmSync(data, { recursive: true, force: true });
    },
  };
}

async function started(data: string, port: number): Promise<{ child: ChildProcess; address: string }> {
  const args = ["serve", "--demo", "meshes/examples/demo.json", "--port", String(port), "--data", data];
  const child = spawn(process.execPath, [".ci/emberturn.mjs", ...args], {
    stdio: ["ignore", "pipe", "pipe"],
  });
  let said = "";
  const address = await new Promise<string>((resolve, reject) => {
    const hear = (chunk: Buffer): void => {
      said += String(chunk);
      const found = /emberturn is at (\S+)/.exec(said)?.[1];
      if (found !== undefined) resolve(found);
    };
    child.stdout.on("data", hear);
    child.stderr.on("data", hear);
    child.on("exit", (code) => reject(new Error(`the service ended early (${code}): ${said}`)));
  });
  return { child, address };
}
