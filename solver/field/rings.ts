/**
 * The field of ring currents and ring dipoles in free space, by summing what the solution found: with m ring sources at (a_i, z_i),
 * currents dI_i (A) and moments (M_ρ, M_z)_i dV (A·m²),
 *
 *   2πψ(r, z) = Σ_i dI_i M(r, z; a_i, z_i) + Σ_i [M_ρ B_ρ + M_z B_z]_i dV_i,
 *
 * M Maxwell's mutual inductance of two coaxial circles (Treatise, art. 701) and B the field at the source of 1 A in the circle (r, z)
 * (Smythe, Static and Dynamic Electricity, 7.10; from memory): the flux through a circle is what reciprocity makes of its own field.
 * B_r = −ψ_z/r and B_z = ψ_r/r by central differences of fourth order; on the axis the closed forms of a ring and of a dipole.
 * dI = −jωσ(ψ − u)/(2s) ds dz, M = (1 − ν)B/µ0: what is summed are smooth functionals of ψ, so they converge as the power does, where a
 * derivative of ψ in a cell would lose two orders. Only for points clear of every source by more than its cell's size.
 */
import { MU0 } from "../constants.ts";
import type { Complex } from "../types.ts";
import { fieldAt } from "./axis.ts";
import type { Solution } from "./prepare.ts";
import { emptyTable, NODES, shapeAt } from "./shape.ts";
import { reluctivityOf } from "./system.ts";

/** Three-point Gauss rule on −1 … 1. */
const X = [-Math.sqrt(0.6), 0, Math.sqrt(0.6)] as const;
const W = [5 / 9, 8 / 9, 5 / 9] as const;
/** Step of the differences, in distances to the nearest source. */
const STEP = 0.02;
/** Numbers a source: a, z, dI (re, im), M_ρ dV (re, im), M_z dV (re, im). */
const WIDTH = 8;
/** A point nearer to a cell than this many of its diameters is not clear of it. */
const CLEAR = 1.5;

/** Ring sources of a solved coil. */
export interface RingSources {
  /** Eight numbers a source, SI. */
  readonly sources: Float64Array;
  /** Middle (r, z) and radius of clearance of every cell that holds sources, m. */
  readonly cells: Float64Array;
}

/** All currents and magnetisation of a solution. */
export function ringSources(solution: Solution): RingSources {
  const { grid } = solution.prepared;
  const sources: number[] = [];
  const cells: number[] = [];
  const nu = new Float64Array(2);
  for (let c = 0; c < grid.cellRegion.length; c++) {
    const sigma = solution.materials[grid.cellRegion[c]].conductivity;
    reluctivityOf(solution, grid.cellRegion[c], c, nu);
    if (sigma === 0 && nu[0] === 1 && nu[1] === 0) continue;
    const middle = grid.cellNodes[c * NODES + 4];
    let reach = 0;
    for (let i = 0; i < NODES; i++) {
      const node = grid.cellNodes[c * NODES + i];
      reach = Math.max(reach, Math.hypot(grid.r[node] - grid.r[middle], grid.z[node] - grid.z[middle]));
    }
    cells.push(grid.r[middle], grid.z[middle], (1 + CLEAR) * reach);
    addCell(solution, c, sigma, nu, sources);
  }
  return { sources: Float64Array.from(sources), cells: Float64Array.from(cells) };
}

const MAP = emptyTable(1);
const FIELD = emptyTable(1);

/** The nine sources of one cell. */
function addCell(solution: Solution, c: number, sigma: number, nu: Float64Array, out: number[]): void {
  const { grid, integrals, system } = solution.prepared;
  const turn = system.turnOfCell[c];
  const [uRe, uIm] = turn < 0 ? [0, 0] : [solution.u.re[turn], solution.u.im[turn]];
  const s = new Float64Array(NODES);
  for (let i = 0; i < NODES; i++) s[i] = grid.r[grid.cellNodes[c * NODES + i]] ** 2;
  for (let j = 0; j < 3; j++) {
    for (let k = 0; k < 3; k++) {
      shapeAt(integrals.kind[c], X[k], X[j], MAP);
      fieldAt(integrals.kind[c], integrals.touch[c], s, X[k], X[j], FIELD);
      let [S, Z, sXi, sEta, zXi, zEta] = [0, 0, 0, 0, 0, 0];
      const re = [-uRe, 0, 0];
      const im = [-uIm, 0, 0];
      for (let i = 0; i < NODES; i++) {
        const node = grid.cellNodes[c * NODES + i];
        S += MAP.n[i] * s[i];
        Z += MAP.n[i] * grid.z[node];
        sXi += MAP.dXi[i] * s[i];
        sEta += MAP.dEta[i] * s[i];
        zXi += MAP.dXi[i] * grid.z[node];
        zEta += MAP.dEta[i] * grid.z[node];
        const [x, y] = [solution.psi.re[node], solution.psi.im[node]];
        re[0] += FIELD.n[i] * x;
        re[1] += FIELD.dXi[i] * x;
        re[2] += FIELD.dEta[i] * x;
        im[0] += FIELD.n[i] * y;
        im[1] += FIELD.dXi[i] * y;
        im[2] += FIELD.dEta[i] * y;
      }
      const det = sXi * zEta - sEta * zXi;
      const a = Math.sqrt(S);
      const area = W[j] * W[k] * det;
      const current = (solution.omega * sigma * area) / (2 * S);
      const br = (v: readonly number[]): number => -(v[2] * sXi - v[1] * sEta) / (det * a);
      const bz = (v: readonly number[]): number => (2 * (v[1] * zEta - v[2] * zXi)) / det;
      const volume = (Math.PI * area) / MU0;
      const moment = (x: number, y: number): [number, number] => [
        volume * ((1 - nu[0]) * x + nu[1] * y),
        volume * ((1 - nu[0]) * y - nu[1] * x),
      ];
      out.push(a, Z, current * im[0], -current * re[0]);
      out.push(...moment(br(re), br(im)), ...moment(bz(re), bz(im)));
    }
  }
}

