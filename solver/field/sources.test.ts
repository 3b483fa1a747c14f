import { describe, expect, it } from "vitest";
import { MU0 } from "../constants.ts";
import { tensorPatches } from "../grid/patches.ts";
import { makeProbe } from "./evaluate.ts";
import { AIR, ballMesh, coilMesh, copper, observedOrder, openMesh, part, prepared } from "./fixtures.ts";
import { lossesOf } from "./losses.ts";
import type { Solution } from "./prepare.ts";
import { solveApplied, solvePrescribed } from "./sources.ts";
import { surfaceField } from "./surface.ts";

const B = 0.01;

/** Strip of an infinite rod of radius `a` in air up to 2a, natural ends; cells graded to the surface. */
function rod(n: number): Parameters<typeof solveApplied>[0] {
  const lines = [0, 0.3, 0.55, 0.75, 0.9, 1, 1.5, 2].map((x) => x * 0.01);
  return prepared(
    tensorPatches(lines, [0, 0.003], (r) => (r < 0.01 ? 1 : 0)),
    n,
    [-1, -1],
  );
}

/** ω at which the radius of a rod of 1e-6 Ω·m and this µ is so many skin depths. */
const omegaOf = (ratio: number, mu: number): number => (2 * 1e-6 * ratio ** 2) / (MU0 * mu * 0.01 ** 2);

/** Mean flux density over B µ: 2ψ(a)/(B µ a²), with the sign of exp(+jωt) µ' − jµ''. */
function effective(s: Solution, mu: number): { re: number; im: number } {
  const { r } = s.prepared.grid;
  const node = r.findIndex((x) => Math.abs(x - 0.01) < 1e-9);
  const scale = 2 / (B * mu * 0.01 ** 2);
  return { re: s.psi.re[node] * scale, im: -s.psi.im[node] * scale };
}

describe("an infinite rod along a uniform field", () => {
  // 2 J1(z)/(z J0(z)), z = (1−j) a/δ, after Förster & Stambke, Z. Metallkunde 45 (1954) (from memory), computed with mpmath: our own figures.
  const printed = [
    { ratio: 0.5, re: 0.9948300355, im: 0.06205572546 },
    { ratio: 1, re: 0.9255056536, im: 0.2244102659 },
    { ratio: 2, re: 0.5365336614, im: 0.369308373 },
    { ratio: 5, re: 0.2006371524, im: 0.17951723 },
  ];
  it("lets through the flux of the Bessel solution, and turns the field's power into heat", () => {
    const p = rod(4);
    for (const { ratio, re, im } of printed) {
      for (const mu of [1, 40]) {
        const omega = omegaOf(ratio, mu);
        const s = solveApplied(p, { materials: [AIR, part(1e-6, mu)], omega }, B);
        const found = effective(s, mu);
        expect(Math.abs(found.re / re - 1)).toBeLessThan(1e-5);
        expect(Math.abs(found.im / im - 1)).toBeLessThan(1e-5);
        const heat = omega * MU0 * mu * Math.PI * 1e-4 * (B / MU0) ** 2 * im * 0.003;
        expect(Math.abs(lossesOf(s).totalPower / heat - 1)).toBeLessThan(1e-5);
      }
    }
  });

  it("converges with the fourth order", () => {
    const levels = [1, 2, 4];
    const errors = levels.map(
      (n) =>
        effective(solveApplied(rod(n), { materials: [AIR, part(1e-6)], omega: omegaOf(2, 1) }, B), 1).im -
        printed[2].im,
    );
    expect(observedOrder(levels, errors), String(errors)).toBeGreaterThan(3.5);
  });

  it("has the applied field on its surface", () => {
    const s = solveApplied(rod(1), { materials: [AIR, part(1e-6, 40)], omega: omegaOf(5, 40) }, B);
    const surface = surfaceField(s, [1]);
    expect(Math.abs(surface.rms / (B / MU0) - 1)).toBeLessThan(1e-12);
    // The applied field is in phase with itself: all of it is owed to the real part.
    expect(Math.abs(surface.shares[0] / surface.rms - 1)).toBeLessThan(1e-12);
    expect(surface.shares[1] / surface.rms).toBeLessThan(1e-12);
    expect(Math.abs(surface.area / (2 * Math.PI * 0.01 * 0.003) - 1)).toBeLessThan(1e-13);
  });
});

