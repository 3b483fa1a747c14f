/** The battery's report as Markdown. No date, no times: the same digits make the same file. */
import { type Judged, median, type Summary, summary, type Told } from "./judge.ts";

/** What became of one design. */
export interface Outcome {
  readonly id: string;
  readonly tags: readonly string[];
  readonly unknowns: number;
  readonly grids: number;
  readonly seconds: number;
  readonly met: boolean;
  readonly truthUnknowns: number;
  readonly accuracyPercent: number;
  readonly rows: readonly Judged[];
  readonly told: readonly Told[];
}

/** A design that gave no result. */
export interface Failure {
  readonly id: string;
  readonly message: string;
}

export interface Battery {
  readonly outcomes: readonly Outcome[];
  readonly failures: readonly Failure[];
}

/** Issue's demands, and whether they are met. */
export const LEAST_COVERAGE = 0.95;
export const MOST_RATIO = 10;

/** The figures a verdict hangs on, in words. */
export interface Verdicts {
  readonly all: Summary;
  readonly worstGoverned: Judged | null;
  /** Largest governed error over what its design asked. */
  readonly worstOverAsked: number;
  readonly unmet: readonly string[];
  readonly passed: boolean;
}

export function verdicts({ outcomes, failures }: Battery): Verdicts {
  const rows = outcomes.flatMap((o) => o.rows);
  const all = summary(rows);
  let worstGoverned: Judged | null = null;
  let worstOverAsked = 0;
  for (const o of outcomes)
    for (const row of o.rows) {
      const over = (100 * row.error) / o.accuracyPercent;
      if (!row.governed || over <= worstOverAsked) continue;
      worstGoverned = row;
      worstOverAsked = over;
    }
  const passed = failures.length === 0 && all.coverage >= LEAST_COVERAGE && all.medianRatio <= MOST_RATIO;
  const unmet = outcomes.filter((o) => !o.met).map((o) => o.id);
  return { all, worstGoverned, worstOverAsked, unmet, passed };
}

/** Rows by the kind of figure, in the order they come in. */
export function byKind(rows: readonly Judged[]): Map<string, Judged[]> {
  const groups = new Map<string, Judged[]>();
  for (const row of rows) groups.set(row.kind, [...(groups.get(row.kind) ?? []), row]);
  return groups;
}

const HEAD = `# The battery: are the bars true?

Written by \`npm run validate -- --all\`. Every design of \`designs/\` is solved by \`predict\` as a user would, and every figure that carries a bar is compared with
its truth in \`truth.json\`: our own solution two levels beyond the one \`predict\` stopped at when the truth was made (one where that passes 500 000
unknowns), on a grid laid for 0.7 times the frequency, so that its cells are others than \`predict\`'s; or a closed form. The truth's own doubt comes from its last
two levels; it is made by \`npm run validate -- --make-truth\`.

Held: the truth lies within the bar. Doubtful: outside the bar, but within bar and the truth's doubt together. Missed: outside both. Coverage counts what is held
alone. Figures that the drive fixes are not counted. Errors and bars are relative to the truth.
`;

export function batteryReport(battery: Battery): string {
  const { outcomes, failures } = battery;
  const v = verdicts(battery);
  const rows = outcomes.flatMap((o) => o.rows);
  const off = rows.filter((r) => r.verdict !== "held").sort((a, b) => b.error / b.bar - a.error / a.bar);
  return [
    HEAD,
    verdictText(v, battery),
    table(
      [
        "figure",
        "count",
        "held",
        "doubtful",
        "missed",
        "coverage %",
        "bar/error, median",
        "error, median",
        "error, worst",
      ],
      [...byKind(rows)]
        .map(([kind, of]) => [kind, ...summaryCells(summary(of))])
        .concat([["all", ...summaryCells(v.all)]]),
    ),
    `## Not held\n\n${off.length === 0 ? "None.\n" : offTable(off)}`,
    `## Failures\n\n${failures.length === 0 ? "None.\n" : failures.map((f) => `- ${f.id}: ${f.message}\n`).join("")}`,
    `## Figures without bars\n\nAgainst the same truths, for information: shares as they are, powers of turns in parts of the hottest turn's.\n\n${toldTable(outcomes)}`,
    `## What is covered\n\n${coverTable(outcomes)}`,
    `## Designs\n\n${designTable(outcomes)}`,
  ].join("\n");
}

