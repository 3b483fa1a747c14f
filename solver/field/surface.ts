/**
 * Tangential field on the surface of a part, by the flux its own cells hand over. Multiplying the field equation by v over the part alone,
 *
 *   Σ_{cells of the part} ∫ {ν [2ψ_s v_s + ψ_z v_z/(2s)] + jωμ0 σ/(2s) (ψ − u) v} ds dz = μ0 ∮ H_t v dl,
 *
 * so the residual of the part's cells at surface node i is μ0 ∮ H_t N_i dl, and H_t = Σ H_j N_j follows from the boundary mass ∮ N_i N_j dl.
 * Converges as fast as the power does, where differentiating ψ would lose one order (consistent flux: Carey, Comput. Methods Appl. Mech. Engng
 * 35 (1982) 1, from memory). H_t = 0 on the axis. The mass is solved by conjugate gradients scaled by its diagonal.
 */
import { MU0 } from "../constants.ts";
import { SolverError } from "../errors.ts";
import { axisEdge } from "./axis.ts";
import { gather, multiply } from "./cellforms.ts";
import { cellsOf } from "./observe.ts";
import type { Solution } from "./prepare.ts";
import { edgeKind, GAUSS4, middleOf, NODES, quadratics } from "./shape.ts";
import { reluctivityOf } from "./system.ts";

/** Field over the surface of a part. */
export interface SurfaceField {
  /** Tangential H, rms in time and over the surface's area, A/m. */
  readonly rms: number;
  /** What of `rms` is owed to the part in phase with the current and to that across it; their sum is `rms`. */
  readonly shares: readonly [number, number];
  /** Area of revolution of the surface, m². */
  readonly area: number;
  /** Regions other than air (0) that meet the surface, in an edge or a node. */
  readonly touches: readonly number[];
  /** Greatest |H_t| at a node (a corner of a magnetic part has no finite one), A/m, and where, m. */
  readonly peak: number;
  readonly peakR: number;
  readonly peakZ: number;
}

/** Local nodes of the four edges. */
const EDGES = [
  [0, 1, 2],
  [6, 7, 8],
  [0, 3, 6],
  [2, 5, 8],
] as const;
/** Conjugate gradients stop at this residual relative to the first; the scaled mass has a condition number near 10. */
const ENOUGH = 1e-14;
const MOST_STEPS = 500;

/** Surface edges: three nodes each, with lengths and weights at their Gauss points. */
interface Chain {
  readonly nodes: Int32Array;
  /** ∮ N_aN_b dl, 9 an edge; ∮ N_aN_b 2πr dl likewise. */
  readonly mass: Float64Array;
  readonly areaMass: Float64Array;
  readonly area: number;
}

/** Tangential field on what separates the regions from all others. Throws SolverError `regions` when nothing does. */
export function surfaceField(solution: Solution, regions: readonly number[]): SurfaceField {
  const cells = cellsOf(solution, regions);
  const chain = chainOf(solution, regions, cells);
  const { re, im } = nodalLoads(solution, cells);
  const hRe = solveMass(solution, chain, re);
  const hIm = solveMass(solution, chain, im);
  let [along, across] = [0, 0];
  for (let e = 0; e * 3 < chain.nodes.length; e++) {
    for (let k = 0; k < 9; k++) {
      const i = chain.nodes[e * 3 + Math.floor(k / 3)];
      const j = chain.nodes[e * 3 + (k % 3)];
      along += chain.areaMass[e * 9 + k] * hRe[i] * hRe[j];
      across += chain.areaMass[e * 9 + k] * hIm[i] * hIm[j];
    }
  }
  const { grid } = solution.prepared;
  let at = chain.nodes[0];
  for (const i of chain.nodes) if (Math.hypot(hRe[i], hIm[i]) > Math.hypot(hRe[at], hIm[at])) at = i;
  const rms = Math.sqrt((along + across) / chain.area);
  const shareOf = (square: number): number => (rms > 0 ? square / chain.area / rms : 0);
  return {
    rms,
    shares: [shareOf(along), shareOf(across)],
    area: chain.area,
    touches: touchedBy(solution, regions, chain),
    peak: Math.hypot(hRe[at], hIm[at]),
    peakR: grid.r[at],
    peakZ: grid.z[at],
  };
}

