/**
 * `npm run bench`: how fast, on this machine, to which accuracy; and our direct solver beside SciPy's. Prints its tables and
 * writes TABLE.md beside this folder's files; with `--quick` a short run, printed alone. Child processes and threads enter here as well.
 */
import { writeFileSync } from "node:fs";
import { cpus, loadavg, totalmem } from "node:os";
import { fileURLToPath } from "node:url";
import { TARGET_CASES, timedCases } from "./cases.ts";
import { coldRows } from "./cold.ts";
import { runOurs } from "./ours.ts";
import { type Effort, rivalRows, scipyVersion } from "./rival.ts";
import { type Machine, tableOf } from "./table.ts";
import { serveTimings, warmRows } from "./warm.ts";

const TABLE = "validation/bench/TABLE.md";
const ENTRY = new URL(import.meta.url);
/** The design whose matrices are factorised; its half has 2 700 unknowns on the first level. */
const RIVAL = "open-2";

interface Plan {
  readonly coldRounds: number;
  readonly warmRounds: number;
  readonly rival: Effort;
}
const FULL: Plan = {
  coldRounds: 3,
  warmRounds: 4,
  rival: { levels: [2, 4, 8], processes: 3, repetitions: 3 },
};
const QUICK: Plan = {
  coldRounds: 1,
  warmRounds: 1,
  rival: { levels: [2, 4], processes: 1, repetitions: 3 },
};

const tell = (text: string): void => {
  process.stderr.write(`${text}\n`);
};

async function bench(quick: boolean): Promise<void> {
  const plan = quick ? QUICK : FULL;
  const cases = timedCases().filter(({ name }) => !quick || TARGET_CASES.includes(name));
  const scipy = scipyVersion();
  const before = loadavg()[0] ?? Number.NaN;
  const started = performance.now();
  const cold = await coldRows(cases, plan.coldRounds, tell);
  const warm = await warmRows(ENTRY, cases, plan.warmRounds, tell);
  const rivalCase = cases.find(({ name }) => name === RIVAL)!;
  const rival = rivalRows(fileURLToPath(ENTRY), rivalCase, plan.rival, tell);
  const machine = machineNow(scipy, before);
  const text = tableOf({ machine, cold, warm, rival, rivalName: RIVAL });
  process.stdout.write(text);
  if (!quick) writeFileSync(TABLE, text);
  tell(`${((performance.now() - started) / 1000).toFixed(0)} s${quick ? "" : `; see ${TABLE}`}`);
}

function machineNow(scipy: string | null, before: number): Machine {
  return {
    date: new Date().toISOString().slice(0, 10),
    processor: cpus()[0]?.model.trim() ?? "unknown processor",
    cores: cpus().length,
    memoryGb: Math.round(totalmem() / 2 ** 30),
    node: process.versions.node,
    scipy,
    load: [before, loadavg()[0] ?? Number.NaN],
  };
}

const [role, ...rest] = process.argv.slice(2);
if (role === "ours") runOurs(rest);
else if (role === "warm") serveTimings();
else await bench(role === "--quick");
