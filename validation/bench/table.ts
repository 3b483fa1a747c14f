/** What was measured, as Markdown. */
import { growthExponent, type Spread, spreadOf } from "./arithmetic.ts";
import type { Errors } from "./cases.ts";
import type { ColdRow } from "./cold.ts";
import type { Run } from "./ours.ts";
import { MISSING, type Program, type RivalRow } from "./rival.ts";
import type { WarmRow } from "./warm.ts";

/** Where and when, in general words. */
export interface Machine {
  readonly date: string;
  readonly processor: string;
  readonly cores: number;
  readonly memoryGb: number;
  readonly node: string;
  readonly scipy: string | null;
  /** Processes that wanted to run, averaged over a minute: before and after. */
  readonly load: readonly [number, number];
}

export interface Measured {
  readonly machine: Machine;
  readonly cold: readonly ColdRow[];
  readonly warm: readonly WarmRow[];
  readonly rival: readonly RivalRow[];
  /** Design whose matrices were solved. */
  readonly rivalName: string;
}

export function tableOf({ machine, cold, warm, rival, rivalName }: Measured): string {
  return `# How fast

Written by \`npm run bench\`. Median of all runs (least – greatest); runs of different kinds took turns. Nothing here is tested: times are not
asserted anywhere.

- ${machine.date}; ${machine.processor}, ${machine.cores} cores, ${machine.memoryGb} GB; Node ${machine.node}; SciPy ${machine.scipy ?? MISSING}
- Load average ${machine.load[0].toFixed(1)} before, ${machine.load[1].toFixed(1)} after (the bench itself is 1 to 2)
${[coldTable(cold), warmTable(warm), changeTable(warm), rivalTables(rival, rivalName)].join("")}`;
}

const ERRORS = ["R error %", "L error %", "power error %"];

function coldTable(rows: readonly ColdRow[]): string {
  return section(
    "Time to accuracy, whole command",
    `\`npm run --silent emberturn -- solve FILE --json\` from its start to its end, and \`node .ci/emberturn.mjs\` without npm. Both states, grids and
bars included. Memory: the solving process's peak resident set, as its result document tells. Errors: the worse of both states, against our own
finite-element figures (open cases) or the battery's truth (pin-400k).`,
    ["case", "asked %", "command, s", "without npm, s", "peak, MB", "unknowns", ...ERRORS, "bars met"],
    rows.map((row) => [
      row.name,
      `${row.accuracy}`,
      seconds(row.command),
      row.direct.length === 0 ? "" : seconds(row.direct),
      megabytes(row.peakBytes),
      grouped(row.unknowns),
      ...errorCells(row.errors),
      row.met ? "yes" : "**no**",
    ]),
  );
}

function warmTable(rows: readonly WarmRow[]): string {
  return section(
    "Time to accuracy, warm worker",
    `\`predict\` in a thread that has solved before: check, grid, both states, bars and result. No design is solved twice: each run's part is longer than
the last one's by a part in 10⁸.`,
    ["case", "asked %", "seconds", "unknowns", ...ERRORS, "bars met"],
    rows.map((row) => [
      row.name,
      `${row.accuracy}`,
      seconds(row.fresh),
      grouped(row.unknowns),
      ...errorCells(row.errors),
      row.met ? "yes" : "**no**",
    ]),
  );
}

function changeTable(rows: readonly WarmRow[]): string {
  return section(
    "A change of one number, warm worker",
    "After each such solve the frequency alone, then the part's resistivity alone made 5 % larger: time over that of the fresh solve before; grid kept: solved on the same patches.",
    ["case", "asked %", "frequency", "grid kept", "material", "grid kept"],
    rows
      .filter((row) => row.frequency.length > 0)
      .map(({ name, accuracy, frequency, material, sameGrid }) => [
        name,
        `${accuracy}`,
        plain(frequency),
        sameGrid.frequency ? "yes" : "no",
        plain(material),
        sameGrid.material ? "yes" : "no",
      ]),
  );
}

function rivalTables(rows: readonly RivalRow[], name: string): string {
  const [ours, theirs] = [(row: RivalRow) => row.ours, (row: RivalRow) => row.theirs];
  const growth = [ours, theirs].map((of) => growthOf(rows, of));
  const trends =
    growth[0] === null
      ? ""
      : `
Growth exponents p over these sizes (cost ∝ unknownsᵖ): factorisation + one solve ${pair(growth.map((g) => g?.time))}, peak memory ${pair(growth.map((g) => g?.memory))} (ours; SuperLU).
`;
  return `
## LDLᵀ against SuperLU

The matrices of ${name}, loaded, that \`predict\` factorises, on grids of several levels; complex symmetric, the same for both. One thread each, processes of
their own, in turn. SuperLU: \`scipy.sparse.linalg.splu\`, \`permc_spec="MMD_AT_PLUS_A"\`, \`SymmetricMode\`, \`diag_pivot_thresh=0\`; with the ordering known: the same
on the matrix permuted beforehand, \`NATURAL\` (it still analyses; ours does not). Both have solved the smallest grid's system before the clock starts; "cold": processes
that have not (ours compiles as it goes). Memory, for both alike: the kernel's peak resident set (VmHWM) of the process's first factorisation and solve, less the
resident set with the matrix loaded; the C library told to give freed memory back at once. Entries: L with D; SuperLU keeps U as well. Backward error: max |b − Ax| / (|A||x| + |b|), one solve, no refinement.
${rows.map(rivalTable).join("")}${trends}`;
}