function verdictText(v: Verdicts, { outcomes, failures }: Battery): string {
  const worst = v.worstGoverned;
  return `
- Designs solved: ${outcomes.length}; failures: ${failures.length}; short of the asked accuracy, told so by the result: ${v.unmet.length === 0 ? "none" : v.unmet.join(", ")}.
- Coverage: ${percent(v.all.coverage)} % of ${v.all.count} bars (wanted: at least ${100 * LEAST_COVERAGE}); ${v.all.doubtful} doubtful, ${v.all.missed} missed.
- Median of bar over error: ${short(v.all.medianRatio)} (wanted: at most ${MOST_RATIO}).
- Worst error of a governed figure: ${worst === null ? "none" : `${percent(worst.error, 3)} % (${worst.path} of ${worst.id})`}, ${short(v.worstOverAsked)} of what was asked.
`;
}

function offTable(off: readonly Judged[]): string {
  const cells = off.map((r) => [
    r.id,
    r.path,
    tiny(r.error),
    tiny(r.bar),
    short(r.error / r.bar),
    tiny(r.doubt),
    r.verdict,
  ]);
  return table(["design", "figure", "error", "bar", "error/bar", "truth's doubt", "verdict"], cells);
}

function toldTable(outcomes: readonly Outcome[]): string {
  const errors = new Map<string, number[]>();
  for (const t of outcomes.flatMap((o) => o.told))
    errors.set(t.kind, [...(errors.get(t.kind) ?? []), t.error]);
  const cells = [...errors].map(([kind, e]) => [
    kind,
    String(e.length),
    tiny(median(e)),
    tiny(Math.max(...e)),
  ]);
  return table(["figure", "count", "error, median", "error, worst"], cells);
}

function coverTable(outcomes: readonly Outcome[]): string {
  const counts = new Map<string, Outcome[]>();
  for (const o of outcomes) for (const t of o.tags) counts.set(t, [...(counts.get(t) ?? []), o]);
  const cells = [...counts]
    .sort(([a], [b]) => (a < b ? -1 : 1))
    .map(([tag, of]) => {
      const s = summary(of.flatMap((o) => o.rows));
      return [tag, String(of.length), String(s.count), percent(s.coverage), short(s.medianRatio)];
    });
  return table(["kind", "designs", "bars", "coverage %", "bar/error, median"], cells);
}

function designTable(outcomes: readonly Outcome[]): string {
  const cells = outcomes.map((o) => {
    const s = summary(o.rows);
    const governed = o.rows.filter((r) => r.governed);
    const worst = governed.reduce((most, r) => Math.max(most, r.error), 0);
    return [
      o.id,
      String(o.unknowns),
      String(o.grids),
      String(o.truthUnknowns),
      `${s.held}/${s.count}`,
      short(s.medianRatio),
      percent(worst, 3),
    ];
  });
  const heads = [
    "design",
    "unknowns",
    "grids",
    "truth's unknowns",
    "held",
    "bar/error, median",
    "worst governed error %",
  ];
  return table(heads, cells);
}

function summaryCells(s: Summary): string[] {
  const counts = [s.count, s.held, s.doubtful, s.missed].map(String);
  return [...counts, percent(s.coverage), short(s.medianRatio), tiny(s.medianError), tiny(s.worstError)];
}

function table(heads: readonly string[], cells: readonly (readonly string[])[]): string {
  const line = (of: readonly string[]): string => `| ${of.join(" | ")} |`;
  return `${[line(heads), line(heads.map(() => "---")), ...cells.map(line)].join("\n")}\n`;
}

const percent = (x: number, digits = 2): string => (100 * x).toFixed(digits);
const short = (x: number): string => (Number.isFinite(x) ? String(Number(x.toPrecision(2))) : "∞");
const tiny = (x: number): string => x.toExponential(1);
