import { describe, expect, it } from "vitest";
import { MU0 } from "../constants.ts";
import { tensorPatches } from "../grid/patches.ts";
import { heatSampler } from "./density.ts";
import {
  AIR,
  ballMesh,
  COIL,
  COIL_TURNS,
  circuit,
  coilMaterials,
  coilMesh,
  part,
  prepared,
} from "./fixtures.ts";
import { type Losses, lossesOf } from "./losses.ts";
import { quantileDensity, sharesBelow, sliceShares } from "./observe.ts";
import type { Solution } from "./prepare.ts";
import { solveState } from "./solve.ts";
import { solveApplied } from "./sources.ts";

const B = 0.01;
const A = 0.01;
const HEIGHT = 0.007;
/** Low enough that the field passes the rod undisturbed: E = ωBr/2, p = σω²B²r²/4 (elementary), to (a/δ)⁴ of about 1e-10. */
const SLOW = 2;

/** A rod between natural ends, region 1, its cells deliberately out of step with slices and depths. */
function slowRod(): { s: Solution; losses: Losses } {
  const mesh = tensorPatches([0, 0.0037, 0.0071, A, 0.02], [0, 0.0012, 0.0041, HEIGHT], (r) =>
    r < A ? 1 : 0,
  );
  const s = solveApplied(prepared(mesh, 1, [-1, -1]), { materials: [AIR, part(1e-5)], omega: SLOW }, B);
  return { s, losses: lossesOf(s) };
}

describe("heat of a rod in a slow uniform field", () => {
  const { s, losses } = slowRod();

  it("is ω²B²r²/(4ρ) at every point, in pieces that fill the rod", () => {
    const read = heatSampler(s, 5);
    let volume = 0;
    for (let c = 0; c < s.prepared.grid.cellRegion.length; c++) {
      if (s.prepared.grid.cellRegion[c] !== 1) continue;
      const samples = read(c);
      for (let p = 0; p < samples.r.length; p++) {
        volume += samples.volume[p];
        const expected = (SLOW ** 2 * B ** 2 * samples.r[p] ** 2) / (4 * 1e-5);
        expect(Math.abs(samples.density[p] / expected - 1)).toBeLessThan(1e-6);
      }
    }
    expect(Math.abs(volume / (Math.PI * A * A * HEIGHT) - 1)).toBeLessThan(1e-12);
    const total = (Math.PI * HEIGHT * SLOW ** 2 * B ** 2 * A ** 4) / (8 * 1e-5);
    expect(Math.abs(losses.regionPower[1] / total - 1)).toBeLessThan(1e-6);
  });

  it("splits evenly into slices that cut its cells anywhere", () => {
    const heights = Array.from({ length: 9 }, (_v, k) => (k * HEIGHT) / 8);
    for (const share of sliceShares(s, losses, [1], heights)) expect(share).toBeCloseTo(1 / 8, 8);
  });

  it("lies within a depth d of the side by 1 − (1 − d/a)⁴", () => {
    const depths = [0, 0.0003, 0.001, 0.0029, 0.005, 0.02];
    const shares = sharesBelow(s, losses, [1], (r) => A - r, depths);
    depths.forEach((d, k) => {
      expect(Math.abs(shares[k] - (1 - Math.max(0, 1 - d / A) ** 4))).toBeLessThan(1e-3);
    });
  });

  it("stays below 99.9 % of its peak in 99.9 % of the volume, and is there at the side", () => {
    const peak = (SLOW ** 2 * B ** 2 * A ** 2) / (4 * 1e-5);
    const hot = quantileDensity(s, [1]);
    expect(Math.abs(hot.density / (0.999 * peak) - 1)).toBeLessThan(5e-4);
    expect(hot.r).toBeGreaterThan(0.999 * A);
    expect(quantileDensity(s, [1], 0.5).density / (0.5 * peak)).toBeCloseTo(1, 2);
  });

  it("knows the densities beside a quantile: p/peak is the share of volume below p", () => {
    const peak = (SLOW ** 2 * B ** 2 * A ** 2) / (4 * 1e-5);
    const { density, beside } = quantileDensity(s, [1], 0.9);
    for (const [got, share] of [
      [beside[0], 0.95],
      [density, 0.9],
      [beside[1], 0.85],
    ] as const)
      expect(Math.abs(got / (share * peak) - 1)).toBeLessThan(2e-3);
  });

  it("refuses a part that is not there", () => {
    expect(() => quantileDensity(s, [7])).toThrow(/no cell in regions 7/);
  });
});

