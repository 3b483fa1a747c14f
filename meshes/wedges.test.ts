import { describe, expect, it } from "vitest";
import { checkDesign } from "./check.ts";
import type { Xy } from "./planar.ts";
import { Refusal } from "./refusal.ts";
import { sharpestWedge, sineBetween } from "./wedges.ts";

const base: Xy[] = [
  [0, -10],
  [20, -10],
  [20, 0],
  [0, 0],
];
/** A block that stands on the base with one corner and opens by `rise` over 10. */
const tilted = (rise: number): Xy[] => [
  [10, 0],
  [20, rise],
  [20, 10],
  [10, 10],
];

describe("wedges between outlines that touch", () => {
  it.each([0.0001, 0.05, 0.1, 1, 5])("a rise of %d over 10 opens by its arc tangent", (rise) => {
    const sine = Math.sin(Math.atan2(rise, 10));
    expect(sharpestWedge(base, tilted(rise), 1e-9)).toBeCloseTo(sine, 12);
    expect(sharpestWedge(tilted(rise), base, 1e-9)).toBeCloseTo(sine, 12);
  });

  it("faces that lie on each other leave none, nor do bodies apart", () => {
    expect(sharpestWedge(base, tilted(0), 1e-9)).toBe(1);
    expect(
      sharpestWedge(
        base,
        tilted(1).map(([r, z]): Xy => [r, z + 1]),
        1e-9,
      ),
    ).toBe(1);
  });

  it("angles of 90° and more are none", () => {
    expect(sineBetween([1, 0], [0, 2])).toBe(1);
    expect(sineBetween([1, 0], [-1, 1e-3])).toBe(1);
    expect(sineBetween([1, 0], [1, 1])).toBeCloseTo(Math.SQRT1_2, 12);
  });
});

describe("designs with wedges", () => {
  const winding = { form: "helix", boreDiameterMm: 60, turns: 3, pitchMm: 8 };
  const conductor = { section: "roundBar", outsideDiameterMm: 6, material: "copper" };
  const check = (...outlines: (readonly Xy[])[]): string[] => {
    const parts = outlines.map((pointsMm) => ({
      shape: "outline",
      pointsMm,
      material: { resistivityOhmM: 2e-7 },
    }));
    try {
      checkDesign({ coil: { conductor, winding }, parts, drive: { frequencyHz: 1e4, currentA: 1 } });
    } catch (error) {
      if (error instanceof Refusal) return error.faults.map((f) => `${f.pointer}: ${f.detail}`);
      throw error;
    }
    return [];
  };

  it("of half a degree and more are taken, sharper ones refused at the later body", () => {
    expect(check(base, tilted(0.1))).toEqual([]);
    expect(check(base, tilted(0.05))).toEqual([
      "/parts/1: part 1 touches part 0 and leaves a wedge of 0.2865 degrees there, too sharp to resolve",
    ]);
    expect(check(tilted(0.05), base)).toHaveLength(1);
  });

  it("an edge may not creep away from the axis", () => {
    const cut = (r: number): Xy[] => [
      [0, 0],
      [10, 0],
      [10, 10],
      [r, 10],
    ];
    expect(check(cut(0.1))).toEqual([]);
    expect(check(cut(0))).toEqual([]);
    expect(check(cut(0.05))).toEqual([
      "/parts/0/pointsMm/0: an edge at point 0 (counted from 0) leaves the axis by less than 0.5 degrees",
    ]);
  });
});
