import { describe, expect, it } from "vitest";
import { makeProbe } from "./evaluate.ts";
import { COIL_TURNS, circuit, coilMaterials, coilMesh, prepared } from "./fixtures.ts";
import { fieldOfRings, ringSources } from "./rings.ts";
import { solveState } from "./solve.ts";

const ready = prepared(coilMesh(), 2, COIL_TURNS);
const solution = solveState(
  ready,
  { materials: coilMaterials(), omega: 2 * Math.PI * 3000 },
  circuit([1, 1, 1]),
);
const rings = ringSources(solution);
const size = (f: { br: { re: number; im: number }; bz: { re: number; im: number } }): number =>
  Math.hypot(f.br.re, f.br.im, f.bz.re, f.bz.im);

describe("fields summed over ring sources", () => {
  const radius = ready.grid.exterior?.radius ?? 0;

  it.each([
    [1.3, 0.4],
    [0.2, 1.5],
    [0, 1.2],
    [0, -2],
    [3, 3],
  ])("agree with the exterior's multipoles at (%d, %d) radii, a magnetic part included", (a, b) => {
    // Two routes from one solution: sources inside against ψ on the outer circle.
    const probe = makeProbe(solution);
    const sum = fieldOfRings(rings, a * radius, b * radius);
    const poles = probe(a * radius, b * radius);
    expect(sum).not.toBeNull();
    if (sum === null) return;
    for (const k of ["br", "bz"] as const) {
      for (const part of ["re", "im"] as const) {
        expect(Math.abs(sum[k][part] - poles[k][part])).toBeLessThan(1e-3 * size(poles));
      }
    }
  });

  it("agree also where a magnetic part lags", () => {
    const materials = coilMaterials().map((m) =>
      m.reluctivity.re === 1 ? m : { ...m, reluctivity: { re: m.reluctivity.re, im: 0.3 } },
    );
    expect(materials.some((m) => m.reluctivity.im > 0)).toBe(true);
    const lagging = solveState(ready, { materials, omega: 2 * Math.PI * 3000 }, circuit([1, 1, 1]));
    const sum = fieldOfRings(ringSources(lagging), 0.9 * radius, 0.9 * radius);
    const poles = makeProbe(lagging)(0.9 * radius, 0.9 * radius);
    for (const k of ["br", "bz"] as const)
      for (const part of ["re", "im"] as const)
        expect(Math.abs((sum?.[k][part] ?? 9) - poles[k][part])).toBeLessThan(1e-3 * size(poles));
  });

  it("far away are those of the moment: (μ0/4π) 2m/d³ on the axis", () => {
    // A dipole's field falls with the cube of the distance (Jackson, Classical Electrodynamics, 5.56).
    const [d, k] = [100 * radius, 3];
    const near = fieldOfRings(rings, 0, d);
    const far = fieldOfRings(rings, 0, k * d);
    expect(near === null || far === null).toBe(false);
    if (near !== null && far !== null) expect(size(near) / size(far) / k ** 3).toBeCloseTo(1, 3);
  });

  it("are refused where a source is too near for a sum", () => {
    const [a, z] = [rings.cells[0], rings.cells[1]];
    expect(fieldOfRings(rings, a, z)).toBeNull();
  });

  it("off the axis and on it meet", () => {
    const on = fieldOfRings(rings, 0, 1.4 * radius);
    const off = fieldOfRings(rings, 1e-3 * radius, 1.4 * radius);
    expect(on === null || off === null).toBe(false);
    if (on !== null && off !== null) expect(off.bz.re / on.bz.re).toBeCloseTo(1, 4);
  });
});

