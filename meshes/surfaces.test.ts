import { describe, expect, it } from "vitest";
import type { Body, Piece, Point } from "./scene.ts";
import { extentOf, meanThickness, sphereSurface, surfaceDistance } from "./surfaces.ts";

const body = (...pieces: Piece[]): Body => ({
  name: "piece",
  role: "part",
  index: 0,
  heated: true,
  pieces,
  material: { resistivity: 1e-7, relativePermeability: 1, lossTangent: 0, saturation: null },
  cylinder: false,
});
const box = (inner: number, outer: number, low: number, high: number): Piece => ({
  kind: "polygon",
  points: [
    [inner, low],
    [outer, low],
    [outer, high],
    [inner, high],
  ],
});

describe("distance to the nearest surface", () => {
  it("of a solid cylinder: side and ends, the axis not", () => {
    const d = surfaceDistance(body(box(0, 10, -30, 30)));
    expect(d(0, 0)).toBeCloseTo(10, 12);
    expect(d(7, 5)).toBeCloseTo(3, 12);
    expect(d(2, 28)).toBeCloseTo(2, 12);
    expect(d(1, -29.5)).toBeCloseTo(0.5, 12);
  });

  it("of a tube: the bore counts", () => {
    const d = surfaceDistance(body(box(4, 10, -30, 30)));
    expect(d(5, 0)).toBeCloseTo(1, 12);
    expect(d(9.5, 0)).toBeCloseTo(0.5, 12);
  });

  it("of a sphere: radius less the way from its centre", () => {
    const d = surfaceDistance(body({ kind: "sphere", centreZ: 3, radius: 5 }));
    expect(d(0, 3)).toBeCloseTo(5, 12);
    expect(d(3, 7)).toBeCloseTo(0, 12);
    expect(d(0, -1)).toBeCloseTo(1, 12);
  });

  it("of a cone: the height over its slanted side", () => {
    const points: Point[] = [
      [0, 0],
      [3, 0],
      [0, 4],
    ];
    const d = surfaceDistance(body({ kind: "polygon", points }));
    // Line 4r + 3z = 12, length 5 of its normal.
    expect(d(1, 1)).toBeCloseTo(1, 12);
    expect(d(0.5, 2)).toBeCloseTo((12 - 2 - 6) / 5, 12);
  });

  it("beyond a side's end: to its corner", () => {
    const d = surfaceDistance(body(box(0, 10, 0, 10)));
    expect(d(13, 14)).toBeCloseTo(5, 12);
    expect(d(13, -4)).toBeCloseTo(5, 12);
  });

  it("of several pieces: the nearest of all", () => {
    const d = surfaceDistance(body(box(0, 10, -30, -10), { kind: "sphere", centreZ: 20, radius: 5 }));
    expect(d(0, -11)).toBeCloseTo(1, 12);
    expect(d(0, 16)).toBeCloseTo(1, 12);
  });
});

describe("extent", () => {
  it("of pieces together", () => {
    const found = extentOf(body(box(4, 10, -30, -10), box(2, 6, 5, 9)));
    expect(found).toEqual({ low: -30, high: 9, inner: 2, outer: 10 });
  });

  it("of a sphere reaches the axis", () => {
    const found = extentOf(body({ kind: "sphere", centreZ: 3, radius: 5 }));
    expect(found).toEqual({ low: -2, high: 8, inner: 0, outer: 5 });
  });
});

describe("thickness and surface", () => {
  it("a long rod is as thick as its diameter, a wide ring as its height, both from below", () => {
    expect(meanThickness(body(box(0, 10, -5000, 5000)))).toBeCloseTo(20, 1);
    expect(meanThickness(body(box(5000, 9000, 0, 10)))).toBeCloseTo(10, 1);
    expect(meanThickness(body(box(0, 10, -30, 30)))).toBeLessThan(20);
  });

  it("of a ball: as thick as its radius (half a circle over its arc), surface 4πa²; pieces add up", () => {
    const ball: Piece = { kind: "sphere", centreZ: 3, radius: 5 };
    expect(meanThickness(body(ball))).toBeCloseTo(5, 12);
    expect(sphereSurface(body(ball))).toBeCloseTo(100 * Math.PI, 10);
    expect(sphereSurface(body(ball, { ...ball, centreZ: 13 }))).toBeCloseTo(200 * Math.PI, 10);
    expect(sphereSurface(body(box(0, 10, -30, 30)))).toBeNull();
  });
});