/** Edges with the part on one side and something else on the other. An edge is known by its middle node. */
function chainOf(solution: Solution, regions: readonly number[], cells: readonly number[]): Chain {
  const { grid } = solution.prepared;
  const others = new Uint8Array(grid.r.length);
  for (let c = 0; c < grid.cellRegion.length; c++) {
    if (regions.includes(grid.cellRegion[c])) continue;
    for (const edge of EDGES) others[grid.cellNodes[c * NODES + edge[1]]] = 1;
  }
  const nodes: number[] = [];
  for (const c of cells)
    for (const edge of EDGES)
      if (others[grid.cellNodes[c * NODES + edge[1]]] === 1)
        for (const i of edge) nodes.push(grid.cellNodes[c * NODES + i]);
  const edges = nodes.length / 3;
  if (edges === 0) throw new SolverError("regions", `regions ${regions.join(", ")} have no surface`);
  const chain = {
    nodes: Int32Array.from(nodes),
    mass: new Float64Array(edges * 9),
    areaMass: new Float64Array(edges * 9),
  };
  let area = 0;
  for (let e = 0; e < edges; e++) area += integrateEdge(grid.r, grid.z, chain, e);
  return { ...chain, area };
}

/** Regions whose cells share a node with the chain, by number; the part's own and air left out. */
function touchedBy(solution: Solution, regions: readonly number[], chain: Chain): number[] {
  const { grid } = solution.prepared;
  const onChain = new Uint8Array(grid.r.length);
  for (const i of chain.nodes) onChain[i] = 1;
  const found = new Set<number>();
  for (let c = 0; c < grid.cellRegion.length; c++) {
    const region = grid.cellRegion[c];
    if (region === 0 || regions.includes(region)) continue;
    for (let i = 0; i < NODES; i++) if (onChain[grid.cellNodes[c * NODES + i]] === 1) found.add(region);
  }
  return [...found].sort((a, b) => a - b);
}

const Q = new Float64Array(9);
const TRACE = new Float64Array(6);

/** Masses of one edge; returns its area of revolution. On an edge that leaves the axis x = −1 + 2τ² keeps r smooth in τ. */
function integrateEdge(
  r: Float64Array,
  z: Float64Array,
  chain: Pick<Chain, "nodes" | "mass" | "areaMass">,
  e: number,
): number {
  const [i, j, k] = chain.nodes.subarray(e * 3, e * 3 + 3);
  const kind = edgeKind(r, z, i, j, k);
  const sign = kind === 2 ? -1 : 1;
  let area = 0;
  for (let p = 0; p < GAUSS4.x.length; p++) {
    const tau = (1 + GAUSS4.x[p]) / 2;
    const x = kind === 0 ? GAUSS4.x[p] : sign * (2 * tau * tau - 1);
    const w = kind === 0 ? GAUSS4.w[p] : 2 * tau * GAUSS4.w[p];
    quadratics(x, middleOf(kind), Q);
    const s = Q[0] * r[i] ** 2 + Q[1] * r[j] ** 2 + Q[2] * r[k] ** 2;
    const ds = Q[3] * r[i] ** 2 + Q[4] * r[j] ** 2 + Q[5] * r[k] ** 2;
    const dz = Q[3] * z[i] + Q[4] * z[j] + Q[5] * z[k];
    axisEdge(r[i] ** 2, r[j] ** 2, r[k] ** 2, kind, x, TRACE);
    const radius = Math.sqrt(s);
    const dl = w * Math.hypot(ds / (2 * radius), dz);
    area += 2 * Math.PI * radius * dl;
    for (let a = 0; a < 3; a++) {
      for (let b = 0; b < 3; b++) {
        chain.mass[e * 9 + 3 * a + b] += TRACE[a] * TRACE[b] * dl;
        chain.areaMass[e * 9 + 3 * a + b] += TRACE[a] * TRACE[b] * 2 * Math.PI * radius * dl;
      }
    }
  }
  return area;
}

