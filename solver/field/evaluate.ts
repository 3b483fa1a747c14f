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
const S_OF = new Float64Array(NODES);
/** ψ, ψ_ξ, ψ_η. */
const RE = new Float64Array(3);
const IM = new Float64Array(3);

function readPlace(solution: Solution, place: Place, r: number): PointField {
  const { grid, integrals } = solution.prepared;
  const { cell } = place;
  const kind = integrals.kind[cell];
  const touch = integrals.touch[cell];
  const least = touch === 0 ? 1 : 1 - OFF_AXIS;
  const xi = Math.min(least, Math.max(-least, place.xi));
  const eta = Math.min(least, Math.max(-least, place.eta));
  for (let i = 0; i < NODES; i++) S_OF[i] = grid.r[grid.cellNodes[cell * NODES + i]] ** 2;
  shapeAt(kind, xi, eta, MAP);
  let field = MAP;
  if (touch !== 0) {
    field = FIELD;
    fieldAt(kind, touch, S_OF, xi, eta, FIELD);
  }
  let S = 0;
  let sXi = 0;
  let sEta = 0;
  let zXi = 0;
  let zEta = 0;
  RE.fill(0);
  IM.fill(0);
  for (let i = 0; i < NODES; i++) {
    const node = grid.cellNodes[cell * NODES + i];
    S += MAP.n[i] * S_OF[i];
    sXi += MAP.dXi[i] * S_OF[i];
    sEta += MAP.dEta[i] * S_OF[i];
    zXi += MAP.dXi[i] * grid.z[node];
    zEta += MAP.dEta[i] * grid.z[node];
    const n = field.n[i];
    const a = field.dXi[i];
    const b = field.dEta[i];
    const x = solution.psi.re[node];
    const y = solution.psi.im[node];
    RE[0] += n * x;
    RE[1] += a * x;
    RE[2] += b * x;
    IM[0] += n * y;
    IM[1] += a * y;
    IM[2] += b * y;
  }
  const det = sXi * zEta - sEta * zXi;
  const bz = (v: Float64Array): number => (2 * (v[1] * zEta - v[2] * zXi)) / det;
  const br = (v: Float64Array): number => (-r * (v[2] * sXi - v[1] * sEta)) / (det * S);
  const psi = (v: Float64Array): number => (v[0] * r * r) / S;
  return {
    br: { re: br(RE), im: br(IM) },
    bz: { re: bz(RE), im: bz(IM) },
    psi: { re: psi(RE), im: psi(IM) },
    cell,
  };
}
