/**
 * The field of ring currents and ring dipoles in free space, by summing what the solution found: with m ring sources at (a_i, z_i),
 * currents dI_i (A) and moments (M_ρ, M_z)_i dV (A·m²),
 *
 *   2πψ(r, z) = Σ_i dI_i M(r, z; a_i, z_i) + Σ_i [M_ρ B_ρ + M_z B_z]_i dV_i,
 *
 * M Maxwell's mutual inductance of two coaxial circles (Treatise, art. 701) and B the field at the source of 1 A in the circle (r, z)
 * (Smythe, Static and Dynamic Electricity, 7.10; from memory): the flux through a circle is what reciprocity makes of its own field.
 * B_r = −ψ_z/r and B_z = ψ_r/r by central differences of fourth order, across the axis where it is near (ψ is even in r); on the axis the
 * closed forms of a ring and of a dipole.
 * dI = −jωσ(ψ − u)/(2s) ds dz, M = (1 − ν)B/µ0: what is summed are smooth functionals of ψ, so they converge as the power does, where a
 * derivative of ψ in a cell would lose two orders. Only for points clear of every source by more than its cell's size.
 */
import { MU0 } from "../constants.ts";
import type { Complex } from "../types.ts";
import { innerTables } from "./axis.ts";
import type { Solution } from "./prepare.ts";
import { NODES } from "./shape.ts";
import { reluctivityOf } from "./system.ts";

/** Three-point Gauss rule on −1 … 1. */
const X = [-Math.sqrt(0.6), 0, Math.sqrt(0.6)];
const W = [5 / 9, 8 / 9, 5 / 9];
/** The 3 × 3 points of a cell. */
const POINTS = 9;
const XI = [...X, ...X, ...X];
const ETA = X.flatMap((x) => [x, x, x]);
const WEIGHT = W.flatMap((w) => W.map((v) => v * w));
/** Step of the differences, in clear distances to the sources: near the axis a step of the order of r would lose all digits. */
const STEP = 0.02;
/** Numbers a source: a, z, dI (re, im), M_ρ dV (re, im), M_z dV (re, im). */
const WIDTH = 8;
/** Below this part of the sum of all sources' absolute contributions a component is rounding: they cancel, by symmetry as a rule. */
const LOST = 1e-12;
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
  const { materials } = solution;
  const nu = new Float64Array(2);
  const holds = (c: number): boolean => {
    const region = grid.cellRegion[c];
    reluctivityOf(solution, region, c, nu);
    return materials[region].conductivity > 0 || nu[0] !== 1 || nu[1] !== 0;
  };
  const list = Array.from(grid.cellRegion.keys()).filter(holds);
  const sources = new Float64Array(list.length * POINTS * WIDTH);
  const cells = new Float64Array(list.length * 3);
  const read = makeReader(solution);
  list.forEach((c, k) => {
    const middle = grid.cellNodes[c * NODES + 4];
    let reach = 0;
    for (let i = 0; i < NODES; i++) {
      const node = grid.cellNodes[c * NODES + i];
      const dr = grid.r[node] - grid.r[middle];
      const dz = grid.z[node] - grid.z[middle];
      reach = Math.max(reach, dr * dr + dz * dz);
    }
    reach = Math.sqrt(reach);
    cells[3 * k] = grid.r[middle];
    cells[3 * k + 1] = grid.z[middle];
    cells[3 * k + 2] = (1 + CLEAR) * reach;
    read(c, sources, k * POINTS * WIDTH);
  });
  return { sources, cells };
}

/** Writes the nine sources of a cell. Long for one pass over the nodes a point. */
function makeReader(solution: Solution): (c: number, out: Float64Array, at: number) => void {
  const { grid, system } = solution.prepared;
  const { psi, u, omega, materials } = solution;
  const tables = innerTables(grid, XI, ETA);
  const s = new Float64Array(NODES);
  const nu = new Float64Array(2);
  return (c, out, from) => {
    const { geometry: map, field: shape } = tables(c);
    const first = c * NODES;
    for (let i = 0; i < NODES; i++) s[i] = grid.r[grid.cellNodes[first + i]] ** 2;
    const sigma = materials[grid.cellRegion[c]].conductivity;
    const turn = system.turnOfCell[c];
    reluctivityOf(solution, grid.cellRegion[c], c, nu);
    for (let p = 0; p < POINTS; p++) {
      let S = 0;
      let Z = 0;
      let sXi = 0;
      let sEta = 0;
      let zXi = 0;
      let zEta = 0;
      let x = turn < 0 ? 0 : -u.re[turn];
      let xXi = 0;
      let xEta = 0;
      let y = turn < 0 ? 0 : -u.im[turn];
      let yXi = 0;
      let yEta = 0;
      for (let i = 0; i < NODES; i++) {
        const k = p * NODES + i;
        const node = grid.cellNodes[first + i];
        const z = grid.z[node];
        S += map.n[k] * s[i];
        Z += map.n[k] * z;
        sXi += map.dXi[k] * s[i];
        sEta += map.dEta[k] * s[i];
        zXi += map.dXi[k] * z;
        zEta += map.dEta[k] * z;
        const re = psi.re[node];
        const im = psi.im[node];
        x += shape.n[k] * re;
        xXi += shape.dXi[k] * re;
        xEta += shape.dEta[k] * re;
        y += shape.n[k] * im;
        yXi += shape.dXi[k] * im;
        yEta += shape.dEta[k] * im;
      }
      const det = sXi * zEta - sEta * zXi;
      const a = Math.sqrt(S);
      const area = WEIGHT[p] * det;
      const current = (omega * sigma * area) / (2 * S);
      // B_r and B_z times dV/μ0 = π ds dz/μ0.
      const volume = (Math.PI * WEIGHT[p]) / MU0;
      const rRe = (-volume * (xEta * sXi - xXi * sEta)) / a;
      const rIm = (-volume * (yEta * sXi - yXi * sEta)) / a;
      const zRe = 2 * volume * (xXi * zEta - xEta * zXi);
      const zIm = 2 * volume * (yXi * zEta - yEta * zXi);
      const at = from + p * WIDTH;
      out[at] = a;
      out[at + 1] = Z;
      out[at + 2] = current * y;
      out[at + 3] = -current * x;
      out[at + 4] = (1 - nu[0]) * rRe + nu[1] * rIm;
      out[at + 5] = (1 - nu[0]) * rIm - nu[1] * rRe;
      out[at + 6] = (1 - nu[0]) * zRe + nu[1] * zIm;
      out[at + 7] = (1 - nu[0]) * zIm - nu[1] * zRe;
    }
  };
}