const pair = (values: readonly (number | undefined)[]): string =>
  values.map((x) => (x === undefined ? MISSING : x.toFixed(2))).join("; ");

/** Exponents of time and memory; null where not every size was run. */
function growthOf(
  rows: readonly RivalRow[],
  of: (row: RivalRow) => Program | null,
): { time: number; memory: number } | null {
  const programs = rows.map(of).filter((p) => p !== null);
  if (programs.length < rows.length || rows.length < 2) return null;
  const sizes = rows.map((row) => row.unknowns);
  const medians = (key: (p: Program) => readonly number[]): number[] =>
    programs.map((p) => spreadOf(key(p)).median);
  return { time: growthExponent(sizes, medians(whole)), memory: growthExponent(sizes, medians(peak)) };
}

const flat = (runs: readonly Run[], key: (run: Run) => readonly number[]): number[] => runs.flatMap(key);
const factor = (p: Program): number[] => flat(p.warm, (run) => run.factor);
const again = (p: Program): number[] => flat(p.warm, (run) => run.again);
const solve = (p: Program): number[] => flat(p.warm, (run) => run.solve);
const whole = (p: Program): number[] =>
  flat(
    p.warm,
    sums((run) => run.factor, 0),
  );
const reused = (p: Program): number[] =>
  flat(
    p.warm,
    sums((run) => run.again, 1),
  );
const peak = (p: Program): number[] => p.lean.map((run) => run.peakBytes);
const coldWhole = (p: Program): number[] =>
  flat(
    p.cold,
    sums((run) => run.factor, 0),
  );
const coldPeak = (p: Program): number[] => p.cold.map((run) => run.peakBytes);

/** Factorisations with the solve of the same repetition; of the repetition after where the first has none. */
function sums(key: (run: Run) => readonly number[], offset: number): (run: Run) => number[] {
  return (run) => key(run).map((t, k) => t + (run.solve[k + offset] ?? Number.NaN));
}

function rivalTable({ unknowns, nonzeros, ours, theirs }: RivalRow): string {
  const row = (
    label: string,
    of: (p: Program) => readonly number[],
    show: (values: readonly number[]) => string,
  ): string[] => [
    label,
    show(of(ours)),
    theirs === null ? MISSING : show(of(theirs)),
    theirs === null ? "" : ratio(of(ours), of(theirs)),
  ];
  return section(
    `${grouped(unknowns)} unknowns, ${grouped(nonzeros)} numbers in A`,
    null,
    ["", "LDLᵀ", "SuperLU", "ratio"],
    [
      row("**factorisation + one solve**, ordering included, ms", whole, milliseconds),
      row("the same, ordering known, ms", reused, milliseconds),
      row("ordering, analysis, factorisation, ms", factor, milliseconds),
      row("factorisation, ordering known, ms", again, milliseconds),
      row("one solve, ms", solve, milliseconds),
      row("**peak memory**, MB", peak, megabytes),
      row("entries, millions", (p) => p.warm.map((run) => run.entries / 1e6), plain),
      [
        "backward error",
        ours.backwardError.toExponential(0),
        theirs?.backwardError.toExponential(0) ?? MISSING,
        "",
      ],
      row("cold: factorisation + one solve, ms", coldWhole, milliseconds),
      row("cold: peak memory, MB", coldPeak, megabytes),
    ],
    "###",
  );
}

const ratio = (ours: readonly number[], theirs: readonly number[]): string =>
  `${(spreadOf(ours).median / spreadOf(theirs).median).toFixed(2)} ×`;

function section(
  title: string,
  words: string | null,
  head: readonly string[],
  rows: readonly (readonly string[])[],
  mark = "##",
): string {
  if (rows.length === 0) return "";
  const lines = [head, head.map(() => "---"), ...rows].map((cells) => `| ${cells.join(" | ")} |`);
  return `\n${mark} ${title}\n\n${words === null ? "" : `${words}\n\n`}${lines.join("\n")}\n`;
}

/** "1.23 (1.20 – 1.31)", each number by `show`; the median alone where all agree to the shown digits. */
function withSpread(values: readonly number[], show: (x: number) => string): string {
  const { median, min, max }: Spread = spreadOf(values);
  if (!Number.isFinite(median)) return "not measured";
  const [low, high] = [show(min), show(max)];
  return low === high ? low : `${show(median)} (${low} – ${high})`;
}

const seconds = (values: readonly number[]): string => withSpread(values, (x) => x.toFixed(2));
const plain = (values: readonly number[]): string => withSpread(values, (x) => x.toFixed(2));
const milliseconds = (values: readonly number[]): string =>
  withSpread(values, (x) => `${Number((1e3 * x).toPrecision(3))}`);
const megabytes = (values: readonly number[]): string =>
  withSpread(values, (x) => `${Number((x / 1e6).toPrecision(3))}`);
const grouped = (n: number): string => n.toLocaleString("en").replaceAll(",", " ");
const errorCells = (e: Errors): string[] =>
  [e.resistance, e.inductance, e.power].map((x) => (100 * x).toFixed(3));
