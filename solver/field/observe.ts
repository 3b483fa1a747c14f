/**
 * What a workshop asks about the heat of a part: how much lies below a level of any function of place (slices by height,
 * depths under a surface), and the density not exceeded in a given share of its volume.
 *
 * A cell on one side of a level counts whole, with its power from the cell's own quadrature. A cell the level cuts is read in 8 × 8 pieces, scaled
 * to the cell's power; in a piece the level function is taken as evenly spread between its least and greatest corner value, so
 * the share is a continuous function of the level and its error second order in the piece.
 */
import { SolverError } from "../errors.ts";
import { heatSampler } from "./density.ts";
import type { Losses } from "./losses.ts";
import type { Solution } from "./prepare.ts";
import { NODES } from "./shape.ts";

/** Pieces along a side of a cut cell. */
const PIECES = 8;
/** Pieces along a side of a cell in the first and in the second look for the hottest volume. */
const COARSE = 2;
const FINE = 16;
/** A cell is looked at again when its hottest piece passes this part of the estimated quantile. */
const WORTH_A_LOOK = 0.5;
/** The level function inside a cell may pass its nodes' range by this part of it. */
const MARGIN = 0.1;
/** The hot spot is the middle of the hottest volume where that lies this near to it, in units of the volume's spread. */
const NEAR = 0.1;

/** Cells of the given regions. Throws SolverError `regions` when there are none. */
export function cellsOf(solution: Solution, regions: readonly number[]): number[] {
  const { cellRegion } = solution.prepared.grid;
  const cells: number[] = [];
  for (let c = 0; c < cellRegion.length; c++) if (regions.includes(cellRegion[c])) cells.push(c);
  if (cells.length === 0) throw new SolverError("regions", `no cell in regions ${regions.join(", ")}`);
  return cells;
}

/**
 * Share of the regions' power where level(r, z) ≤ T, for every T of `thresholds` (any order, the level's unit). r and z in m.
 * All 0 when there is no power.
 */
export function sharesBelow(
  solution: Solution,
  losses: Losses,
  regions: readonly number[],
  level: (r: number, z: number) => number,
  thresholds: readonly number[],
): Float64Array {
  const { grid } = solution.prepared;
  const below = new Float64Array(thresholds.length);
  const read = heatSampler(solution, PIECES);
  let total = 0;
  for (const cell of cellsOf(solution, regions)) {
    const power = losses.cellPower[cell];
    total += power;
    let least = Infinity;
    let most = -Infinity;
    for (let i = 0; i < NODES; i++) {
      const node = grid.cellNodes[cell * NODES + i];
      const value = level(grid.r[node], grid.z[node]);
      least = Math.min(least, value);
      most = Math.max(most, value);
    }
    const slack = MARGIN * (most - least);
    const cut = thresholds.some((t) => t > least - slack && t < most + slack);
    if (cut) {
      addCut(read(cell), power, level, thresholds, below);
      continue;
    }
    thresholds.forEach((t, k) => {
      if (t >= most) below[k] += power;
    });
  }
  if (total > 0) for (let k = 0; k < below.length; k++) below[k] /= total;
  return below;
}

/** Adds the power of a cut cell's pieces below each threshold. */
function addCut(
  samples: ReturnType<ReturnType<typeof heatSampler>>,
  power: number,
  level: (r: number, z: number) => number,
  thresholds: readonly number[],
  below: Float64Array,
): void {
  const { volume, density, cornerR, cornerZ } = samples;
  const side = PIECES + 1;
  const value = new Float64Array(side * side);
  for (let k = 0; k < value.length; k++) value[k] = level(cornerR[k], cornerZ[k]);
  let sampled = 0;
  for (let p = 0; p < volume.length; p++) sampled += volume[p] * density[p];
  if (!(sampled > 0)) return;
  const scale = power / sampled;
  for (let p = 0; p < volume.length; p++) {
    const k = Math.floor(p / PIECES) * side + (p % PIECES);
    const [a, b, c, d] = [value[k], value[k + 1], value[k + side], value[k + side + 1]];
    const least = Math.min(a, b, c, d);
    const spread = Math.max(a, b, c, d) - least;
    const piece = scale * volume[p] * density[p];
    thresholds.forEach((t, i) => {
      const part = spread > 0 ? (t - least) / spread : t >= least ? 1 : 0;
      below[i] += piece * Math.min(1, Math.max(0, part));
    });
  }
}

