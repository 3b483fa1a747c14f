import { describe, expect, it } from "vitest";
import { checkDesign } from "../../meshes/check.ts";
import demo from "../../meshes/examples/demo.json";
import { predict } from "../../meshes/predict.ts";
import { boundaryOf, chainsOf } from "./boundary.ts";
import { chainColours, ringsOf } from "./rings.ts";

/** Squares of 1 mm in a row along r from `from` on, corners counter-clockwise or, for every other, clockwise. */
function row(from: number, count: number): Float64Array {
  return Float64Array.from(
    Array.from({ length: count }, (_, k) => {
      const [r, s] = [from + k * 1e-3, from + (k + 1) * 1e-3];
      return k % 2 === 0 ? [r, 0, s, 0, s, 1e-3, r, 1e-3] : [r, 1e-3, s, 1e-3, s, 0, r, 0];
    }).flat(),
  );
}

/** Areas of the turned triangles, m². */
function area({ position, index }: { position: Float32Array; index: Uint32Array }): number {
  let sum = 0;
  const point = (v: number): [number, number, number] => [
    position[3 * v]!,
    position[3 * v + 1]!,
    position[3 * v + 2]!,
  ];
  for (let k = 0; k < index.length; k += 3) {
    const [a, b, c] = [point(index[k]!), point(index[k + 1]!), point(index[k + 2]!)];
    const [u, v] = [b.map((x, i) => x - a[i]!), c.map((x, i) => x - a[i]!)];
    sum +=
      Math.hypot(
        u[1]! * v[2]! - u[2]! * v[1]!,
        u[2]! * v[0]! - u[0]! * v[2]!,
        u[0]! * v[1]! - u[1]! * v[0]!,
      ) / 2;
  }
  return sum;
}

describe("the surface of cells", () => {
  it("is what only one cell has, run round with the body on the left, whichever way the cells run", () => {
    const boundary = boundaryOf({ corners: row(0.01, 5) });
    expect(boundary.cells).toHaveLength(12);
    const [chain, ...others] = chainsOf(boundary);
    expect(others).toHaveLength(0);
    expect(chain!.points).toHaveLength(13);
    expect(chain!.points[0]).toEqual(chain!.points[12]);
    const turned = chain!.points
      .slice(1)
      .reduce((sum, [r, z], k) => sum + chain!.points[k]![0] * z - r * chain!.points[k]![1], 0);
    expect(turned / 2).toBeCloseTo(5e-6, 12);
  });

  it("leaves the axis out", () => {
    const [chain] = chainsOf(boundaryOf({ corners: row(0, 3) }));
    expect(chain!.points).toHaveLength(8);
    expect([chain!.points[0]![0], chain!.points[7]![0]]).toEqual([0, 0]);
  });

  it("of the demo is two rings a tube and one line for the part, with the areas of torus and cylinder", () => {
    const { heat } = predict(checkDesign(demo));
    const chains = chainsOf(boundaryOf({ corners: Float32Array.from(heat.corners) }));
    expect(chains).toHaveLength(11);
    const areaOf = (role: string): number =>
      area(
        ringsOf(
          chains.filter(({ cells }) => heat.outlines[heat.outline[cells[0]!]!]!.role === role),
          0.1,
          200_000,
        ),
      );
    // Three quarters of 2πR·2πa for the tubes' outsides (a 4 mm) and bores (a 3 mm), five turns on R 25 mm; a cylinder's 2πRh + 2πR².
    const tori = 0.75 * 5 * 4 * Math.PI ** 2 * 0.025 * (0.004 + 0.003);
    const cylinder = 0.75 * 2 * Math.PI * 0.014 * (0.08 + 0.014);
    expect(areaOf("copper") / tori).toBeCloseTo(1, 2);
    expect(areaOf("part") / cylinder).toBeCloseTo(1, 2);
  });

  it("carries the colours of the cells beneath it, by length along it", () => {
    const corners = row(0.01, 3);
    const boundary = boundaryOf({ corners });
    const chains = chainsOf(boundary);
    const table = chainColours(chains, (cell) => 10 + cell, 80);
    // Of the eight sides of three squares in a row the outer ones have three each, the middle one two.
    const count = (colour: number): number => table.filter((value) => value === colour).length;
    expect([count(10), count(11), count(12)]).toEqual([30, 20, 30]);
    // Every side is 1 mm long and has ten colours: each lies over its own cell.
    for (let i = 0; i < 80; i++) {
      const [p, q] = [chains[0]!.points[Math.floor(i / 10)]!, chains[0]!.points[Math.floor(i / 10) + 1]!];
      const r = (p[0] + q[0]) / 2;
      expect(table[i]).toBe(10 + Math.max(0, Math.floor((r - 0.01) / 1e-3 - 1e-9)));
    }
  });

  it("keeps to the triangles it is allowed, and points outwards", () => {
    const rings = ringsOf(chainsOf(boundaryOf({ corners: row(0.01, 3) })), 0.03, 500);
    expect(rings.index.length / 3).toBeLessThanOrEqual(500);
    for (let v = 0; v < rings.position.length; v += 3) {
      const [x, y, w] = [rings.position[v]!, rings.position[v + 1]!, rings.position[v + 2]!];
      const out = [Math.hypot(x, w) - 0.0115, y - 0.0005] as const;
      const [nx, ny, nw] = [rings.normal[v]!, rings.normal[v + 1]!, rings.normal[v + 2]!];
      const radial = (nx * x + nw * w) / Math.hypot(x, w);
      expect(radial * out[0] + ny * out[1]).toBeGreaterThan(0);
      expect(Math.hypot(nx, ny, nw)).toBeCloseTo(1, 5);
    }
  });
});
