/**
 * Finds the cell and the (ξ, η) of a place: boxes of cells sorted into square buckets, then Newton's iteration on the cell's own map
 * (s, z)(ξ, η) = Σ N_i (s_i, z_i).
 */
import { sideOnAxis } from "./axis.ts";
import type { Laid } from "./prepare.ts";
import { emptyTable, NODES, shapeAt } from "./shape.ts";

/** A place inside a cell. */
export interface Place {
  readonly cell: number;
  readonly xi: number;
  readonly eta: number;
}

/** Finds places in cells inside the outer circle; null where there is none. On the axis a cell with a side there comes first. r, z in m. */
export type Locator = (r: number, z: number) => Place | null;

/** Boxes grow by this part of their size, so that bulging edges and rounding lose no point. */
const GROWTH = 0.05;
const STEPS = 40;
/** A place counts as found this near to it in (ξ, η), at the least this near where a map is nearly singular; as inside a cell this far beyond its edges. */
const EXACT = 1e-12;
const SETTLED = 1e-6;
const INSIDE = 1e-9;
/** Beyond the edges of all candidates, the nearest still serves up to here: arcs and their neighbours' chords differ that much. */
const TOLERATED = 0.02;

/** Builds the buckets of a grid; one locator serves all solutions on it. */
export function makeLocator(prepared: Laid): Locator {
  const { grid, integrals } = prepared;
  const cells = grid.cellRegion.length;
  const box = new Float64Array(cells * 4);
  const whole = [Infinity, Infinity, -Infinity, -Infinity];
  for (let c = 0; c < cells; c++) boxOf(grid.r, grid.z, grid.cellNodes, c, box, whole);
  const side = Math.max(1, Math.ceil(Math.sqrt(cells)));
  const column = (r: number): number => bucket(r, whole[0], whole[2], side);
  const row = (z: number): number => bucket(z, whole[1], whole[3], side);
  const buckets = new Map<number, number[]>();
  for (let c = 0; c < cells; c++) {
    for (let j = row(box[4 * c + 1]); j <= row(box[4 * c + 3]); j++) {
      for (let i = column(box[4 * c]); i <= column(box[4 * c + 2]); i++) {
        const list = buckets.get(j * side + i);
        if (list === undefined) buckets.set(j * side + i, [c]);
        else list.push(c);
      }
    }
  }
  return (r, z) => {
    let best: Place | null = null;
    let least = TOLERATED;
    for (const c of buckets.get(row(z) * side + column(r)) ?? []) {
      if (r < box[4 * c] || r > box[4 * c + 2] || z < box[4 * c + 1] || z > box[4 * c + 3]) continue;
      const touch = integrals.touch[c];
      const goodOnAxis = r > 0 || sideOnAxis(touch);
      const place =
        r === 0 && goodOnAxis
          ? alongAxis(grid.z, grid.cellNodes, touch, c, z)
          : invert(grid.r, grid.z, grid.cellNodes, integrals.kind[c], c, r * r, z);
      const beyond = Math.max(Math.abs(place.xi), Math.abs(place.eta)) - 1;
      if (beyond <= INSIDE && goodOnAxis) return place;
      if (beyond < least) {
        least = beyond;
        best = place;
      }
    }
    return best;
  };
}

function bucket(x: number, from: number, to: number, side: number): number {
  return Math.min(side - 1, Math.max(0, Math.floor(((x - from) / (to - from)) * side)));
}

/** Box of cell c, and of all so far. */
function boxOf(
  r: Float64Array,
  z: Float64Array,
  nodes: Int32Array,
  c: number,
  box: Float64Array,
  whole: number[],
): void {
  let [r0, z0, r1, z1] = [Infinity, Infinity, -Infinity, -Infinity];
  for (let i = 0; i < NODES; i++) {
    const node = nodes[c * NODES + i];
    r0 = Math.min(r0, r[node]);
    r1 = Math.max(r1, r[node]);
    z0 = Math.min(z0, z[node]);
    z1 = Math.max(z1, z[node]);
  }
  const grow = GROWTH * (r1 - r0 + z1 - z0);
  box.set([r0 - grow, z0 - grow, r1 + grow, z1 + grow], 4 * c);
  whole[0] = Math.min(whole[0], r0);
  whole[1] = Math.min(whole[1], z0);
  whole[2] = Math.max(whole[2], r1);
  whole[3] = Math.max(whole[3], z1);
}