/** Shares of the regions' power between consecutive heights (m, ascending); what lies outside the first and last counts to the end slices. */
export function sliceShares(
  solution: Solution,
  losses: Losses,
  regions: readonly number[],
  heights: readonly number[],
): Float64Array {
  const below = sharesBelow(solution, losses, regions, (_r, z) => z, [...heights.slice(1, -1), Infinity]);
  const shares = below.slice();
  for (let k = 1; k < shares.length; k++) shares[k] -= below[k - 1];
  return shares;
}

/** A density and the place it belongs to. */
export interface HotSpot {
  /** W/m³. */
  readonly density: number;
  /** m. */
  readonly r: number;
  readonly z: number;
}

/** Samples with a density above a floor. */
interface Pieces {
  readonly r: number[];
  readonly z: number[];
  readonly volume: number[];
  readonly density: number[];
}

/**
 * The density not exceeded in `share` (0 … 1) of the regions' volume, and a place inside what exceeds it: the middle of that volume
 * where it is one piece round its middle, else the hottest spot.
 */
export function quantileDensity(solution: Solution, regions: readonly number[], share = 0.999): HotSpot {
  const cells = cellsOf(solution, regions);
  const coarse = piecesOf(solution, cells, COARSE, -1);
  const tail = (1 - share) * coarse.volume.reduce((sum, v) => sum + v, 0);
  const estimate = upperQuantile(coarse, tail).density;
  const perCell = COARSE * COARSE;
  const hottest = cells.filter((_cell, i) => {
    const densities = coarse.density.slice(i * perCell, (i + 1) * perCell);
    return Math.max(...densities) >= WORTH_A_LOOK * estimate;
  });
  const fine = piecesOf(solution, hottest, FINE, WORTH_A_LOOK * estimate);
  const { density, order, count } = upperQuantile(fine, tail);
  const at = placeOf(fine, order.subarray(0, Math.max(1, count)));
  return { density, r: fine.r[at], z: fine.z[at] };
}

/** Pieces of the cells above a floor of density. */
function piecesOf(solution: Solution, cells: readonly number[], m: number, floor: number): Pieces {
  const read = heatSampler(solution, m);
  const pieces: Pieces = { r: [], z: [], volume: [], density: [] };
  for (const cell of cells) {
    const samples = read(cell);
    for (let p = 0; p < samples.r.length; p++) {
      if (samples.density[p] < floor) continue;
      pieces.r.push(samples.r[p]);
      pieces.z.push(samples.z[p]);
      pieces.volume.push(samples.volume[p]);
      pieces.density.push(samples.density[p]);
    }
  }
  return pieces;
}

/** Density above which lies the volume `tail`, between samples linear in volume; the samples hottest first; how many lie above. */
function upperQuantile(pieces: Pieces, tail: number): { density: number; order: Uint32Array; count: number } {
  const { density, volume } = pieces;
  const order = Uint32Array.from(density, (_d, i) => i).sort((a, b) => density[b] - density[a] || a - b);
  let above = 0;
  let lastMiddle = 0;
  let last = density[order[0]];
  for (let k = 0; k < order.length; k++) {
    const i = order[k];
    const middle = above + volume[i] / 2;
    if (middle >= tail) {
      const part = k === 0 ? 1 : (tail - lastMiddle) / (middle - lastMiddle);
      return { density: last + part * (density[i] - last), order, count: k };
    }
    above += volume[i];
    lastMiddle = middle;
    last = density[i];
  }
  return { density: last, order, count: order.length };
}

/** The sample nearest to the power-weighted middle of those listed, if it lies near; else the first. */
function placeOf(pieces: Pieces, listed: Uint32Array): number {
  let [power, r, z, spread] = [0, 0, 0, 0];
  for (const i of listed) {
    const p = pieces.density[i] * pieces.volume[i];
    power += p;
    r += p * pieces.r[i];
    z += p * pieces.z[i];
  }
  let nearest = listed[0];
  let distance = Infinity;
  for (const i of listed) {
    const d = Math.hypot(pieces.r[i] - r / power, pieces.z[i] - z / power);
    spread += (pieces.density[i] * pieces.volume[i] * d * d) / power;
    if (d < distance) {
      distance = d;
      nearest = i;
    }
  }
  return distance <= NEAR * Math.sqrt(spread) ? nearest : listed[0];
}
