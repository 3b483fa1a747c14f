/** Our LDLᵀ and SciPy's SuperLU on the same matrices, each in processes of its own, in turn, one thread each. */
import { spawnSync } from "node:child_process";
import { mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import type { ComplexVector } from "../../solver/index.ts";
import type { TimedCase } from "./cases.ts";
import { readArrays } from "./container.ts";
import { backwardError, type Columns, columnsOf, systemOf, writeColumns, writeSystem } from "./matrix.ts";
import type { Run } from "./ours.ts";

/** What one program did with one matrix. */
export interface Program {
  /** Processes that had practised, for time. */
  readonly warm: readonly Run[];
  /** The same for memory. */
  readonly lean: readonly Run[];
  /** Processes that had not practised, for both. */
  readonly cold: readonly Run[];
  readonly backwardError: number;
}

export interface RivalRow {
  readonly unknowns: number;
  readonly nonzeros: number;
  readonly ours: Program;
  /** null where SciPy is missing. */
  readonly theirs: Program | null;
}

/** How much is measured. */
export interface Effort {
  /** Levels of the design's grid; a level n has about n² times the unknowns of level 1. */
  readonly levels: readonly number[];
  readonly processes: number;
  readonly repetitions: number;
}

const SCRIPT = "validation/bench/superlu.py";
const PYTHON = "python3";
const ONE_THREAD = { OPENBLAS_NUM_THREADS: "1", OMP_NUM_THREADS: "1", MKL_NUM_THREADS: "1" };
/** Has the C library give freed memory back at once, so that what practice left behind is not taken for free. */
const GIVE_BACK = { MALLOC_MMAP_THRESHOLD_: "65536", MALLOC_TRIM_THRESHOLD_: "65536" };
/** Says that SciPy is missing, and what to do. */
export const MISSING = "not run: apt-get install python3-scipy";

/** SciPy's version; null where Python or SciPy is missing. */
export function scipyVersion(): string | null {
  const run = spawnSync(PYTHON, [SCRIPT], { encoding: "utf8", stdio: ["ignore", "pipe", "ignore"] });
  return run.status === 0 ? run.stdout.trim() : null;
}

/** The loaded state of a design on grids of several levels. */
export function rivalRows(
  bundle: string,
  { design }: TimedCase,
  { levels, processes, repetitions }: Effort,
  tell: (text: string) => void,
): RivalRow[] {
  const folder = mkdtempSync(join(tmpdir(), "emberturn-bench-"));
  const theirsToo = scipyVersion() !== null;
  const at = (name: string): string => join(folder, name);
  const [practiceA, practiceB] = [at("practice.elements"), at("practice.columns")];
  try {
    const small = systemOf(design, 1);
    writeSystem(practiceA, small);
    writeColumns(practiceB, columnsOf(small), small.rhs);
    return levels.map((level) => {
      const system = systemOf(design, level);
      const columns = columnsOf(system);
      writeSystem(at("elements"), system);
      writeColumns(at("columns"), columns, system.rhs);
      const check = (): number => errorOf(at("solution"), columns, system.rhs);
      const own: Start = (practised, count, env) => {
        const practice = practised ? practiceA : "-";
        const args = ["--expose-gc", bundle, "ours", practice, at("elements"), at("solution"), `${count}`];
        return runOf(process.execPath, args, env);
      };
      const rival: Start = (practised, count, env) => {
        const args = [SCRIPT, practised ? practiceB : "-", at("columns"), at("solution"), `${count}`];
        return runOf(PYTHON, args, env);
      };
      const programs = (theirsToo ? [own, rival] : [own]).map((start) => new Measuring(start, check));
      for (let k = 0; k < processes; k++) for (const program of programs) program.round(repetitions);
      const [ours, theirs] = programs;
      tell(`direct solvers: ${system.structure.unknowns} unknowns`);
      return {
        unknowns: system.structure.unknowns,
        nonzeros: columns.rows.length,
        ours: ours!,
        theirs: theirs ?? null,
      };
    });
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}

/** Starts a process. */
type Start = (practised: boolean, repetitions: number, env: NodeJS.ProcessEnv) => Run;

/** Collects one program's runs. */
class Measuring implements Program {
  readonly warm: Run[] = [];
  readonly lean: Run[] = [];
  readonly cold: Run[] = [];
  backwardError = 0;
  private readonly start: Start;
  private readonly check: () => number;

  constructor(start: Start, check: () => number) {
    this.start = start;
    this.check = check;
  }

  round(repetitions: number): void {
    this.warm.push(this.start(true, repetitions, {}));
    this.backwardError = Math.max(this.backwardError, this.check());
    this.lean.push(this.start(true, 1, GIVE_BACK));
    this.cold.push(this.start(false, 1, GIVE_BACK));
  }
}

/** What a child process tells. @throws Error when it fails. */
function runOf(command: string, args: readonly string[], env: NodeJS.ProcessEnv): Run {
  const run = spawnSync(command, args, {
    encoding: "utf8",
    stdio: ["ignore", "pipe", "inherit"],
    env: { ...process.env, ...ONE_THREAD, ...env },
  });
  if (run.status !== 0) throw new Error(`${command} ended with ${run.status ?? run.signal}`);
  return JSON.parse(run.stdout) as Run;
}

function errorOf(file: string, columns: Columns, rhs: ComplexVector): number {
  const [re, im] = readArrays(file) as [Float64Array, Float64Array];
  return backwardError(columns, { re, im }, rhs);
}
