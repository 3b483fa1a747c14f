import { describe, expect, test } from "vitest";
import { area } from "./planar.ts";
import { type Figure, isCylinder, piecesOf, tidied } from "./shapes.ts";

const material = { resistivityOhmM: 1e-6, relativePermeability: 1 };
const common = { name: "x", temperatureC: 20, heated: true, material } as const;

function heights(figures: readonly Figure[]): number[][] {
  return figures.map((f) => {
    if (f.kind === "disc") return [f.z - f.radius, f.z + f.radius];
    const z = f.points.map((p) => p[1]);
    return [Math.min(...z), Math.max(...z)];
  });
}

describe("pieces", () => {
  test("a cylinder is a rectangle, its corners on the axis where it has no bore", () => {
    const cylinder = {
      ...common,
      shape: "cylinder",
      diameterMm: 30,
      lengthMm: 90,
      boreDiameterMm: 0,
      centreZMm: 5,
    } as const;
    expect(piecesOf(cylinder)).toEqual([
      {
        kind: "polygon",
        points: [
          [0, -40],
          [15, -40],
          [15, 50],
          [0, 50],
        ],
      },
    ]);
    expect(isCylinder(cylinder)).toBe(true);
  });

  test("a sphere is a disc about the axis", () => {
    const sphere = { ...common, shape: "sphere", diameterMm: 30, centreZMm: 5 } as const;
    expect(piecesOf(sphere)).toEqual([{ kind: "disc", r: 0, z: 5, radius: 15 }]);
    expect(isCylinder(sphere)).toBe(false);
  });

  // count copies, gapMm clear between faces, the whole centred where `of` stands.
  test("a stack of washers", () => {
    const of = { shape: "cylinder", diameterMm: 30, lengthMm: 4, boreDiameterMm: 10, centreZMm: 7 } as const;
    const stack = { ...common, shape: "stack", count: 3, gapMm: 0.5, of } as const;
    expect(heights(piecesOf(stack))).toEqual([
      [0.5, 4.5],
      [5, 9],
      [9.5, 13.5],
    ]);
    expect(isCylinder(stack)).toBe(true);
  });

  test("washers without a gap are one solid", () => {
    const of = { shape: "cylinder", diameterMm: 30, lengthMm: 4, boreDiameterMm: 10, centreZMm: 7 } as const;
    expect(heights(piecesOf({ ...common, shape: "stack", count: 5, gapMm: 0, of }))).toEqual([[-3, 17]]);
  });

  test("a stack of outlines centres half-way between lowest and highest point", () => {
    const of = {
      shape: "outline",
      pointsMm: [
        [0, 10],
        [8, 10],
        [0, 16],
      ] as [number, number][],
    } as const;
    expect(heights(piecesOf({ ...common, shape: "stack", count: 2, gapMm: 2, of }))).toEqual([
      [6, 12],
      [14, 20],
    ]);
  });

  test("outlines come out counter-clockwise without collinear corners", () => {
    const clockwise = [
      [0, 0],
      [0, 4],
      [3, 4],
      [3, 2],
      [3, 0],
      [1, 0],
    ] as const;
    const points = tidied(clockwise);
    expect(points).toHaveLength(4);
    expect(area(points)).toBe(12);
  });
});
