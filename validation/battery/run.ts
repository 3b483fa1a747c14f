/** Solves the battery as a user would, judges every bar, tells progress and what came of it. */
import { writeFileSync } from "node:fs";
import { checkDesign } from "../../meshes/check.ts";
import { predict } from "../../meshes/predict.ts";
import { BATTERY, type Entry } from "./designs/index.ts";
import { type Judged, judged, summary, told } from "./judge.ts";
import { batteryReport, byKind, type Failure, type Outcome, verdicts } from "./report.ts";
import { readTruths } from "./store.ts";
import { tagsOf } from "./tags.ts";
import { documentText, type Truth } from "./truth.ts";

const REPORT = "validation/battery/REPORT.md";

/** Solves and judges one design. @throws Refusal, SolverError, MeshError; RangeError when the stored truth is another design's. */
export function outcomeOf(entry: Entry, truth: Truth | undefined): Outcome {
  if (truth === undefined)
    throw new RangeError(`no truth stored for ${entry.id}: npm run validate -- --make-truth`);
  if (truth.design !== documentText(entry))
    throw new RangeError(
      `the truth stored for ${entry.id} is of an older design: npm run validate -- --make-truth`,
    );
  const checked = checkDesign(entry.design);
  const { result } = predict(checked);
  const { unknowns, grids, seconds, accuracyMet } = result.numerics;
  return {
    id: entry.id,
    tags: tagsOf(entry, checked),
    unknowns,
    grids,
    seconds,
    met: accuracyMet,
    truthUnknowns: truth.unknowns,
    accuracyPercent: result.design.accuracyPercent,
    rows: judged(entry.id, result, truth),
    told: told(entry.id, result, truth),
  };
}

/** All designs; writes the report, prints the summary. True when everything wanted holds. */
export function runBattery(): boolean {
  const truths = readTruths();
  const started = performance.now();
  const outcomes: Outcome[] = [];
  const failures: Failure[] = [];
  for (const entry of BATTERY) {
    try {
      const outcome = outcomeOf(entry, truths.get(entry.id));
      outcomes.push(outcome);
      process.stderr.write(`${progressText(outcome)}\n`);
    } catch (error) {
      const message = error instanceof Error ? error.message : String(error);
      failures.push({ id: entry.id, message });
      process.stderr.write(`${entry.id}: failed: ${message}\n`);
    }
  }
  writeFileSync(REPORT, batteryReport({ outcomes, failures }));
  process.stdout.write(closing(outcomes, failures, (performance.now() - started) / 1000));
  return verdicts({ outcomes, failures }).passed;
}

function progressText({ id, rows, unknowns, seconds, met }: Outcome): string {
  const s = summary(rows);
  const off = rows.filter((r) => r.verdict !== "held").map((r) => `${r.path} ${ratio(r)}`);
  const words = `${id}: ${s.held} of ${s.count} bars held, ${unknowns} unknowns, ${seconds.toFixed(1)} s`;
  return `${words}${met ? "" : ", accuracy not met"}${off.length === 0 ? "" : `; off: ${off.join(", ")}`}`;
}

const ratio = (r: Judged): string => `(${(r.error / r.bar).toPrecision(2)} of its bar)`;

function closing(outcomes: readonly Outcome[], failures: readonly Failure[], seconds: number): string {
  const v = verdicts({ outcomes, failures });
  const kinds = [...byKind(outcomes.flatMap((o) => o.rows))].map(([kind, rows]) => {
    const s = summary(rows);
    return `  ${kind.padEnd(28)} ${String(s.held).padStart(4)} of ${String(s.count).padStart(4)}  ${(100 * s.coverage).toFixed(1).padStart(5)} %  bar/error ${s.medianRatio.toPrecision(2)}`;
  });
  const slowest = [...outcomes].sort((a, b) => b.seconds - a.seconds).slice(0, 8);
  const lines = [
    ...kinds,
    `coverage ${(100 * v.all.coverage).toFixed(2)} % of ${v.all.count} bars (${v.all.doubtful} doubtful, ${v.all.missed} missed), median bar/error ${v.all.medianRatio.toPrecision(2)}`,
    `worst governed error ${(100 * (v.worstGoverned?.error ?? 0)).toFixed(3)} % (${v.worstGoverned?.path ?? "none"} of ${v.worstGoverned?.id ?? "none"}), ${v.worstOverAsked.toPrecision(2)} of what was asked`,
    `accuracy not met: ${v.unmet.join(", ") || "none"}; failures: ${failures.map((f) => f.id).join(", ") || "none"}`,
    `slowest: ${slowest.map((o) => `${o.id} ${o.seconds.toFixed(1)} s (${o.unknowns})`).join(", ")}`,
    `${outcomes.length} designs in ${seconds.toFixed(0)} s; see ${REPORT}`,
  ];
  return `${lines.join("\n")}\n`;
}
