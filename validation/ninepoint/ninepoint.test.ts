/** The independent scheme's own parts: its factorisation against dense elimination, its cells against exact integrals. */
import { describe, expect, it } from "vitest";
import { emptyCell, fillCell } from "./cells.ts";
import { Envelope, reverseCuthillMcKee } from "./envelope.ts";

describe("envelope factorisation", () => {
  const side = 7;
  const graph = Array.from({ length: side * side }, (_, i) => {
    const [x, y] = [i % side, Math.floor(i / side)];
    const near: number[] = [];
    for (let j = 0; j < side * side; j++) {
      const far = Math.max(Math.abs((j % side) - x), Math.abs(Math.floor(j / side) - y));
      if (far === 1) near.push(j);
    }
    return near;
  });
  const entry = (i: number, j: number): [number, number] =>
    i === j ? [9 + Math.sin(i), 1 + (i % 3)] : [-1 + 0.1 * Math.cos(i * j), 0.2 * Math.sin(i + j)];

  it("gives a permutation that keeps neighbours near", () => {
    const place = reverseCuthillMcKee(graph);
    expect([...place].sort((a, b) => a - b)).toEqual(graph.map((_, i) => i));
    const reach = Math.max(...graph.flatMap((row, i) => row.map((j) => Math.abs(place[i]! - place[j]!))));
    expect(reach).toBeLessThanOrEqual(3 * side);
  });

  it("solves to rounding: A x = b for a known x", () => {
    const matrix = new Envelope(graph);
    const n = graph.length;
    const x = Float64Array.from({ length: n }, (_, i) => Math.sin(3 * i));
    const y = Float64Array.from({ length: n }, (_, i) => Math.cos(5 * i));
    const b = { re: new Float64Array(n), im: new Float64Array(n) };
    graph.forEach((row, i) => {
      for (const j of [i, ...row]) {
        const [re, im] = entry(Math.min(i, j), Math.max(i, j));
        matrix.add(i, j, re, im);
        b.re[i]! += re * x[j]! - im * y[j]!;
        b.im[i]! += re * y[j]! + im * x[j]!;
      }
    });
    matrix.factorise();
    const got = matrix.solve(b);
    for (let i = 0; i < n; i++) {
      expect(Math.abs(got.re[i]! - x[i]!)).toBeLessThan(1e-13);
      expect(Math.abs(got.im[i]! - y[i]!)).toBeLessThan(1e-13);
    }
  });
});

describe("four-node cells", () => {
  it("integrate a rectangle exactly where the integrand is a polynomial", () => {
    const cell = emptyCell();
    fillCell([1, 3, 3, 1], [0, 0, 2, 2], false, cell);
    const total = (m: Float64Array): number => m.reduce((sum, v) => sum + v, 0);
    expect(total(cell.m)).toBeCloseTo(8, 12); // ∫ r dr dz
    expect(total(cell.c)).toBeCloseTo(4, 12); // the area
    // ∫ dr dz / r = 2 ln 3 by three Gauss points a direction, good to 6e-4 here.
    expect(Math.abs(cell.d / (2 * Math.log(3)) - 1)).toBeLessThan(6e-4);
  });

  it("hold a uniform field: A = r/2 has the energy of B = 1", () => {
    const cell = emptyCell();
    const r = [1, 3, 2.5, 1.2];
    const z = [0, 0.2, 2, 1.7];
    fillCell(r, z, false, cell);
    const energy = r.reduce(
      (s, ri, i) => s + r.reduce((t, rj, j) => t + (cell.k[4 * i + j]! * ri * rj) / 4, 0),
      0,
    );
    const volume = cell.m.reduce((sum, v) => sum + v, 0);
    expect(energy).toBeCloseTo(volume, 12);
  });
});
