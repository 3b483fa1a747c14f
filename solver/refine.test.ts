import { describe, expect, it } from "vitest";
import { barsBetween, type Fall, type GridAnswer, nextLevel, refine, remaining } from "./refine.ts";

const SLOW: Fall = { order: 2, share: 1 };

/** What a grid of level n would say of a quantity whose error is a n⁻⁴ + b n^(−p), and of its two parts. */
function answer(level: number, truth: number, a: number, b: number, fall: Fall): GridAnswer {
  const smooth = a / level ** 4;
  const sharp = b / level ** fall.order;
  return {
    level,
    unknowns: 100 * level ** 2,
    values: new Map([["q", truth + smooth + sharp]]),
    parts: new Map([["q", [truth / 2 + smooth, truth / 2 + sharp]]]),
    falls: new Map([["q", fall]]),
  };
}

const error = (x: GridAnswer, truth: number): number => Math.abs((x.values.get("q") ?? 0) - truth);
const LEVELS = [
  [1, 2],
  [2, 3],
  [2, 4],
  [3, 5],
] as const;

describe("bars from two grids", () => {
  it.each([
    [1, 0, 2],
    [0, 1, 2],
    [1, -1, 2],
    [1, -0.2, 4 / 3],
    [-0.3, 1, 4 / 3],
    [0, 1, 1 / 2],
  ])("hold where the error is %d n⁻⁴ and %d n^−p, p = %d, whatever the slow part's share", (a, b, order) => {
    const fall = { order, share: 1 };
    for (const [m, n] of LEVELS) {
      const [coarse, fine] = [answer(m, 10, a, b, fall), answer(n, 10, a, b, fall)];
      const bar = barsBetween(coarse, fine).get("q") ?? 0;
      expect(bar * (1 + 1e-12)).toBeGreaterThanOrEqual(error(fine, 10));
      // Not padded: within a factor of what the larger part of the error could be.
      expect(bar).toBeLessThan(20 * (Math.abs(a) / m ** 4 + Math.abs(b) / m ** order));
    }
  });

  it.each([
    [2, 0.4],
    [4 / 3, 0.45],
    [4 / 3, 2 / 3],
    [1 / 3, 1 / 4],
  ])(
    "are the error itself where it falls just as said: order %d, share %d of the first movement",
    (order, share) => {
      // Movements from level 1 to 2: a (1 − 2⁻⁴) = 1 − share and b (1 − 2^−p) = share.
      const a = (1 - share) / (1 - 2 ** -4);
      const b = share / (1 - 2 ** -order);
      for (const [m, n] of LEVELS) {
        const [coarse, fine] = [m, n].map((level) => answer(level, 10, a, b, { order, share })) as [
          GridAnswer,
          GridAnswer,
        ];
        expect((barsBetween(coarse, fine).get("q") ?? 0) / error(fine, 10)).toBeCloseTo(1, 9);
      }
    },
  );

  it("hold for smaller shares, and are missed for larger ones", () => {
    const bar = (share: number): number => {
      const b = share / (1 - 2 ** -2);
      const a = (1 - share) / (1 - 2 ** -4);
      const [coarse, fine] = [1, 2].map((n) => answer(n, 10, a, b, { order: 2, share: 0.4 }));
      return coarse && fine ? (barsBetween(coarse, fine).get("q") ?? 0) / error(fine, 10) : 0;
    };
    expect(bar(0)).toBeGreaterThan(2);
    expect(bar(0.39)).toBeGreaterThan(1);
    expect(bar(0.41)).toBeLessThan(1);
  });

  it("with nothing slow are Richardson's of n⁻⁴: a fifteenth of the movement from 1 to 2", () => {
    expect(remaining({ order: 2, share: 0 }, 1, 2)).toBeCloseTo(1 / 15, 12);
    expect(remaining({ order: 2, share: 1 }, 1, 2)).toBeCloseTo(1 / 3, 12);
  });

  it("do not vanish where the two parts of the error cancel by chance", () => {
    // a (1 − 2⁻⁴) = b (1 − 2⁻²): level 1 and 2 agree to the last digit, and are both wrong.
    const [a, b] = [1, -(1 - 2 ** -4) / (1 - 2 ** -2)];
    const fall = { order: 2, share: 0.5 };
    const [coarse, fine] = [answer(1, 10, a, b, fall), answer(2, 10, a, b, fall)];
    expect((fine.values.get("q") ?? 0) - (coarse.values.get("q") ?? 0)).toBeCloseTo(0, 14);
    expect(barsBetween(coarse, fine).get("q")).toBeGreaterThan(error(fine, 10));
  });

  it("follow a value's kin where the value itself hides its error", () => {
    // Both parts of the error cancel in value and parts alike; an energy of the same field moves by a tenth of itself.
    const [coarse, fine] = [1, 2].map((n) => answer(n, 10, 0, 0, SLOW)) as [GridAnswer, GridAnswer];
    const kin = (value: number): Pick<GridAnswer, "kin"> => ({
      kin: new Map([["q", [{ value, weight: 5 }]]]),
    });
    const bar = barsBetween({ ...coarse, ...kin(2.2) }, { ...fine, ...kin(2) }).get("q");
    expect(bar).toBeCloseTo((5 * 0.1) / 3, 12);
    expect(barsBetween({ ...coarse, ...kin(0) }, { ...fine, ...kin(0) }).get("q")).toBe(0);
  });

  it("are never below what the value's rounding takes", () => {
    const [coarse, fine] = [1, 2].map((n) => answer(n, 0, 0, 0, SLOW)) as [GridAnswer, GridAnswer];
    expect(barsBetween(coarse, { ...fine, rounding: new Map([["q", 1e-9]]) }).get("q")).toBe(1e-9);
  });
});

describe("answers without a number", () => {
  const saying = (level: number, q: number): GridAnswer => ({
    ...answer(level, 10, 1, 1, SLOW),
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
    const [coarse, fine] = [answer(1, 10, 1, 1, SLOW), answer(2, 10, 1, 1, SLOW)];
    expect(() => barsBetween(coarse, { ...fine, falls: new Map() })).toThrow(/^q is /);
    expect(() => barsBetween({ ...coarse, values: new Map() }, fine)).toThrow(/^q is /);
  });
});

describe("refinement", () => {
  const solveAt = (level: number): GridAnswer => answer(level, 10, 1, 0.1, SLOW);
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
