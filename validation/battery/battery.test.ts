/** Ten designs of the battery against their stored truths, and the judge itself against made-up ones. The whole battery: `npm run validate -- --all`. */
import { describe, expect, it } from "vitest";
import { checkDesign } from "../../meshes/check.ts";
import { BATTERY } from "./designs/index.ts";
import { type Judged, summary } from "./judge.ts";
import { outcomeOf } from "./run.ts";
import { readTruths } from "./store.ts";
import { documentText, type Truth } from "./truth.ts";

const truths = readTruths();
const chosen = BATTERY.filter((e) => e.tags.includes("ci"));

/** A truth moved by a factor in one figure. */
function spoilt(truth: Truth, path: string, factor: number): Truth {
  const [value, doubt] = truth.barred[path]!;
  return { ...truth, barred: { ...truth.barred, [path]: [value * factor, doubt] } };
}

describe("the battery", () => {
  it("has at least eighty designs under names of their own, every one fit to be solved", () => {
    expect(BATTERY.length).toBeGreaterThanOrEqual(80);
    expect(new Set(BATTERY.map((e) => e.id)).size).toBe(BATTERY.length);
    for (const entry of BATTERY) expect(() => checkDesign(entry.design), entry.id).not.toThrow();
  });

  it("has a stored truth for every design as it stands, finer than the grid predict stopped at", () => {
    for (const entry of BATTERY) {
      const truth = truths.get(entry.id);
      expect(truth?.design, entry.id).toBe(documentText(entry));
      expect(truth!.level, entry.id).toBeGreaterThan(truth!.stoppedAt);
    }
  });
});

describe("ten designs", () => {
  const rows: Judged[] = [];
  it.each(chosen)("$id: governed figures within what was asked, none missed by far", (entry) => {
    const outcome = outcomeOf(entry, truths.get(entry.id));
    rows.push(...outcome.rows);
    expect(outcome.met).toBe(true);
    const governed = outcome.rows.filter((r) => r.governed);
    expect(governed.length).toBeGreaterThanOrEqual(2);
    for (const r of governed) expect(100 * r.error, r.path).toBeLessThanOrEqual(outcome.accuracyPercent);
    for (const r of governed) expect(r.verdict, r.path).not.toBe("missed");
  });

  it("hold at least 95 % of their bars, which are at the median at most ten times the error", () => {
    expect(chosen.length).toBe(10);
    const all = summary(rows);
    expect(all.count).toBeGreaterThan(150);
    expect(all.coverage).toBeGreaterThanOrEqual(0.95);
    expect(all.medianRatio).toBeLessThanOrEqual(10);
  });
});

describe("the judge", () => {
  const entry = chosen[0]!;
  const truth = truths.get(entry.id)!;

  it("calls a figure missed that the truth lies a percent off", () => {
    const path = "empty.inductanceH";
    const row = outcomeOf(entry, spoilt(truth, path, 1.01)).rows.find((r) => r.path === path);
    expect(row?.verdict).toBe("missed");
    expect(row?.error).toBeCloseTo(0.01 / 1.01, 4);
  });

  it("refuses the truth of another design, and one that tells other figures", () => {
    expect(() => outcomeOf(entry, undefined)).toThrow(/no truth/);
    expect(() => outcomeOf(entry, { ...truth, design: "{}" })).toThrow(/older design/);
    expect(() => outcomeOf(entry, { ...truth, barred: {} })).toThrow(/truths/);
  });
});