describe("heat of a rod whose magnetisation lags", () => {
  // H = B/µ0 passes along the rod unchanged: p = ω Im(ν) |B_in|²/µ0 with B_in = B/ν (from P = ½ Re ∮ of the complex energy; Landau & Lifshitz §80).
  it("is ω µ0 µ'' H² everywhere", () => {
    const mesh = tensorPatches([0, 0.004, A, 0.02], [0, HEIGHT], (r) => (r < A ? 1 : 0));
    const lagging = { conductivity: 0, reluctivity: { re: 0.02, im: 0.001 }, turn: -1 };
    const s = solveApplied(prepared(mesh, 1, [-1, -1]), { materials: [AIR, lagging], omega: 1e4 }, B);
    const expected = (1e4 * 0.001 * (B / Math.hypot(0.02, 0.001)) ** 2) / MU0;
    const { density, cornerDensity } = heatSampler(s, 3)(0);
    for (const p of [...density, ...cornerDensity]) expect(Math.abs(p / expected - 1)).toBeLessThan(1e-9);
    expect(Math.abs(lossesOf(s).regionPower[1] / (expected * Math.PI * A * A * HEIGHT) - 1)).toBeLessThan(
      1e-12,
    );
  });
});

describe("heat in a thin skin", () => {
  // a/δ = 30: p ~ e^{−2x/δ} to O(δ/a); the share within d is 1 − e^{−2d/δ} (Smythe, Static and Dynamic Electricity, ch. 10), here to 2 %.
  it("lies within half, one and two skin depths by 63, 86 and 98 %", () => {
    const delta = A / 30;
    const first = 0.85 * delta;
    const lines = [0, 0.4 * A, 0.7 * A, A - 6 * first, A - 3 * first, A - first, A, 2 * A];
    const mesh = tensorPatches(lines, [0, 0.001], (r) => (r < A ? 1 : 0));
    const omega = (2 * 1e-6) / (MU0 * 50 * delta ** 2);
    const s = solveApplied(prepared(mesh, 1, [-1, -1]), { materials: [AIR, part(1e-6, 50)], omega }, B);
    const shares = sharesBelow(s, lossesOf(s), [1], (r) => A - r, [delta / 2, delta, 2 * delta]);
    shares.forEach((share, k) => {
      expect(Math.abs(share - (1 - Math.exp(-[1, 2, 4][k])))).toBeLessThan(0.02);
    });
  });
});

describe("heat of a coil's part", () => {
  it("has a density that integrates to the power of its cells, lag of the magnetisation included", () => {
    const materials = coilMaterials();
    materials[1] = { conductivity: 1e6, reluctivity: { re: 0.05, im: 0.005 }, turn: -1 };
    const p = prepared(coilMesh(), 1, COIL_TURNS);
    const s = solveState(p, { materials, omega: 2 * Math.PI * 2000 }, circuit([1, 1, 1]));
    const losses = lossesOf(s);
    const read = heatSampler(s, 24);
    const power = new Float64Array(materials.length);
    for (let c = 0; c < p.grid.cellRegion.length; c++) {
      const samples = read(c);
      for (let k = 0; k < samples.r.length; k++)
        power[p.grid.cellRegion[c]] += samples.volume[k] * samples.density[k];
    }
    for (let region = 1; region < 5; region++)
      expect(Math.abs(power[region] / losses.regionPower[region] - 1), `region ${region}`).toBeLessThan(2e-3);
    expect(power[0]).toBe(0);
    const heights = Array.from({ length: 9 }, (_v, k) => COIL.c * (k / 4 - 1));
    const shares = sliceShares(s, losses, [1], heights);
    expect(shares.reduce((a, b) => a + b, 0)).toBeCloseTo(1, 12);
  });

  it("on a curved part counts slices of equal volume of a slowly heated ball by their own integrals", () => {
    // p ∝ r²: ∫ over a slice of π r⁴/2 dz with r² = a² − z², as a polynomial.
    const a = 0.5;
    const mesh = ballMesh([a, 1], 2);
    const ball = prepared(mesh, 2, [-1, -1]);
    const s = solveApplied(ball, { materials: [part(1), AIR], omega: 1e-3 }, B);
    const heights = Array.from({ length: 9 }, (_v, k) => a * (k / 4 - 1));
    const shares = sliceShares(s, lossesOf(s), [0], heights);
    const integral = (z: number): number => a ** 4 * z - (2 * a * a * z ** 3) / 3 + z ** 5 / 5;
    const whole = integral(a) - integral(-a);
    shares.forEach((share, k) => {
      const expected = (integral(heights[k + 1]) - integral(heights[k])) / whole;
      expect(Math.abs(share - expected)).toBeLessThan(1e-3);
    });
  });
});
