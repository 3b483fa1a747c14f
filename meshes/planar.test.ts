import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { outlineFaults } from "./outlines.ts";
import {
  area,
  inside,
  pointToSegment,
  polygonSeparation,
  segmentsMeet,
  toSurface,
  type Xy,
} from "./planar.ts";
import { type Figure, separation } from "./shapes.ts";

const box = (a: number, b: number, c: number, d: number): Xy[] => [
  [a, c],
  [b, c],
  [b, d],
  [a, d],
];
const TOUCH = 1e-9;

describe("distances and areas of known figures", () => {
  // Heron's 13-14-15 triangle has area 84.
  test("area", () => {
    const triangle: Xy[] = [
      [0, 0],
      [14, 0],
      [5, 12],
    ];
    expect(area(triangle)).toBe(84);
    expect(area(triangle.toReversed())).toBe(-84);
  });

  test("point and segment", () => {
    expect(pointToSegment([3, 4], [0, 0], [-1, 0])).toBe(5);
    expect(pointToSegment([1, 2], [0, 0], [4, 0])).toBe(2);
    expect(pointToSegment([4, 0], [0, 0], [4, 0])).toBe(0);
  });

  test("segments", () => {
    expect(segmentsMeet([0, 0], [2, 2], [0, 2], [2, 0])).toBe(true);
    expect(segmentsMeet([0, 0], [2, 2], [1, 1], [5, 0])).toBe(true);
    expect(segmentsMeet([0, 0], [2, 0], [3, 0], [5, 0])).toBe(false);
    expect(segmentsMeet([0, 0], [2, 0], [2, 0], [5, 0])).toBe(true);
    expect(segmentsMeet([0, 0], [0, 2], [1, 0], [1, 2])).toBe(false);
  });

  test("the axis is no surface, and what lies on it is inside", () => {
    const rod = box(0, 10, -20, 20);
    expect(toSurface([0, 0], rod)).toBe(10);
    expect(inside([0, 0], rod)).toBe(true);
    expect(inside([0, 21], rod)).toBe(false);
  });
});

describe("separation", () => {
  const apart = (a: readonly Xy[], b: readonly Xy[]) => polygonSeparation(a, b, TOUCH);

  test("touching along an edge, partly along an edge, and at a corner is no overlap", () => {
    for (const other of [box(10, 20, 0, 5), box(10, 20, 2, 9), box(10, 20, 5, 9)]) {
      expect(apart(box(0, 10, 0, 5), other)).toMatchObject({ overlap: 0, gap: 0 });
    }
  });

  test("rods of equal radius overlap by the height they share", () => {
    expect(apart(box(0, 15, 0, 50), box(0, 15, 48, 98)).overlap).toBeCloseTo(2, 12);
    expect(apart(box(5, 15, 0, 50), box(5, 15, 48, 98)).overlap).toBeCloseTo(2, 12);
  });

  test("equal figures overlap wholly", () => {
    expect(apart(box(3, 15, 0, 50), box(3, 15, 0, 50)).overlap).toBe(12);
    expect(apart(box(0, 15, 0, 50), box(0, 15, 0, 50)).overlap).toBe(15);
  });

  test("a cross overlaps though no corner lies inside the other", () => {
    expect(apart(box(0, 30, -1, 1), box(10, 20, -9, 9)).overlap).toBeGreaterThan(0.5);
  });

  test("a slanted contact is no overlap, and one step further in is", () => {
    const lower: Xy[] = [
      [0, 0],
      [9, 0],
      [0, 7],
    ];
    const upper: Xy[] = [
      [9, 0],
      [9, 7],
      [0, 7],
    ];
    expect(apart(lower, upper)).toMatchObject({ overlap: 0, gap: 0 });
    expect(
      apart(
        lower,
        upper.map(([r, z]): Xy => [r - 0.01, z]),
      ).overlap,
    ).toBeGreaterThan(0.004);
  });

  test("a ball in the bore, on the axis and in the wall of a tube", () => {
    const tube: Figure = { kind: "polygon", points: box(10, 20, -20, 20) };
    const ball = (radius: number): Figure => ({ kind: "disc", r: 0, z: 3, radius });
    expect(separation(ball(8), tube, TOUCH)).toMatchObject({ overlap: 0, gap: 2 });
    expect(separation(tube, ball(10), TOUCH)).toMatchObject({ overlap: 0, gap: 0 });
    expect(separation(ball(11.5), tube, TOUCH).overlap).toBeCloseTo(1.5, 12);
    const rod: Figure = { kind: "polygon", points: box(0, 20, -20, 20) };
    expect(separation(ball(5), rod, TOUCH).overlap).toBeCloseTo(22, 12);
  });

  // Two boxes overlap exactly when their sides do; the gap of separate ones is their sides' distance.
  test("boxes against their own rule (seed 1307)", () => {
    const side = fc.tuple(fc.integer({ min: 0, max: 12 }), fc.integer({ min: 1, max: 6 }));
    fc.assert(
      fc.property(side, side, side, side, ([a, da], [c, dc], [e, de], [g, dg]) => {
        const found = apart(box(a, a + da, c, c + dc), box(e, e + de, g, g + dg));
        const [dr, dz] = [Math.max(e - a - da, a - e - de), Math.max(g - c - dc, c - g - dg)];
        expect(found.overlap > 0).toBe(dr < 0 && dz < 0);
        if (found.overlap === 0)
          expect(found.gap).toBeCloseTo(Math.hypot(Math.max(0, dr), Math.max(0, dz)), 12);
      }),
      { seed: 1307, numRuns: 2000 },
    );
  });

  // Triangles of whole numbers against a count of points of a fine lattice inside both.
  test("triangles against a lattice (seed 1309)", () => {
    const corner = fc.tuple(fc.integer({ min: 1, max: 9 }), fc.integer({ min: 0, max: 8 }));
    fc.assert(
      fc.property(fc.tuple(corner, corner, corner), fc.tuple(corner, corner, corner), (s, t) => {
        fc.pre(area(s) !== 0 && area(t) !== 0);
        const turned = (p: readonly Xy[]) => (area(p) > 0 ? p : p.toReversed());
        const [a, b] = [turned(s), turned(t)];
        const { overlap } = apart(a, b);
        if (latticeShares(a, b)) expect(overlap).toBeGreaterThan(0);
        if (overlap === 0) expect(latticeShares(a, b)).toBe(false);
        expect(apart(b, a).overlap).toBeCloseTo(overlap, 12);
      }),
      { seed: 1309, numRuns: 500 },
    );
  });
});

