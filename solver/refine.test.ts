import { describe, expect, it } from "vitest";
import { barsBetween, type GridAnswer, nextLevel, refine } from "./refine.ts";

/** What a grid of level n would say of a quantity whose error is a n⁻⁴ + b n^(−p), and of its two parts. */
function answer(level: number, truth: number, a: number, b: number, order: number): GridAnswer {
  const smooth = a / level ** 4;
  const sharp = b / level ** order;
  return {
    level,
    unknowns: 100 * level ** 2,
    values: new Map([["q", truth + smooth + sharp]]),
    parts: new Map([["q", [truth / 2 + smooth, truth / 2 + sharp]]]),
    orders: new Map([["q", order]]),
  };
}

const error = (x: GridAnswer, truth: number): number => Math.abs((x.values.get("q") ?? 0) - truth);

describe("bars from two grids", () => {
  it.each([
    [1, 0, 2],
    [0, 1, 2],
    [1, -1, 2],
    [1, -0.2, 4 / 3],
    [-0.3, 1, 4 / 3],
    [0, 1, 1 / 2],
  ])("hold where the error is %d n⁻⁴ and %d n^−p, p = %d", (a, b, order) => {
    for (const [m, n] of [
      [1, 2],
      [2, 3],
      [2, 4],
    ] as const) {
      const [coarse, fine] = [answer(m, 10, a, b, order), answer(n, 10, a, b, order)];
      const bar = barsBetween(coarse, fine).get("q") ?? 0;
      expect(bar * (1 + 1e-12)).toBeGreaterThanOrEqual(error(fine, 10));
      // Not padded: within a factor of what the larger part of the error could be.
      expect(bar).toBeLessThan(20 * (Math.abs(a) / m ** 4 + Math.abs(b) / m ** order));
    }
  });

  it("do not vanish where the two parts of the error cancel by chance", () => {
    // a (1 − 2⁻⁴) = b (1 − 2⁻²): level 1 and 2 agree to the last digit, and are both wrong.
    const [a, b] = [1, -(1 - 2 ** -4) / (1 - 2 ** -2)];
    const [coarse, fine] = [answer(1, 10, a, b, 2), answer(2, 10, a, b, 2)];
    expect((fine.values.get("q") ?? 0) - (coarse.values.get("q") ?? 0)).toBeCloseTo(0, 14);
    expect(barsBetween(coarse, fine).get("q")).toBeGreaterThan(error(fine, 10));
  });
});

describe("answers without a number", () => {
  const saying = (level: number, q: number): GridAnswer => ({
    ...answer(level, 10, 1, 1, 2),
    values: new Map([["q", q]]),
  });

  it.each([
    [Number.NaN, 10],
    [10, Number.NaN],
    [10, Infinity],
  ])("(%d, then %d) are named, not refined for ever", (a, b) => {
    expect(() => barsBetween(saying(1, a), saying(2, b))).toThrow(/^q is /);
  });

  it("nor is a value that has lost its order, or was not there before", () => {
    const [coarse, fine] = [answer(1, 10, 1, 1, 2), answer(2, 10, 1, 1, 2)];
    expect(() => barsBetween(coarse, { ...fine, orders: new Map() })).toThrow(/^q is /);
    expect(() => barsBetween({ ...coarse, values: new Map() }, fine)).toThrow(/^q is /);
  });
});

describe("refinement", () => {
  const solveAt = (level: number): GridAnswer => answer(level, 10, 1, 0.1, 2);
  const excess = (asked: number) => (_: GridAnswer, bars: ReadonlyMap<string, number>) =>
    (bars.get("q") ?? 0) / asked;

  it("goes on until what is asked holds, and it does", () => {
    const found = refine(solveAt, (n) => 100 * n * n, excess(1e-3), 1e6);
    expect(found.met).toBe(true);
    expect(found.bars.get("q")).toBeLessThanOrEqual(1e-3);
    expect(error(found.finest, 10)).toBeLessThanOrEqual(1e-3);
  });

  it("stops at the limit of unknowns and says so, with the bars it has", () => {
    const found = refine(solveAt, (n) => 100 * n * n, excess(1e-9), 2000);
    expect(found.met).toBe(false);
    expect(found.finest.unknowns).toBeLessThanOrEqual(2000);
    expect(error(found.finest, 10)).toBeLessThanOrEqual(found.bars.get("q") ?? 0);
  });

  it("takes the largest grid below the limit where the one it would like is above", () => {
    // From level 2 it would go to 4, 1600 unknowns; level 3 has 900.
    expect(refine(solveAt, (n) => 100 * n * n, excess(1e-9), 1000).finest.level).toBe(3);
  });

  it("raises the level by the third root of what the bars must shrink by", () => {
    expect(nextLevel(4, 2)).toBe(Math.ceil(4 * 2 ** (1 / 3)));
    expect(nextLevel(4, 1.5)).toBe(5);
    expect(nextLevel(4, 8)).toBe(8);
  });

  it("is content with two grids where they suffice", () => {
    expect(refine(solveAt, (n) => 100 * n * n, excess(10), 1e6).grids).toBe(2);
  });

  it("never more than doubles the level, and always raises it", () => {
    for (const factor of [1.01, 2, 8, 1e6]) {
      for (const level of [2, 3, 5]) {
        expect(nextLevel(level, factor)).toBeGreaterThan(level);
        expect(nextLevel(level, factor)).toBeLessThanOrEqual(2 * level);
      }
    }
  });
});
