/**
 * The field at any point of space.
 *
 * Inside the outer circle: B_r = −ψ_z/r, B_z = 2ψ_s by the shape functions of the cell that holds the point, second order in the cell's size.
 * ψ and rψ_z go with s towards the axis, so ψ/S and ψ_z/S are read beside it, where the map is regular.
 * Outside: the poles of multipoles.ts, plus the applied uniform field where there is one.
 */
import { SolverError } from "../errors.ts";
import type { Complex } from "../types.ts";
import { fieldAt } from "./axis.ts";
import { type Locator, makeLocator, type Place } from "./locate.ts";
import { fieldOfPoles, type Multipoles, multipolesOf } from "./multipoles.ts";
import type { Solution } from "./prepare.ts";
import { emptyTable, NODES, shapeAt } from "./shape.ts";

/** The field at a point, rms phasors. */
export interface PointField {
  /** T. */
  readonly br: Complex;
  readonly bz: Complex;
  /** Wb/rad. */
  readonly psi: Complex;
  /** Cell that holds the point, −1 outside the outer circle. */
  readonly cell: number;
}

/** A point this near below the outer circle may lie in no cell (chords against arc); the poles serve there too. */
const RIM = 0.98;
/** Fields on the axis are read this far from it in (ξ, η), where the map is regular. */
const OFF_AXIS = 1e-4;

/** Reads a solution at points (r ≥ 0, z), m. Throws SolverError `outside` beyond a grid that has no open space. */
export function makeProbe(
  solution: Solution,
  locator: Locator = makeLocator(solution.prepared),
): (r: number, z: number) => PointField {
  const { exterior } = solution.prepared.grid;
  let poles: Multipoles | null | undefined;
  const outside = (r: number, z: number): PointField => {
    if (poles === undefined) poles = multipolesOf(solution);
    if (poles === null) throw new SolverError("outside", `(${r}, ${z}) m lies outside the grid`);
    const field = fieldOfPoles(poles, r, z);
    const uniform = solution.applied;
    return {
      br: field.br,
      bz: { re: field.bz.re + uniform, im: field.bz.im },
      psi: { re: field.psi.re + (uniform * r * r) / 2, im: field.psi.im },
      cell: -1,
    };
  };
  return (r, z) => {
    const rho = exterior === null ? 0 : Math.hypot(r, z - exterior.centreZ) / exterior.radius;
    if (rho >= 1) return outside(r, z);
    const place = locator(r, z);
    if (place !== null) return readPlace(solution, place, r);
    if (rho >= RIM || exterior === null) return outside(r, z);
    throw new SolverError("outside", `(${r}, ${z}) m lies in no cell`);
  };
}

const MAP = emptyTable(1);
const FIELD = emptyTable(1);

function readPlace(solution: Solution, place: Place, r: number): PointField {
  const { grid, integrals } = solution.prepared;
  const { cell } = place;
  const kind = integrals.kind[cell];
  const touch = integrals.touch[cell];
  const least = touch === 0 ? 1 : 1 - OFF_AXIS;
  const xi = Math.min(least, Math.max(-least, place.xi));
  const eta = Math.min(least, Math.max(-least, place.eta));
  const s = new Float64Array(NODES);
  for (let i = 0; i < NODES; i++) s[i] = grid.r[grid.cellNodes[cell * NODES + i]] ** 2;
  shapeAt(kind, xi, eta, MAP);
  fieldAt(kind, touch, s, xi, eta, FIELD);
  let [S, sXi, sEta, zXi, zEta] = [0, 0, 0, 0, 0];
  const re = [0, 0, 0];
  const im = [0, 0, 0];
  for (let i = 0; i < NODES; i++) {
    const node = grid.cellNodes[cell * NODES + i];
    S += MAP.n[i] * s[i];
    sXi += MAP.dXi[i] * s[i];
    sEta += MAP.dEta[i] * s[i];
    zXi += MAP.dXi[i] * grid.z[node];
    zEta += MAP.dEta[i] * grid.z[node];
    const [n, a, b] = [FIELD.n[i], FIELD.dXi[i], FIELD.dEta[i]];
    const [x, y] = [solution.psi.re[node], solution.psi.im[node]];
    re[0] += n * x;
    re[1] += a * x;
    re[2] += b * x;
    im[0] += n * y;
    im[1] += a * y;
    im[2] += b * y;
  }
  const det = sXi * zEta - sEta * zXi;
  const bz = ([, a, b]: number[]): number => (2 * (a * zEta - b * zXi)) / det;
  const br = ([, a, b]: number[]): number => (-r * (b * sXi - a * sEta)) / (det * S);
  const psi = ([n]: number[]): number => (n * r * r) / S;
  return {
    br: { re: br(re), im: br(im) },
    bz: { re: bz(re), im: bz(im) },
    psi: { re: psi(re), im: psi(im) },
    cell,
  };
}