/** Clear distance from a point to the sources' cells; negative when it is not clear of them. */
function clearance({ cells }: RingSources, r: number, z: number): number {
  let least = Infinity;
  for (let i = 0; i < cells.length; i += 3) {
    least = Math.min(least, Math.hypot(r - cells[i], z - cells[i + 1]) - cells[i + 2]);
  }
  return least;
}

/** B_r and B_z (T) at a point, or null when it is too near to a source for a sum. */
export function fieldOfRings(rings: RingSources, r: number, z: number): { br: Complex; bz: Complex } | null {
  const clear = clearance(rings, r, z);
  if (clear <= 0) return null;
  if (r < 1e-9 * clear) return { br: { re: 0, im: 0 }, bz: onAxis(rings.sources, z) };
  const h = STEP * Math.min(clear, r);
  const at = (dr: number, dz: number): Complex => flux(rings.sources, r + dr * h, z + dz * h);
  const slope = (dr: number, dz: number): Complex => {
    const [p1, m1, p2, m2] = [at(dr, dz), at(-dr, -dz), at(2 * dr, 2 * dz), at(-2 * dr, -2 * dz)];
    const part = (k: "re" | "im"): number => (8 * (p1[k] - m1[k]) - (p2[k] - m2[k])) / (12 * h);
    return { re: part("re"), im: part("im") };
  };
  const [dr, dz] = [slope(1, 0), slope(0, 1)];
  return { br: { re: -dz.re / r, im: -dz.im / r }, bz: { re: dr.re / r, im: dr.im / r } };
}

/** ψ at (r, z), Wb/rad. Long for the two elliptic integrals in line. */
function flux(sources: Float64Array, r: number, z: number): Complex {
  let re = 0;
  let im = 0;
  for (let i = 0; i < sources.length; i += WIDTH) {
    const a = sources[i];
    const zeta = sources[i + 1] - z;
    const far = (a + r) * (a + r) + zeta * zeta;
    const near = (a - r) * (a - r) + zeta * zeta;
    // K and E by the arithmetic-geometric mean, with k'² = near/far.
    let x = 1;
    let y = Math.sqrt(near / far);
    let sum = 1 - near / far;
    let power = 1;
    for (let n = 0; n < 12 && Math.abs(x - y) > 1e-15 * x; n++) {
      const mean = (x + y) / 2;
      y = Math.sqrt(x * y);
      power *= 2;
      sum += power * (x - mean) * (x - mean);
      x = mean;
    }
    const K = Math.PI / (2 * x);
    const E = K * (1 - sum / 2);
    const root = Math.sqrt(far);
    // Mutual inductance over 2π: μ0/(2π) root [(1 − k²/2)K − E], k² = 4ar/far.
    const mutual = (MU0 / (2 * Math.PI)) * root * ((1 - (2 * a * r) / far) * K - E);
    const scale = MU0 / (2 * Math.PI) / root / (2 * Math.PI);
    const bz = scale * (K + ((r * r - a * a - zeta * zeta) / near) * E);
    const br = ((scale * zeta) / a) * (((r * r + a * a + zeta * zeta) / near) * E - K);
    re += sources[i + 2] * mutual + sources[i + 4] * br + sources[i + 6] * bz;
    im += sources[i + 3] * mutual + sources[i + 5] * br + sources[i + 7] * bz;
  }
  return { re, im };
}

/** B_z on the axis. */
function onAxis(sources: Float64Array, z: number): Complex {
  let re = 0;
  let im = 0;
  for (let i = 0; i < sources.length; i += WIDTH) {
    const a = sources[i];
    const zeta = z - sources[i + 1];
    const d2 = a * a + zeta * zeta;
    const d3 = d2 * Math.sqrt(d2);
    const ring = (MU0 * a * a) / (2 * d3);
    const across = (-3 * MU0 * a * zeta) / (4 * Math.PI * d3 * d2);
    const along = (MU0 * (2 * zeta * zeta - a * a)) / (4 * Math.PI * d3 * d2);
    re += sources[i + 2] * ring + sources[i + 4] * across + sources[i + 6] * along;
    im += sources[i + 3] * ring + sources[i + 5] * across + sources[i + 7] * along;
  }
  return { re, im };
}