describe("nothing but air in a uniform field", () => {
  it("has that field everywhere, inside and outside, also with copper that does not conduct yet", () => {
    const p = prepared(coilMesh(), 1, [-1, -1, -1, -1, -1]);
    const s = solveApplied(p, { materials: [AIR, AIR, AIR, AIR, AIR], omega: 1 }, B);
    const probe = makeProbe(s);
    for (const [r, z] of [
      [0, 0],
      [0, 0.15],
      [0.0301, 0.0123],
      [0.1, -0.1],
      [0.3, 0.2],
      [0, -1],
    ]) {
      const { br, bz, psi } = probe(r, z);
      expect(Math.abs(bz.re / B - 1)).toBeLessThan(1e-11);
      expect(Math.abs(br.re / B)).toBeLessThan(1e-11);
      expect(Math.abs(psi.re - (B * r * r) / 2)).toBeLessThan(1e-12 * B);
    }
  });
});

describe("a sphere in a uniform field", () => {
  // Jackson, Classical Electrodynamics, 3rd ed., eqs 5.115-5.117 with µ_r for ε_r: B_in = 3µ/(µ+2) B, moment ∝ (µ−1)/(µ+2) a³ B.
  const mu = 50;
  const a = 0.5;
  const magnet = { conductivity: 0, reluctivity: { re: 1 / mu, im: 0 }, turn: -1 };
  const solveBall = (n: number): Solution =>
    solveApplied(prepared(ballMesh([a, 1.2], 3), n, [-1, -1]), { materials: [magnet, AIR], omega: 1 }, B);
  const inside = (3 * mu * B) / (mu + 2);

  it("when magnetic has the uniform field of the closed form inside and a dipole's outside", () => {
    const levels = [1, 2, 4];
    const rho = Math.hypot(1, 2);
    const moment = ((mu - 1) / (mu + 2)) * a ** 3 * B;
    const errors = levels.map((n) => {
      const probe = makeProbe(solveBall(n));
      const far = probe(1, 2);
      return [
        probe(0, 0.1).bz.re / inside - 1,
        probe(0.2, -0.1).bz.re / inside - 1,
        far.bz.re / (B + (moment * (3 * 4 - rho ** 2)) / rho ** 5) - 1,
        far.br.re / ((moment * 3 * 2) / rho ** 5) - 1,
      ];
    });
    for (let k = 0; k < 4; k++) {
      expect(Math.abs(errors[2][k])).toBeLessThan(1e-4);
      const own = errors.map((e) => e[k]);
      expect(observedOrder(levels, own), `figure ${k}: ${own}`).toBeGreaterThan(3);
    }
  });

  it("has the tangential field H_in sin θ on its surface: H_in √(2/3) rms over 4πa²", () => {
    const surface = surfaceField(solveBall(4), [0]);
    expect(Math.abs(surface.area / (Math.PI * 4 * a * a) - 1)).toBeLessThan(1e-6);
    expect(Math.abs(surface.rms / ((inside / mu / MU0) * Math.sqrt(2 / 3)) - 1)).toBeLessThan(2e-4);
  });
});