describe("one thin ring", () => {
  it("on its axis: μ0 I a²/(2 d³), Biot and Savart", () => {
    const source = {
      sources: Float64Array.from([0.1, 0, 2, 1, 0, 0, 0, 0]),
      cells: Float64Array.from([0.1, 0, 1e-3]),
    };
    const z = 0.07;
    const exact = (4e-7 * Math.PI * 0.1 ** 2) / (2 * Math.hypot(0.1, z) ** 3);
    const on = fieldOfRings(source, 0, z);
    expect((on?.bz.re ?? 0) / (2 * exact)).toBeCloseTo(1, 12);
    expect((on?.bz.im ?? 0) / exact).toBeCloseTo(1, 12);
    const off = fieldOfRings(source, 1e-4, z);
    expect((off?.bz.re ?? 0) / (2 * exact)).toBeCloseTo(1, 5);
  });

  it.each([1e-3, 1e-4, 1e-6, 1e-8])(
    "%d m off its axis: the axis' field and half its slope, as div B = 0 asks",
    (r) => {
      const [a, z] = [0.1, 0.07];
      const source = {
        sources: Float64Array.from([a, 0, 1, 0, 0, 0, 0, 0]),
        cells: Float64Array.from([a, 0, 1e-3]),
      };
      const d = Math.hypot(a, z);
      const axis = (4e-7 * Math.PI * a * a) / (2 * d ** 3);
      const found = fieldOfRings(source, r, z);
      // B_z = axis + O(r²); B_r = −(r/2) d(axis)/dz = (3rz/2d²) axis, to the digits that B as a whole has.
      expect(Math.abs((found?.bz.re ?? 0) / axis - 1)).toBeLessThan(1e-6 + 50 * r * r);
      expect(Math.abs((found?.br.re ?? 0) / axis - (3 * r * z) / (2 * d * d))).toBeLessThan(
        1e-6 + 50 * r ** 3,
      );
    },
  );

  it.each([0, 0.03, 0.25])(
    "two opposed ones: nothing along z midway, and the bar of that is rounding, r = %d",
    (r) => {
      const [a, b] = [0.1, 0.04];
      const pair = {
        sources: Float64Array.from([a, -b, 1.7, 0.3, 0, 0, 0, 0, a, b, -1.7, -0.3, 0, 0, 0, 0]),
        cells: Float64Array.from([a, -b, 1e-3, a, b, 1e-3]),
      };
      const found = fieldOfRings(pair, r, 0);
      // One of them alone on the axis: µ0 I a²/(2 d³).
      const scale = (4e-7 * Math.PI * Math.hypot(1.7, 0.3) * a * a) / (2 * Math.hypot(a, b) ** 3);
      expect(found?.bz).toEqual({ re: 0, im: 0 });
      expect(found?.rounding).toBeGreaterThan(1e-16 * scale);
      expect(found?.rounding).toBeLessThan(1e-9 * scale);
      // Off the axis the pair's field is all radial, and is not lost.
      if (r > 0) expect(Math.abs(found?.br.re ?? 0)).toBeGreaterThan(0.01 * scale);
      // A ring stronger by 1e-9 shows.
      pair.sources[2] *= 1 + 1e-9;
      if (r < a) expect(Math.abs(fieldOfRings(pair, r, 0)?.bz.re ?? 0)).toBeGreaterThan(0);
    },
  );

  it("a dipole ring on the axis: the gradient of two opposed rings", () => {
    // m along z equals a small closed loop of current: two rings of radii a ± ε, currents ∓ m/(2ε·2πa)… as ψ of a magnetised shell.
    const [a, z, eps] = [0.1, 0.05, 1e-4];
    const moment = 1;
    const current = moment / (2 * Math.PI * a) / (2 * eps);
    const dipole = {
      sources: Float64Array.from([a, 0, 0, 0, 0, 0, moment, 0]),
      cells: Float64Array.from([a, 0, 1e-3]),
    };
    const loops = {
      sources: Float64Array.from([a - eps, 0, -current, 0, 0, 0, 0, 0, a + eps, 0, current, 0, 0, 0, 0, 0]),
      cells: Float64Array.from([a, 0, 1e-3]),
    };
    const [p, q] = [fieldOfRings(dipole, 0.03, z), fieldOfRings(loops, 0.03, z)];
    expect((p?.bz.re ?? 0) / (q?.bz.re ?? 1)).toBeCloseTo(1, 3);
    expect((p?.br.re ?? 0) / (q?.br.re ?? 1)).toBeCloseTo(1, 3);
  });
});
