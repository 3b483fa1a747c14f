/** The report's words and the observed order, on made-up rows. */
import { describe, expect, it } from "vitest";
import { absoluteRow, type Check, relativeRow, rowsOf, TRUE, turnsRed } from "./check.ts";
import { observedOrder } from "./order.ts";
import { reportOf } from "./report.ts";

const check: Check = {
  id: "made-up",
  title: "Made up",
  method: "A length doubled.",
  why: "None needed.",
  spoiled: { conductivity: 1, permeability: 1, length: 1.02 },
  pieces: [
    ({ length }) => [relativeRow("twice", "Euclid", 2, { value: 2 * length, bar: 1e-3 }, 0.01)],
    ({ length }) => [absoluteRow("none", "Euclid", 0, { value: length - 1, bar: null }, 0.01)],
  ],
};

describe("report", () => {
  it("says agrees and off, sources and spoiled constants, and the same for the same rows", () => {
    const good = reportOf([{ check, rows: rowsOf(check, TRUE) }]);
    expect(good).toContain("2 of 2 figures agree, in 1 checks");
    expect(good).toContain("| twice | 2 | 2 | 0.0e+0 | 5.0e-4 | 1.0e-2 | agrees |");
    expect(good).toContain("length × 1.02");
    expect(reportOf([{ check, rows: rowsOf(check, TRUE) }])).toBe(good);
    const bad = reportOf([{ check, rows: rowsOf(check, check.spoiled) }]);
    expect(bad).toContain("0 of 2 figures agree");
    expect(bad).toContain("**off**");
  });
  it("turns red only when spoiled", () => {
    expect(turnsRed(check, TRUE)).toBe(false);
    expect(turnsRed(check, check.spoiled)).toBe(true);
  });
  it("counts a figure that is no number as off", () => {
    expect(relativeRow("nothing", "", 1, { value: Number.NaN, bar: null }, 1).passed).toBe(false);
  });
});

describe("observed order", () => {
  it("finds the power of an error that falls as one", () => {
    const levels = [1, 2, 3, 5];
    expect(
      observedOrder(
        levels,
        levels.map((n) => 0.3 * n ** -4),
      ),
    ).toBeCloseTo(4, 12);
    expect(
      observedOrder(
        levels,
        levels.map(() => -0.02),
      ),
    ).toBeCloseTo(0, 12);
  });
});
