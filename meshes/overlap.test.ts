import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { ringSplitter } from "./overlap.ts";

type Corner = readonly [number, number];

/** Area moment ∫∫ r dr dz of a polygon (Pappus: volume/2π), counter-clockwise positive. */
function moment(points: readonly Corner[]): number {
  return points.reduce((sum, [r, z], i) => {
    const [r2, z2] = points[(i + 1) % points.length] ?? [0, 0];
    return sum + ((r * z2 - r2 * z) * (r + r2)) / 6;
  }, 0);
}

/** Points of the polygon where keep(point) ≥ 0 (Sutherland & Hodgman, Comm. ACM 17 (1974) 32): a check by other means. */
function clip(points: readonly Corner[], keep: (p: Corner) => number): Corner[] {
  return points.flatMap((p, i) => {
    const q = points[(i + 1) % points.length] ?? p;
    const [a, b] = [keep(p), keep(q)];
    const out: Corner[] = a >= 0 ? [p] : [];
    if (a >= 0 !== b >= 0) {
      const t = a / (a - b);
      out.push([p[0] + t * (q[0] - p[0]), p[1] + t * (q[1] - p[1])]);
    }
    return out;
  });
}

function shares(r: readonly number[], z: readonly number[], points: readonly Corner[]): number[] {
  const out = new Array<number>((r.length - 1) * (z.length - 1)).fill(0);
  const split = ringSplitter(Float64Array.from(r), Float64Array.from(z));
  split(Float64Array.from(points.flat()), (cell, share) => {
    out[cell] = (out[cell] ?? 0) + share;
  });
  return out;
}

const rLines = [0, 0.5, 1, 1.25, 3, 3.1, 4];
const zLines = [-2, -1.5, 0, 0.1, 0.7, 2];

describe("splitting a ring among cells", () => {
  it("gives a rectangle's shares of r² and z, and nothing to any other cell", () => {
    const box: Corner[] = [
      [0.8, -1.6],
      [1.1, -1.6],
      [1.1, 0.05],
      [0.8, 0.05],
    ];
    const total = 1.1 ** 2 - 0.8 ** 2;
    const parts = [(1 - 0.8 ** 2) / total, (1.1 ** 2 - 1) / total];
    const got = shares(rLines, zLines, box);
    [1, 2].forEach((i, n) => {
      [0.1, 1.5, 0.05].forEach((height, k) => {
        expect(got[i * 5 + k]).toBeCloseTo((parts[n] ?? 0) * (height / 1.65), 13);
      });
    });
    expect(got.filter((s) => s > 0).length).toBe(6);
  });

  it("leaves a ring that fills a cell, edge on edge, to that cell alone", () => {
    const cell: Corner[] = [
      [1, 0],
      [1.25, 0],
      [1.25, 0.1],
      [1, 0.1],
    ];
    expect(shares(rLines, zLines, cell).indexOf(1)).toBe(2 * 5 + 2);
  });

  it("agrees with clipping polygons one by one, for quadrilaterals of any shape and size (seed 23)", () => {
    const size = fc.double({ min: 1e-3, max: 1.9, noNaN: true });
    const angles = fc.tuple(
      ...[0, 1, 2, 3].map((k) => fc.double({ min: k + 0.05, max: k + 0.95, noNaN: true })),
    );
    const middle = fc.tuple(
      fc.double({ min: 0, max: 1, noNaN: true }),
      fc.double({ min: 0, max: 1, noNaN: true }),
    );
    const flat = fc.double({ min: 1e-3, max: 1, noNaN: true });
    fc.assert(
      fc.property(size, angles, middle, flat, (radius, turns, [u, v], squeeze) => {
        const centre: Corner = [radius + u * (4 - 2 * radius), -2 + radius + v * (4 - 2 * radius)];
        const points = turns.map((t): Corner => {
          const angle = (t * Math.PI) / 2;
          return [centre[0] + radius * Math.cos(angle), centre[1] + squeeze * radius * Math.sin(angle)];
        });
        const got = shares(rLines, zLines, points);
        expect(got.reduce((a, b) => a + b, 0)).toBeCloseTo(1, 12);
        const whole = moment(points);
        for (let i = 0; i < 6; i++) {
          const strip = clip(
            clip(points, ([r]) => r - (rLines[i] ?? 0)),
            ([r]) => (rLines[i + 1] ?? 0) - r,
          );
          for (let k = 0; k < 5; k++) {
            const piece = clip(
              clip(strip, ([, z]) => z - (zLines[k] ?? 0)),
              ([, z]) => (zLines[k + 1] ?? 0) - z,
            );
            if (piece.length === 0) expect(got[i * 5 + k]).toBe(0);
            expect(Math.abs((got[i * 5 + k] ?? 0) - moment(piece) / whole)).toBeLessThan(1e-9);
          }
        }
      }),
      { seed: 23, numRuns: 1000 },
    );
  });

  it("gives what stands out by rounding to the outermost cells", () => {
    const out: Corner[] = [
      [3.5, 1],
      [4 + 1e-12, 1],
      [4 + 1e-12, 2 + 1e-12],
      [3.5, 2 + 1e-12],
    ];
    expect(shares(rLines, zLines, out).at(-1)).toBe(1);
  });
});