/** ∮ H_t N_i dl at every node of the part (rounding inside it): the residual of its cells over μ0. */
function nodalLoads(solution: Solution, cells: readonly number[]): { re: Float64Array; im: Float64Array } {
  const { prepared, psi, u, materials, omega } = solution;
  const { grid, integrals, system } = prepared;
  const out = { re: new Float64Array(grid.r.length), im: new Float64Array(grid.r.length) };
  const nu = new Float64Array(2);
  const [re, im, yRe, yIm] = [0, 1, 2, 3].map(() => new Float64Array(NODES));
  for (const c of cells) {
    const region = grid.cellRegion[c];
    const turn = system.turnOfCell[c];
    reluctivityOf(solution, region, c, nu);
    gather(psi, grid.cellNodes, c * NODES, 0, 0, re, im);
    multiply(integrals.stiffness, c, re, yRe);
    multiply(integrals.stiffness, c, im, yIm);
    const addTo = (a: number, b: number): void => {
      for (let i = 0; i < NODES; i++) {
        const node = grid.cellNodes[c * NODES + i];
        out.re[node] += a * yRe[i] - b * yIm[i];
        out.im[node] += a * yIm[i] + b * yRe[i];
      }
    };
    addTo(nu[0] / MU0, nu[1] / MU0);
    const sigma = materials[region].conductivity;
    if (sigma === 0) continue;
    if (turn >= 0) gather(psi, grid.cellNodes, c * NODES, u.re[turn], u.im[turn], re, im);
    multiply(integrals.mass, c, re, yRe);
    multiply(integrals.mass, c, im, yIm);
    addTo(0, omega * sigma);
  }
  return out;
}

/** y = mass · x over the chain's nodes. */
function applyMass(chain: Chain, x: Float64Array, y: Float64Array): void {
  for (const i of chain.nodes) y[i] = 0;
  for (let e = 0; e * 3 < chain.nodes.length; e++)
    for (let k = 0; k < 9; k++)
      y[chain.nodes[e * 3 + Math.floor(k / 3)]] += chain.mass[e * 9 + k] * x[chain.nodes[e * 3 + (k % 3)]];
}

/** Solves the boundary mass for nodal values; nodes on the axis stay 0. Conjugate gradients, diagonal scaling. */
function solveMass(solution: Solution, chain: Chain, load: Float64Array): Float64Array {
  const { fixed, r: radius } = solution.prepared.grid;
  const free = [...new Set(chain.nodes)].filter((i) => fixed[i] === 0);
  const diagonal = new Float64Array(radius.length);
  for (let e = 0; e * 3 < chain.nodes.length; e++)
    for (let a = 0; a < 3; a++) diagonal[chain.nodes[e * 3 + a]] += chain.mass[e * 9 + 4 * a];
  const x = new Float64Array(radius.length);
  const p = new Float64Array(radius.length);
  const q = new Float64Array(radius.length);
  const r = load.slice();
  let rho = 0;
  for (const i of free) {
    p[i] = r[i] / diagonal[i];
    rho += r[i] * p[i];
  }
  const enough = rho * ENOUGH * ENOUGH;
  for (let step = 0; step < MOST_STEPS && rho > enough; step++) {
    applyMass(chain, p, q);
    let pq = 0;
    for (const i of free) pq += p[i] * q[i];
    const alpha = rho / pq;
    let next = 0;
    for (const i of free) {
      x[i] += alpha * p[i];
      r[i] -= alpha * q[i];
      next += (r[i] * r[i]) / diagonal[i];
    }
    for (const i of free) p[i] = r[i] / diagonal[i] + (next / rho) * p[i];
    rho = next;
  }
  return x;
}