const SHAPE = emptyTable(1);
const CELL_S = new Float64Array(NODES);
const CELL_Z = new Float64Array(NODES);
/** Newton's iteration goes no further from a cell's middle; so many steps in a row that end there say that the place lies elsewhere. */
const LIMIT = 2;
const PATIENCE = 3;

/**
 * The place of height z on a cell's side on the axis. The map may be singular there (s goes with the square of the distance where edges leave at a slant),
 * so the side's own quadratic is solved: z = z_1 + (z_2 − z_0) y/2 + (z_0 − 2z_1 + z_2) y²/2.
 */
function alongAxis(z: Float64Array, nodes: Int32Array, touch: number, cell: number, height: number): Place {
  const vertical = touch <= 2;
  const first = cell * NODES + [0, 0, 2, 0, 6][touch];
  const step = vertical ? 3 : 1;
  const [z0, z1, z2] = [z[nodes[first]], z[nodes[first + step]], z[nodes[first + 2 * step]]];
  const half = (z2 - z0) / 4;
  const bend = (z0 - 2 * z1 + z2) / 2;
  const root = Math.sqrt(Math.max(0, half * half + bend * (height - z1)));
  const y = (height - z1) / (half + Math.sign(half) * root);
  const x = touch % 2 === 1 ? -1 : 1;
  return vertical ? { cell, xi: x, eta: y } : { cell, xi: y, eta: x };
}

/** (ξ, η) of (s, z) on a cell's map, continued beyond its edges; far off where Newton's iteration finds none. */
function invert(
  r: Float64Array,
  z: Float64Array,
  nodes: Int32Array,
  kind: number,
  cell: number,
  s: number,
  height: number,
): Place {
  for (let i = 0; i < NODES; i++) {
    const node = nodes[cell * NODES + i];
    CELL_S[i] = r[node] * r[node];
    CELL_Z[i] = z[node];
  }
  let xi = 0;
  let eta = 0;
  let atLimit = 0;
  let moved = Infinity;
  for (let step = 0; step < STEPS; step++) {
    shapeAt(kind, xi, eta, SHAPE);
    let es = -s;
    let ez = -height;
    let sXi = 0;
    let sEta = 0;
    let zXi = 0;
    let zEta = 0;
    for (let i = 0; i < NODES; i++) {
      const si = CELL_S[i];
      const zi = CELL_Z[i];
      es += SHAPE.n[i] * si;
      ez += SHAPE.n[i] * zi;
      sXi += SHAPE.dXi[i] * si;
      sEta += SHAPE.dEta[i] * si;
      zXi += SHAPE.dXi[i] * zi;
      zEta += SHAPE.dEta[i] * zi;
    }
    const det = sXi * zEta - sEta * zXi;
    if (!(Math.abs(det) > 0)) break;
    const dXi = (es * zEta - ez * sEta) / det;
    const dEta = (ez * sXi - es * zXi) / det;
    xi = Math.min(LIMIT, Math.max(-LIMIT, xi - dXi));
    eta = Math.min(LIMIT, Math.max(-LIMIT, eta - dEta));
    moved = Math.abs(dXi) + Math.abs(dEta);
    if (moved < EXACT) break;
    atLimit = Math.max(Math.abs(xi), Math.abs(eta)) === LIMIT ? atLimit + 1 : 0;
    if (atLimit === PATIENCE) break;
  }
  // Beyond its edges a map may fold, and the iteration wander about inside for ever.
  return moved < SETTLED ? { cell, xi, eta } : { cell, xi: LIMIT, eta: LIMIT };
}
