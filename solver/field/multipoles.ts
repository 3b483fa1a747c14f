/**
 * The field outside the outer circle of radius R about (0, z0), which holds every current and every magnetic body:
 *
 *   ψ = Σ_n a_n (R/ρ)ⁿ (1 − c²) P_n'(c),   a_n = (2n+1)/(2n(n+1)) ∫_{−1}^{1} ψ(R, c) P_n'(c) dc,   c = cos θ,
 *   B_ρ = ρ⁻² Σ n(n+1) a_n (R/ρ)ⁿ P_n(c),   B_θ = ρ⁻² sin θ Σ n a_n (R/ρ)ⁿ P_n'(c),
 *
 * by the orthogonality of P_n¹ (Abramowitz & Stegun 8.14.13, from memory; derived here for P_n'). Regular on the axis. The integral is
 * taken along the circle's edges with the solution's own shape functions.
 */
import type { Complex } from "../types.ts";
import { exteriorTables } from "./axis.ts";
import type { Solution } from "./prepare.ts";
import { GAUSS4, NODES } from "./shape.ts";

/** Highest pole: with sources within R/1.3 the rest is below 0.2 % at the circle itself and falls with ρ⁻²⁵. */
export const POLES = 24;

/** a_n, Wb/rad, n = 1 … POLES at place n. */
export interface Multipoles {
  readonly radius: number;
  readonly centreZ: number;
  readonly re: Float64Array;
  readonly im: Float64Array;
}

/** Poles of a solution's field, an applied uniform field left out; null on a grid without an exterior. */
export function multipolesOf(solution: Solution): Multipoles | null {
  const { grid } = solution.prepared;
  const { exterior } = grid;
  if (exterior === null) return null;
  const re = new Float64Array(POLES + 1);
  const im = new Float64Array(POLES + 1);
  const { p, dp } = legendreBuffers();
  const along = exteriorTables(
    grid,
    exterior,
    GAUSS4.x,
    GAUSS4.x.map(() => -1),
  );
  for (let cell = 0; cell * NODES < exterior.cellNodes.length; cell++) {
    const first = cell * NODES;
    if (exterior.t[first] !== 1) continue;
    const { geometry, field } = along(cell);
    for (let k = 0; k < GAUSS4.x.length; k++) {
      let [c, dc, x, y] = [0, 0, 0, 0];
      for (let a = 0; a < 3; a++) {
        const node = exterior.cellNodes[first + a];
        c += geometry.n[k * NODES + a] * exterior.c[first + a];
        dc += geometry.dXi[k * NODES + a] * exterior.c[first + a];
        const f = field.n[k * NODES + a];
        x += f * (solution.psi.re[node] - (solution.applied * grid.r[node] ** 2) / 2);
        y += f * solution.psi.im[node];
      }
      legendre(c, p, dp);
      const w = GAUSS4.w[k] * Math.abs(dc);
      for (let n = 1; n <= POLES; n++) {
        const f = (w * dp[n] * (2 * n + 1)) / (2 * n * (n + 1));
        re[n] += f * x;
        im[n] += f * y;
      }
    }
  }
  return { radius: exterior.radius, centreZ: exterior.centreZ, re, im };
}

/** B_r and B_z (T) of the poles at (r, z) outside the circle, and ψ (Wb/rad). */
export function fieldOfPoles(
  poles: Multipoles,
  r: number,
  z: number,
): { br: Complex; bz: Complex; psi: Complex } {
  const rho = Math.hypot(r, z - poles.centreZ);
  const sine = r / rho;
  const cosine = (z - poles.centreZ) / rho;
  const { p, dp } = legendreBuffers();
  legendre(cosine, p, dp);
  const one = (a: Float64Array): [number, number, number] => {
    let [radial, polar, psi] = [0, 0, 0];
    let fall = 1;
    for (let n = 1; n <= POLES; n++) {
      fall *= poles.radius / rho;
      radial += n * (n + 1) * a[n] * fall * p[n];
      polar += n * a[n] * fall * dp[n];
      psi += a[n] * fall * dp[n];
    }
    const bRho = radial / (rho * rho);
    const bTheta = (sine * polar) / (rho * rho);
    return [bRho * sine + bTheta * cosine, bRho * cosine - bTheta * sine, psi * sine * sine];
  };
  const re = one(poles.re);
  const im = one(poles.im);
  return {
    br: { re: re[0], im: im[0] },
    bz: { re: re[1], im: im[1] },
    psi: { re: re[2], im: im[2] },
  };
}

function legendreBuffers(): { p: Float64Array; dp: Float64Array } {
  return { p: new Float64Array(POLES + 1), dp: new Float64Array(POLES + 1) };
}

/** P_n(c) and P_n'(c) by n P_n = (2n−1) c P_{n−1} − (n−1) P_{n−2}, P_n' = n P_{n−1} + c P_{n−1}'. */
function legendre(c: number, p: Float64Array, dp: Float64Array): void {
  p[0] = 1;
  dp[0] = 0;
  p[1] = c;
  dp[1] = 1;
  for (let n = 2; n <= POLES; n++) {
    p[n] = ((2 * n - 1) * c * p[n - 1] - (n - 1) * p[n - 2]) / n;
    dp[n] = n * p[n - 1] + c * dp[n - 1];
  }
}
