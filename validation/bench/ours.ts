/** The LDLᵀ in a process of its own: times and memory of one system, told as one line of JSON. */
import { readFileSync, writeFileSync } from "node:fs";
import { type Analysis, analyse, type ComplexVector, factorise, solve } from "../../solver/index.ts";
import { writeArrays } from "./container.ts";
import { type ElementSystem, readSystem } from "./matrix.ts";

/** What either program tells of a system. Seconds, one number a repetition; the first is the process's first of this system. */
export interface Run {
  /** Ordering, analysis and factorisation. */
  readonly factor: readonly number[];
  /** One right-hand side. */
  readonly solve: readonly number[];
  /** Factorisation alone, the ordering known. */
  readonly again: readonly number[];
  /** Peak of the resident set during the first factorisation and solve, less what it was before with the matrix loaded. */
  readonly peakBytes: number;
  /** Complex numbers of L below the diagonal, and D. */
  readonly entries: number;
}

/** Practice runs on the small system: enough for the compiler to have seen everything. */
const PRACTICE = 6;

/** Child process: `ours PRACTICE SYSTEM SOLUTION REPETITIONS`; practice "-" starts cold. */
export function runOurs([practice, path, solution, repetitions]: readonly string[]): void {
  if (practice !== "-") {
    const small = readSystem(practice!);
    for (let k = 0; k < PRACTICE; k++) once(small);
  }
  const system = readSystem(path!);
  const before = settledMemory();
  let run = once(system);
  const peakBytes = peakMemory() - before;
  writeArrays(solution!, [run.x.re, run.x.im]);
  const { entries } = run.analysis;
  const [factor, solved, again] = [[run.factor], [run.solve], [] as number[]];
  for (let k = 1; k < Number(repetitions); k++) {
    again.push(factoriseAgain(run.analysis, system));
    run = once(system);
    factor.push(run.factor);
    solved.push(run.solve);
  }
  const told: Run = { factor, solve: solved, again, peakBytes, entries };
  process.stdout.write(`${JSON.stringify(told)}\n`);
}

function once({ structure, values, rhs }: ElementSystem): {
  factor: number;
  solve: number;
  x: ComplexVector;
  analysis: Analysis;
} {
  const started = performance.now();
  const analysis = analyse(structure);
  const factor = factorise(analysis, values);
  const factorised = performance.now();
  const x = solve(factor, rhs);
  const solved = performance.now();
  return { factor: (factorised - started) / 1000, solve: (solved - factorised) / 1000, x, analysis };
}

function factoriseAgain(analysis: Analysis, { values }: ElementSystem): number {
  const started = performance.now();
  factorise(analysis, values);
  return (performance.now() - started) / 1000;
}

/** Resident set in bytes after collecting garbage, and the kernel's high-water mark set back to it. */
function settledMemory(): number {
  globalThis.gc?.();
  globalThis.gc?.();
  writeFileSync("/proc/self/clear_refs", "5");
  return statusBytes("VmRSS");
}

const peakMemory = (): number => statusBytes("VmHWM");

/** A line of /proc/self/status that is given in kB. */
function statusBytes(key: string): number {
  const line = readFileSync("/proc/self/status", "utf8")
    .split("\n")
    .find((text) => text.startsWith(`${key}:`));
  return 1024 * Number(/\d+/.exec(line ?? "")?.[0] ?? Number.NaN);
}
