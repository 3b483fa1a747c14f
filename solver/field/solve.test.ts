import { describe, expect, it } from "vitest";
import { cutGrid } from "../grid/cut.ts";
import { tensorPatches } from "../grid/patches.ts";
import type { RegionMaterial } from "../types.ts";
import {
  AIR,
  COIL_TURNS,
  circuit,
  coilMaterials,
  coilMesh,
  copper,
  observedOrder,
  prepared,
} from "./fixtures.ts";
import { lossesOf, powerBalance } from "./losses.ts";
import { prepare } from "./prepare.ts";
import { solveState } from "./solve.ts";

const OMEGA = 2 * Math.PI * 10000;
const SERIES = circuit([1, 1, 1]);
const p = prepared(coilMesh(), 1, COIL_TURNS);
const state = { materials: coilMaterials(), omega: OMEGA };
const solved = solveState(p, state, SERIES);

const relative = (a: number, b: number): number => Math.abs(a / b - 1);

describe("a coil and its part", () => {
  it("balances active and reactive power to rounding, also with a lagging part and opposed turns", () => {
    const lagging = coilMaterials();
    lagging[1] = { conductivity: 1e6, reluctivity: { re: 0.05, im: 0.01 }, turn: -1 };
    for (const s of [solved, solveState(p, { materials: lagging, omega: OMEGA }, circuit([1, -1, 1]))]) {
      const balance = powerBalance(s, lossesOf(s));
      expect(balance.active).toBeLessThan(1e-12);
      expect(balance.reactive).toBeLessThan(1e-12);
      expect(s.residual).toBeLessThan(1e-15);
    }
  });

  it("gives the lagging part of ν heat of its own: 2ω tan δ times the energy stored there", () => {
    const lossTangent = 0.02;
    const materials = coilMaterials();
    materials[1] = { conductivity: 0, reluctivity: { re: 0.1, im: 0.1 * lossTangent }, turn: -1 };
    const losses = lossesOf(solveState(p, { materials, omega: OMEGA }, SERIES));
    expect(relative(losses.regionPower[1], 2 * OMEGA * lossTangent * losses.regionEnergy[1])).toBeLessThan(
      1e-13,
    );
    expect(losses.regionPower[1]).toBeGreaterThan(0);
  });

  it("is reciprocal: Z_pq = Z_qp of two paths, and parallel paths share one voltage", () => {
    const s = solveState(p, state, circuit([1, 1, -1], [0, 1, 1]));
    const { re, im } = s.pathImpedances;
    expect(relative(re[1], re[2])).toBeLessThan(1e-12);
    expect(relative(im[1], im[2])).toBeLessThan(1e-12);
    expect(s.pathCurrents.re[0] + s.pathCurrents.re[1]).toBeCloseTo(1, 14);
    expect(s.pathCurrents.im[0] + s.pathCurrents.im[1]).toBeCloseTo(0, 14);
    for (const row of [0, 2]) {
      const [a, b] = [s.pathCurrents.re, s.pathCurrents.im];
      const vRe = re[row] * a[0] - im[row] * b[0] + re[row + 1] * a[1] - im[row + 1] * b[1];
      const vIm = re[row] * b[0] + im[row] * a[0] + re[row + 1] * b[1] + im[row + 1] * a[1];
      expect(relative(vRe, s.impedance.re)).toBeLessThan(1e-11);
      expect(relative(vIm, s.impedance.im)).toBeLessThan(1e-11);
    }
    expect(s.turnCurrents.re[2]).toBeCloseTo(-s.turnCurrents.re[1], 14);
    expect(powerBalance(s, lossesOf(s)).active).toBeLessThan(1e-12);
  });

  it("adds up: the series coil from the impedances of its turns", () => {
    const s = solveState(p, state, circuit([1, 1, 1], [0, 1, 2]));
    const total = s.pathImpedances.re.reduce((a, b) => a + b, 0);
    expect(relative(total, solved.impedance.re)).toBeLessThan(1e-11);
  });

  it("depends on σω alone: half the conductivity at twice the frequency doubles Z", () => {
    const materials = coilMaterials(5e-7);
    for (const k of [0, 1, 2]) materials[2 + k] = copper(k, 3.5e-8);
    const s = solveState(p, { materials, omega: 2 * OMEGA }, SERIES);
    expect(relative(s.impedance.re, 2 * solved.impedance.re)).toBeLessThan(1e-11);
    expect(relative(s.impedance.im, 2 * solved.impedance.im)).toBeLessThan(1e-11);
  });

  it("scales with length: ten times the size at a hundredth of the frequency has a tenth of Z", () => {
    const large = prepared(coilMesh(10), 1, COIL_TURNS);
    const s = solveState(large, { materials: coilMaterials(), omega: OMEGA / 100 }, SERIES);
    expect(relative(10 * s.impedance.re, solved.impedance.re)).toBeLessThan(1e-10);
    expect(relative(10 * s.impedance.im, solved.impedance.im)).toBeLessThan(1e-10);
  });

  it("turned upside down has the same impedance and the same power in each turn", () => {
    const mirrored = prepared(coilMesh(1, true), 1, COIL_TURNS);
    const s = solveState(mirrored, state, SERIES);
    expect(relative(s.impedance.re, solved.impedance.re)).toBeLessThan(1e-10);
    expect(relative(s.impedance.im, solved.impedance.im)).toBeLessThan(1e-10);
    const power = lossesOf(solved).turnPower;
    lossesOf(s).turnPower.forEach((w, k) => {
      expect(relative(w, power[k])).toBeLessThan(1e-10);
    });
  });

  it("takes ν cell by cell where it is given", () => {
    const { cellRegion } = p.grid;
    const re = Float64Array.from(cellRegion, (region) => state.materials[region].reluctivity.re);
    const bare = coilMaterials(2.5e-7, 1);
    const cellReluctivity = { re, im: new Float64Array(re.length) };
    const s = solveState(p, { materials: bare, omega: OMEGA, cellReluctivity }, SERIES);
    expect(s.impedance).toEqual(solved.impedance);
    expect(lossesOf(s).totalPower).toBe(lossesOf(solved).totalPower);
  });
});

