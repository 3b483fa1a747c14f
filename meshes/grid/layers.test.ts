import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { depthProfile } from "./layers.ts";

const anyThickness = fc.double({ min: 1e-4, max: 100, noNaN: true });

/** Thicknesses of the layers, in the unit of the whole. */
const steps = (thickness: number, skin: number, through: boolean): number[] => {
  const depths = [0, ...depthProfile(thickness, skin, through)];
  return depths.slice(1).map((d, k) => thickness * (d - (depths[k] ?? 0)));
};

describe("depths of layers", () => {
  it("rise from the surface to the whole thickness (seed 41)", () => {
    fc.assert(
      fc.property(anyThickness, fc.boolean(), (thickness, through) => {
        const found = steps(thickness, 1, through);
        expect(found.every((s) => s > 0)).toBe(true);
        expect(found.reduce((a, b) => a + b, 0)).toBeCloseTo(thickness, 9);
        expect(depthProfile(thickness, 1, through).at(-1)).toBe(1);
      }),
      { seed: 41 },
    );
  });

  it("the first is at most 0.84 δ thick wherever layers go right through (seed 43)", () => {
    fc.assert(
      fc.property(anyThickness, (thickness) => {
        expect(steps(thickness, 1, true)[0]).toBeLessThan(0.75 / 0.9 + 1e-9);
      }),
      { seed: 43 },
    );
  });

  it("the full four are 0.75 δ (1, 1.5, 2.25, 3.375), beyond which e^−12 of the heat lies", () => {
    const full = 0.75 * (1 + 1.5 + 2.25 + 3.375);
    const found = steps(full, 1, false);
    [0.75, 1.125, 1.6875, 2.53125].forEach((s, k) => {
      expect(found[k]).toBeCloseTo(s, 12);
    });
    expect(found.length).toBe(4);
    expect(Math.exp(-2 * full)).toBeLessThan(1e-5);
  });

  it("depend on the ratio to δ alone (seed 47)", () => {
    fc.assert(
      fc.property(anyThickness, fc.double({ min: 1e-3, max: 1e3, noNaN: true }), (thickness, k) => {
        const [a, b] = [steps(thickness, 1, true), steps(k * thickness, k, true)];
        expect(b.length).toBe(a.length);
        a.forEach((s, i) => {
          expect((b[i] ?? 0) / k / s).toBeCloseTo(1, 9);
        });
      }),
      { seed: 47 },
    );
  });

  it("a wall of any thickness takes few: beyond the skin they grow by 2.5 each", () => {
    expect(depthProfile(1e4, 1, true).length).toBeLessThan(14);
    expect(depthProfile(0.01, 1, true)).toEqual([1]);
  });
});
