/**
 * What a workshop asks about the heat of a part: how much lies below a level of any function of place (slices by height,
 * depths under a surface), and the density not exceeded in a given share of its volume.
 *
 * A cell on one side of a level counts whole, with its power from the cell's own quadrature. A cell the level cuts is read in 8 × 8 pieces, scaled
 * to the cell's power. In a piece the level goes evenly from its least to its greatest corner value and the density linearly from the mean of
 * the two lower corners to that of the two upper; so shares are continuous in the level, with an error of third order in the piece. The quantile takes
 * the density itself as the level, and volume in place of power.
 */
import { SolverError } from "../errors.ts";
import { type CellSamples, heatSampler } from "./density.ts";
import type { Losses } from "./losses.ts";
import type { Solution } from "./prepare.ts";
import { NODES } from "./shape.ts";

/** Pieces along a side of a cut cell. */
const PIECES = 8;
/** Pieces along a side of a cell in the first look for the hottest volume; the second takes PIECES. */
const COARSE = 2;
/** A cell is looked at again when its hottest corner passes this part of the estimated quantile. */
const WORTH_A_LOOK = 0.7;
/** Halvings that narrow the quantile down to rounding. */
const HALVINGS = 60;
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
  const read = heatSampler(solution, PIECES, "corners");
  const atNode = new Float64Array(grid.r.length).fill(Number.NaN);
  let total = 0;
  for (const cell of cellsOf(solution, regions)) {
    const power = losses.cellPower[cell];
    total += power;
    let least = Infinity;
    let most = -Infinity;
    for (let i = 0; i < NODES; i++) {
      const node = grid.cellNodes[cell * NODES + i];
      if (Number.isNaN(atNode[node])) atNode[node] = level(grid.r[node], grid.z[node]);
      least = Math.min(least, atNode[node]);
      most = Math.max(most, atNode[node]);
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
  samples: CellSamples,
  power: number,
  level: (r: number, z: number) => number,
  thresholds: readonly number[],
  below: Float64Array,
): void {
  const { volume, cornerR, cornerZ, cornerDensity } = samples;
  const value = new Float64Array(cornerR.length);
  for (let k = 0; k < value.length; k++) value[k] = level(cornerR[k], cornerZ[k]);
  const part = new Float64Array(thresholds.length);
  let sampled = 0;
  for (let p = 0; p < volume.length; p++) {
    const corners = cornersOf(p, PIECES);
    sortFour(corners, value);
    const least = value[corners[0]];
    const spread = value[corners[3]] - least;
    const low = (cornerDensity[corners[0]] + cornerDensity[corners[1]]) / 2;
    const high = (cornerDensity[corners[2]] + cornerDensity[corners[3]]) / 2;
    sampled += (volume[p] * (low + high)) / 2;
    for (let i = 0; i < thresholds.length; i++) {
      const t = thresholds[i];
      const f = spread > 0 ? Math.min(1, Math.max(0, (t - least) / spread)) : t >= least ? 1 : 0;
      part[i] += volume[p] * f * (low + ((high - low) * f) / 2);
    }
  }
  if (!(sampled > 0)) return;
  for (let i = 0; i < below.length; i++) below[i] += (power * part[i]) / sampled;
}

const CORNERS = new Int32Array(4);

/** Places of piece p's four corners among the (m + 1)² of its cell; valid until the next call. */
function cornersOf(p: number, m: number): Int32Array {
  const k = Math.floor(p / m) * (m + 1) + (p % m);
  CORNERS[0] = k;
  CORNERS[1] = k + 1;
  CORNERS[2] = k + m + 1;
  CORNERS[3] = k + m + 2;
  return CORNERS;
}

/** Four places by rising value, in place. */
function sortFour(places: Int32Array, value: Float64Array): void {
  for (let i = 1; i < 4; i++) {
    const own = places[i];
    let j = i;
    for (; j > 0 && value[places[j - 1]] > value[own]; j--) places[j] = places[j - 1];
    places[j] = own;
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
  /** Densities exceeded in half and in one and a half times the volume, W/m³: their change with the grid tells whether that of `density` is chance. */
  readonly beside: readonly [number, number];
}

/** Pieces: the place of the hottest corner, and the densities between which each lies. */
interface Pieces {
  readonly r: Float64Array;
  readonly z: Float64Array;
  readonly volume: Float64Array;
  readonly least: Float64Array;
  readonly most: Float64Array;
}

/**
 * The density not exceeded in `share` (0 … 1) of the regions' volume, and a place inside what exceeds it: the middle of that volume
 * where it is one piece round its middle, else the hottest spot.
 */
export function quantileDensity(solution: Solution, regions: readonly number[], share = 0.999): HotSpot {
  const cells = cellsOf(solution, regions);
  const coarse = piecesOf(solution, cells, COARSE);
  const tail = (1 - share) * coarse.volume.reduce((sum, v) => sum + v, 0);
  const floor = WORTH_A_LOOK * upperQuantile(coarse, tail);
  const perCell = COARSE * COARSE;
  const hottest = cells.filter((_cell, i) =>
    coarse.most.subarray(i * perCell, (i + 1) * perCell).some((d) => d >= floor),
  );
  const fine = piecesOf(solution, hottest, PIECES);
  const density = upperQuantile(fine, tail);
  const at = placeOf(fine, density);
  const beside = [upperQuantile(fine, tail / 2), upperQuantile(fine, 1.5 * tail)] as const;
  return { density, r: fine.r[at], z: fine.z[at], beside };
}

function piecesOf(solution: Solution, cells: readonly number[], m: number): Pieces {
  const read = heatSampler(solution, m, "corners");
  const numbers = (): Float64Array => new Float64Array(cells.length * m * m);
  const pieces: Pieces = {
    r: numbers(),
    z: numbers(),
    volume: numbers(),
    least: numbers(),
    most: numbers(),
  };
  let at = 0;
  for (const cell of cells) {
    const samples = read(cell);
    for (let p = 0; p < samples.volume.length; p++) {
      const corners = cornersOf(p, m);
      sortFour(corners, samples.cornerDensity);
      pieces.r[at] = samples.cornerR[corners[3]];
      pieces.z[at] = samples.cornerZ[corners[3]];
      pieces.volume[at] = samples.volume[p];
      pieces.least[at] = samples.cornerDensity[corners[0]];
      pieces.most[at++] = samples.cornerDensity[corners[3]];
    }
  }
  return pieces;
}

/** Volume of piece i above a density. */
function volumeAbove(pieces: Pieces, i: number, density: number): number {
  const { least, most, volume } = pieces;
  if (density >= most[i]) return 0;
  return density <= least[i] ? volume[i] : (volume[i] * (most[i] - density)) / (most[i] - least[i]);
}

/** The density that the volume `tail` exceeds, by halving. */
function upperQuantile(pieces: Pieces, tail: number): number {
  const { most } = pieces;
  let low = 0;
  let high = most.reduce((a, b) => Math.max(a, b), 0);
  // Pieces below `low` have no part in any later sum; soon only the few hottest are left.
  const list = Int32Array.from(most.keys());
  let count = list.length;
  for (let k = 0; k < HALVINGS; k++) {
    const middle = (low + high) / 2;
    let above = 0;
    for (let i = 0; i < count; i++) above += volumeAbove(pieces, list[i], middle);
    if (above > tail) {
      low = middle;
      let kept = 0;
      for (let i = 0; i < count; i++) if (most[list[i]] > low) list[kept++] = list[i];
      count = kept;
    } else high = middle;
  }
  return (low + high) / 2;
}

/** The piece nearest to the middle of the volume above a density, if it lies near; else the hottest. */
function placeOf(pieces: Pieces, density: number): number {
  let volume = 0;
  let r = 0;
  let z = 0;
  let spread = 0;
  let hottest = 0;
  const listed: number[] = [];
  for (let i = 0; i < pieces.volume.length; i++) {
    if (pieces.most[i] > pieces.most[hottest]) hottest = i;
    const v = volumeAbove(pieces, i, density);
    if (v === 0) continue;
    listed.push(i);
    volume += v;
    r += v * pieces.r[i];
    z += v * pieces.z[i];
  }
  let nearest = hottest;
  let distance = Infinity;
  for (const i of listed) {
    const d = Math.hypot(pieces.r[i] - r / volume, pieces.z[i] - z / volume);
    spread += (volumeAbove(pieces, i, density) * d * d) / volume;
    if (d < distance) {
      distance = d;
      nearest = i;
    }
  }
  return distance <= NEAR * Math.sqrt(spread) ? nearest : hottest;
}
