import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { magnitude, plus, product, ratio, relative, root, sure, times, type Uncertain } from "./uncertain.ts";

/** Numbers between a thousandth and a thousand, either sign, known to 0.1 % at best. */
const number = fc
  .record({
    size: fc.double({ min: 1e-3, max: 1e3, noNaN: true }),
    sign: fc.constantFrom(1, -1),
    part: fc.double({ min: 0, max: 1e-3, noNaN: true }),
  })
  .map(({ size, sign, part }): Uncertain => ({ value: sign * size, plusMinus: part * size }));
const positive = number.map((u): Uncertain => ({ ...u, value: Math.abs(u.value) }));

/** Ends and middle of what a number may be. */
const within = (u: Uncertain): number[] => [-1, -0.4, 0, 0.7, 1].map((t) => u.value + t * u.plusMinus);

/** True when u holds x but for the second order, (0.1 %)², and rounding. */
function holds(u: Uncertain, x: number): void {
  expect(Math.abs(x - u.value)).toBeLessThanOrEqual(u.plusMinus * (1 + 4e-3) + 1e-12 * Math.abs(u.value));
}

describe("every operation holds all that its operands may be, and no more than the worst of it", () => {
  const pairs: [string, (a: Uncertain, b: Uncertain) => Uncertain, (a: number, b: number) => number][] = [
    ["plus", plus, (a, b) => a + b],
    ["product", product, (a, b) => a * b],
    ["ratio", ratio, (a, b) => a / b],
    ["magnitude", magnitude, (a, b) => Math.hypot(a, b)],
  ];
  it.each(pairs)("%s (seed 31)", (_, operation, exact) => {
    fc.assert(
      fc.property(number, number, (a, b) => {
        const u = operation(a, b);
        const all = within(a).flatMap((x) => within(b).map((y) => exact(x, y)));
        for (const x of all) holds(u, x);
        expect(u.value).toBeCloseTo(exact(a.value, b.value), 9);
        const worst = Math.max(...all.map((x) => Math.abs(x - u.value)));
        expect(u.plusMinus).toBeLessThanOrEqual(worst * (1 + 4e-3) + 1e-12 * Math.abs(u.value));
      }),
      { seed: 31, numRuns: 200 },
    );
  });

  it("root and times (seed 37)", () => {
    fc.assert(
      fc.property(positive, fc.double({ min: -10, max: 10, noNaN: true }), (a, factor) => {
        for (const x of within(a)) {
          holds(root(a), Math.sqrt(x));
          holds(times(factor, a), factor * x);
        }
        expect(root(a).plusMinus / root(a).value).toBeCloseTo(relative(a) / 2, 12);
        expect(times(factor, a).plusMinus).toBeCloseTo(Math.abs(factor) * a.plusMinus, 12);
      }),
      { seed: 37, numRuns: 200 },
    );
  });
});

describe("nothing at all", () => {
  const zero = sure(0);
  it("has no width in any operation", () => {
    for (const u of [root(zero), magnitude(zero, zero), ratio(zero, zero), product(zero, sure(3))])
      expect(u).toEqual(zero);
    expect(relative(zero)).toBe(0);
  });

  it("with a width is infinitely uncertain beside itself", () => {
    expect(relative({ value: 0, plusMinus: 1 })).toBe(Infinity);
    expect(relative({ value: -4, plusMinus: 1 })).toBe(0.25);
  });
});