/** Clear distance from a point to the sources' cells; negative when it is not clear of them. */
function clearance({ cells }: RingSources, r: number, z: number): number {
  let least = Infinity;
  for (let i = 0; i < cells.length; i += 3) {
    const dr = r - cells[i];
    const dz = z - cells[i + 1];
    least = Math.min(least, Math.sqrt(dr * dr + dz * dz) - cells[i + 2]);
  }
  return least;
}

/** A field (T) summed over sources. */
export interface RingField {
  readonly br: Complex;
  readonly bz: Complex;
  /** What a component may be off by rounding alone, T; components below it are given as 0. */
  readonly rounding: number;
}

/** B at a point, or null when it is too near to a source for a sum. */
export function fieldOfRings(rings: RingSources, r: number, z: number): RingField | null {
  const clear = clearance(rings, r, z);
  if (clear <= 0) return null;
  if (r < 1e-9 * clear) {
    const { re, im, size } = onAxis(rings.sources, z);
    return told({ re: 0, im: 0 }, { re, im }, LOST * size);
  }
  const h = STEP * clear;
  let size = 0;
  const at = (dr: number, dz: number): Complex => {
    const sum = flux(rings.sources, Math.abs(r + dr * h), z + dz * h);
    size = Math.max(size, sum.size);
    return sum;
  };
  const slope = (dr: number, dz: number): Complex => {
    const [p1, m1, p2, m2] = [at(dr, dz), at(-dr, -dz), at(2 * dr, 2 * dz), at(-2 * dr, -2 * dz)];
    const part = (k: "re" | "im"): number => (8 * (p1[k] - m1[k]) - (p2[k] - m2[k])) / (12 * h);
    return { re: part("re"), im: part("im") };
  };
  const [dr, dz] = [slope(1, 0), slope(0, 1)];
  // ψ over the clear distance; a slope's rounding is 1.5/STEP = 75 times that of ψ, which LOST leaves room for.
  const rounding = (LOST * size) / (clear * r);
  return told({ re: -dz.re / r, im: -dz.im / r }, { re: dr.re / r, im: dr.im / r }, rounding);
}

function told(br: Complex, bz: Complex, rounding: number): RingField {
  const kept = (x: number): number => (Math.abs(x) > rounding ? x : 0);
  return { br: { re: kept(br.re), im: kept(br.im) }, bz: { re: kept(bz.re), im: kept(bz.im) }, rounding };
}

/** A sum over sources, and the sum of its terms' absolute values. */
interface Sum extends Complex {
  readonly size: number;
}

/** ψ at (r, z), Wb/rad. Long for the two elliptic integrals in line. */
function flux(sources: Float64Array, r: number, z: number): Sum {
  let re = 0;
  let im = 0;
  let size = 0;
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
    const inRe = sources[i + 2] * mutual + sources[i + 4] * br + sources[i + 6] * bz;
    const inIm = sources[i + 3] * mutual + sources[i + 5] * br + sources[i + 7] * bz;
    re += inRe;
    im += inIm;
    size += Math.abs(inRe) + Math.abs(inIm);
  }
  return { re, im, size };
}

/** B_z on the axis. */
function onAxis(sources: Float64Array, z: number): Sum {
  let re = 0;
  let im = 0;
  let size = 0;
  for (let i = 0; i < sources.length; i += WIDTH) {
    const a = sources[i];
    const zeta = z - sources[i + 1];
    const d2 = a * a + zeta * zeta;
    const d3 = d2 * Math.sqrt(d2);
    const ring = (MU0 * a * a) / (2 * d3);
    const across = (-3 * MU0 * a * zeta) / (4 * Math.PI * d3 * d2);
    const along = (MU0 * (2 * zeta * zeta - a * a)) / (4 * Math.PI * d3 * d2);
    const inRe = sources[i + 2] * ring + sources[i + 4] * across + sources[i + 6] * along;
    const inIm = sources[i + 3] * ring + sources[i + 5] * across + sources[i + 7] * along;
    re += inRe;
    im += inIm;
    size += Math.abs(inRe) + Math.abs(inIm);
  }
  return { re, im, size };
}