/** True when a lattice point lies clearly inside both. */
function latticeShares(a: readonly Xy[], b: readonly Xy[]): boolean {
  for (let r = 1.03; r < 9; r += 0.11) {
    for (let z = 0.03; z < 8; z += 0.11) {
      const deep = (q: readonly Xy[]) => inside([r, z], q) && toSurface([r, z], q) > 1e-3;
      if (deep(a) && deep(b)) return true;
    }
  }
  return false;
}

describe("outlines", () => {
  const detail = (points: Xy[]) => outlineFaults(points, "/p").map((f) => `${f.pointer}: ${f.detail}`);
  test.each<[string, Xy[], RegExp]>([
    [
      "crossing",
      [
        [0, 0],
        [10, 10],
        [10, 0],
        [0, 10],
      ],
      /^\/p: .*crosses itself near \[5, 5\].*0 to 1 and from point 2 to 3/,
    ],
    [
      "touching a corner",
      [
        [0, 0],
        [10, 0],
        [10, 10],
        [5, 0],
        [0, 10],
      ],
      /touches itself near \[5, 0\]/,
    ],
    [
      "touching from outside",
      [
        [0, 0],
        [9, 0],
        [9, 9],
        [6, 9],
        [4, 9],
        [5, 0.5],
        [4, 0],
        [0, 9],
      ],
      /touches itself/,
    ],
    [
      "on one line",
      [
        [1, 0],
        [2, 1],
        [4, 3],
      ],
      /no area: its points lie on one line/,
    ],
    [
      "a spike",
      [
        [0, 0],
        [10, 0],
        [10, 10],
        [10, 20],
        [10, 10],
        [0, 10],
      ],
      /^\/p\/3: .*folds back.*point 3/,
    ],
    [
      "a needle",
      [
        [0, 0],
        [10, 0],
        [10, 5],
        [90, 5.2],
        [10, 5.4],
        [10, 10],
        [0, 10],
      ],
      /^\/p\/3: .*folds back/,
    ],
    [
      "a point repeated",
      [
        [0, 0],
        [10, 0],
        [10, 0],
        [0, 10],
      ],
      /^\/p\/2: point 2 repeats point 1/,
    ],
    [
      "closed by hand",
      [
        [0, 0],
        [10, 0],
        [0, 10],
        [0, 0],
      ],
      /^\/p\/3: the last point repeats the first/,
    ],
  ])("%s", (_name, points, words) => {
    expect(detail(points)).toHaveLength(1);
    expect(detail(points)[0]).toMatch(words);
  });

  test.each<[string, Xy[]]>([
    [
      "clockwise",
      [
        [0, 0],
        [0, 10],
        [10, 10],
        [10, 0],
      ],
    ],
    [
      "undercut",
      [
        [0, 0],
        [10, 0],
        [10, 3],
        [4, 3],
        [4, 6],
        [10, 6],
        [10, 9],
        [0, 9],
      ],
    ],
    [
      "a tip on the axis",
      [
        [0, -5],
        [4, 0],
        [0, 5],
      ],
    ],
    [
      "points along an edge",
      [
        [0, 0],
        [5, 0],
        [10, 0],
        [10, 10],
        [0, 10],
      ],
    ],
  ])("%s is sound", (_name, points) => {
    expect(detail(points)).toEqual([]);
  });
});
