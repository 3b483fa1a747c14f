/** Every check green, and red with one constant spoiled. Sources stand in each check and its table. */
import { describe, expect, it } from "vitest";
import { CHECKS } from "./cases/index.ts";
import { rowsOf, TRUE, turnsRed } from "./check.ts";

describe.each(CHECKS)("$id", (check) => {
  it("agrees with its source", () => {
    const off = rowsOf(check, TRUE).filter((row) => !row.passed);
    const told = off.map((row) => `${row.name}: ${row.computed} against ${row.expected} ± ${row.tolerance}`);
    expect(told).toEqual([]);
  });
  it("turns red when a constant is spoiled", () => {
    expect(turnsRed(check, check.spoiled)).toBe(true);
  });
});