describe("coils of prescribed current density", () => {
  /** Complete elliptic integrals K(k), E(k) by the arithmetic-geometric mean (Abramowitz & Stegun 17.6). */
  function elliptic(k2: number): { K: number; E: number } {
    let [a, b, sum, power] = [1, Math.sqrt(1 - k2), k2 / 2, 0.5];
    for (let i = 0; i < 30; i++) {
      const c = (a - b) / 2;
      [a, b] = [(a + b) / 2, Math.sqrt(a * b)];
      power *= 2;
      sum += power * c * c;
    }
    const K = Math.PI / (2 * a);
    return { K, E: K * (1 - sum) };
  }
  /** Mutual inductance of coaxial circles: Maxwell, Treatise, art. 701. */
  function mutual(a: number, b: number, d: number): number {
    const k2 = (4 * a * b) / ((a + b) ** 2 + d * d);
    const k = Math.sqrt(k2);
    const { K, E } = elliptic(k2);
    return MU0 * Math.sqrt(a * b) * ((2 / k - k) * K - (2 / k) * E);
  }
  const X = [-Math.sqrt(0.6), 0, Math.sqrt(0.6)];
  const W = [5 / 18, 8 / 18, 5 / 18];
  /** Mean of `mutual` over two squares of half-side h about (a, 0) and (b, d): three-point Gauss in each direction. */
  function mutualOfSquares(a: number, b: number, d: number, h: number): number {
    let sum = 0;
    for (let i = 0; i < 81; i++) {
      const [p, q, u, v] = [i % 3, Math.floor(i / 3) % 3, Math.floor(i / 9) % 3, Math.floor(i / 27)];
      const w = W[p] * W[q] * W[u] * W[v];
      sum += w * mutual(a + h * X[p], b + h * X[q], d + h * (X[u] - X[v]));
    }
    return sum;
  }
  const h = 0.002;
  const mesh = openMesh(
    [0, 0.01, 0.018, 0.022, 0.028, 0.032, 0.04, 0.05],
    [-0.04, -0.02, -0.006, -0.002, 0.002, 0.008, 0.012, 0.02, 0.04],
    (r, z) =>
      Math.abs(r - 0.03) < h && Math.abs(z) < h
        ? 1
        : Math.abs(r - 0.02) < h && Math.abs(z - 0.01) < h
          ? 2
          : 0,
    0.12,
    3,
  );
  const air = { materials: [AIR, AIR, AIR], omega: 1 };
  const solveRings = (n: number): ReturnType<typeof solvePrescribed> =>
    solvePrescribed(prepared(mesh, n, [-1, -1, -1]), air, [
      { region: 1, density: { re: 1e6, im: 0 } },
      { region: 2, density: { re: 0, im: 0 } },
    ]);

  it("link the flux of Maxwell's formula, converging to it", () => {
    const expected = mutualOfSquares(0.03, 0.02, 0.01, h);
    const levels = [1, 2, 4];
    const errors = levels.map((n) => {
      const [one, two] = solveRings(n).linkages;
      expect(one.current.re).toBeCloseTo(1e6 * 16e-6, 9);
      return two.linkage.re / one.current.re / expected - 1;
    });
    expect(Math.abs(errors[1])).toBeLessThan(1e-4);
    expect(Math.abs(errors[2])).toBeLessThan(1e-5);
    expect(observedOrder(levels, errors), String(errors)).toBeGreaterThan(3);
  });

  it("have on the axis the field µ0 I a²/(2 (a² + z²)^{3/2}) of a circle, meaned over the section, inside and outside", () => {
    const axial = (a: number, z: number): number => (MU0 * 16 * a * a) / (2 * (a * a + z * z) ** 1.5);
    const heights = [0.005, 0.07, 0.13, -0.5];
    const levels = [2, 4, 8];
    const errors = levels.map((n) => {
      const probe = makeProbe(solveRings(n));
      return heights.map((z) => {
        let expected = 0;
        for (let i = 0; i < 9; i++) {
          const [p, q] = [i % 3, Math.floor(i / 3)];
          expected += W[p] * W[q] * axial(0.03 + h * X[p], z - h * X[q]);
        }
        return probe(0, z).bz.re / expected - 1;
      });
    });
    // Between the tensor lines (0.005) and outside the fine and the far field; at 0.07 the test grid's coarse rings, second order.
    expect(Math.abs(errors[1][0])).toBeLessThan(1e-5);
    expect(Math.abs(errors[2][1])).toBeLessThan(1e-3);
    expect(Math.abs(errors[1][2])).toBeLessThan(1e-5);
    expect(Math.abs(errors[1][3])).toBeLessThan(1e-5);
    const coarse = errors.map((e) => e[1]);
    expect(observedOrder(levels, coarse), String(coarse)).toBeGreaterThan(1.9);
  });

  it("agree on the outer circle from within and from without", () => {
    const probe = makeProbe(solveRings(3));
    for (const angle of [0.3, 1, 1.6, 2.5]) {
      const at = (rho: number): ReturnType<typeof probe> =>
        probe(rho * Math.sin(angle), rho * Math.cos(angle));
      const [a, b] = [at(0.12 * (1 - 1e-4)), at(0.12 * (1 + 1e-4))];
      const size = Math.hypot(b.br.re, b.bz.re);
      expect(a.cell).toBeGreaterThanOrEqual(0);
      expect(b.cell).toBe(-1);
      expect(Math.hypot(a.br.re - b.br.re, a.bz.re - b.bz.re) / size).toBeLessThan(5e-3);
      expect(Math.abs(a.psi.re / b.psi.re - 1)).toBeLessThan(1e-3);
    }
  });

  it("induce no net current in a closed turn that nothing drives", () => {
    const p = prepared(mesh, 2, [-1, -1, 0]);
    const s = solveApplied(p, { materials: [AIR, AIR, copper(0)], omega: 1e4 }, B);
    const losses = lossesOf(s);
    // An open ring: u is its open-circuit voltage, jω times the mean flux; eddies alone heat it.
    expect(Math.abs(s.u.re[0] / ((B * 0.02 ** 2) / 2) - 1)).toBeLessThan(0.02);
    expect(losses.turnPower[0]).toBeGreaterThan(0);
  });
});