describe("a rectangular ring at vanishing frequency", () => {
  // J ~ 1/r under one voltage: R = 2πρ/(h ln(b/a)) (elementary; e.g. Smythe, Static and Dynamic Electricity, ch. 6).
  it("has the resistance of circular current paths", () => {
    const mesh = tensorPatches([0, 0.01, 0.02, 0.03, 0.06], [-0.03, -0.005, 0.005, 0.03], (r, z) =>
      r > 0.02 && r < 0.03 && Math.abs(z) < 0.005 ? 1 : 0,
    );
    const s = solveState(
      prepared(mesh, 2, [-1, 0]),
      { materials: [AIR, copper(0, 2e-8)], omega: 1e-3 },
      circuit([1]),
    );
    const expected = (2 * Math.PI * 2e-8) / (0.01 * Math.log(1.5));
    expect(relative(s.impedance.re, expected)).toBeLessThan(2e-10);
  });
});

describe("convergence", () => {
  // Smooth case: a turn that fills the whole height between natural ends, d/δ about 2: nothing is singular. Theory: 4.
  it("is of at least third order in R and in L", () => {
    const mesh = tensorPatches([0, 0.01, 0.02, 0.03, 0.05], [0, 0.01], (r) => (r > 0.02 && r < 0.03 ? 1 : 0));
    const materials: RegionMaterial[] = [AIR, copper(0)];
    const levels = [1, 2, 4, 8, 24];
    const values = levels.map(
      (n) =>
        solveState(prepared(mesh, n, [-1, 0]), { materials, omega: 2 * Math.PI * 150 }, circuit([1]))
          .impedance,
    );
    const exact = values[4];
    const four = values.slice(0, 4);
    const orders = (["re", "im"] as const).map((part) =>
      observedOrder(
        levels.slice(0, 4),
        four.map((v) => v[part] - exact[part]),
      ),
    );
    expect(orders[0], `order of R ${orders[0]}`).toBeGreaterThan(3.5);
    expect(orders[1], `order of L ${orders[1]}`).toBeGreaterThan(3.5);
  });
});

describe("what does not fit", () => {
  const mesh = tensorPatches([0, 1, 2], [0, 1], (r) => (r > 1 ? 1 : 0));
  const small = prepared(mesh, 1, [-1, 0]);
  const materials = [AIR, copper(0)];
  const refusal = (f: () => unknown): string => {
    try {
      f();
    } catch (error) {
      return (error as { code: string }).code;
    }
    return "none";
  };
  it("is refused by name", () => {
    const omega = 1;
    const one = circuit([1]);
    expect(refusal(() => solveState(small, { materials, omega: 0 }, one))).toBe("materials");
    expect(refusal(() => solveState(small, { materials: [AIR], omega }, one))).toBe("materials");
    expect(refusal(() => solveState(small, { materials: [AIR, copper(1)], omega }, one))).toBe("materials");
    expect(refusal(() => solveState(small, { materials: [AIR, { ...AIR, turn: 0 }], omega }, one))).toBe(
      "materials",
    );
    const short = { re: new Float64Array(1), im: new Float64Array(1) };
    expect(refusal(() => solveState(small, { materials, omega, cellReluctivity: short }, one))).toBe(
      "materials",
    );
    expect(refusal(() => solveState(small, { materials, omega }, circuit([1, 1])))).toBe("circuit");
    expect(refusal(() => solveState(small, { materials, omega }, circuit([1], [1])))).toBe("circuit");
    expect(refusal(() => prepare(cutGrid(mesh, 1), [-1]))).toBe("materials");
  });

  it("stops at once when the caller's tick throws", () => {
    const stop = new Error("stop");
    for (const when of [0, 0.3, 0.95]) {
      const tick = (fraction: number): void => {
        if (fraction >= when) throw stop;
      };
      expect(() => solveState(small, { materials, omega: 1 }, circuit([1]), tick)).toThrow(stop);
      expect(() => prepare(cutGrid(mesh, 2), [-1, 0], tick)).toThrow(stop);
    }
  });
});
