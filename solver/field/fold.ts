/**
 * A mirror-symmetric grid under a mirror-symmetric drive, solved by half. ψ is even about the plane, so the plane is a natural boundary
 * of the half. With every integral of the weak form halved, a pair of turns k, k' is driven by μ0 I_k on the half and a turn on
 * the plane by μ0 I_k/2; ψ and u are those of the whole. The solution is unfolded, so whoever reads it sees the whole grid.
 */
import { SolverError } from "../errors.ts";
import { cellImages, type Half, halve, INNER_IMAGE, OUTER_IMAGE } from "../grid/halve.ts";
import type { Circuit, Grid, RegionMaterial } from "../types.ts";
import { touchOfCell } from "./axis.ts";
import { type CellIntegrals, PACKED } from "./integrals.ts";
import { type Folded, type Prepared, prepare, type Tick } from "./prepare.ts";
import { kindOfCell, NODES } from "./shape.ts";
import { turnsOfCells } from "./system.ts";

/**
 * Whether a grid can be solved by half: made of mirrored halves, with the circuit and each of `states` (materials by region)
 * exactly the same on both sides: senses and paths of turns, materials of regions.
 */
export function isFoldable(
  grid: Grid,
  states: readonly (readonly RegionMaterial[])[],
  circuit: Circuit,
): boolean {
  const cellImage = cellImages(grid);
  if (cellImage === null) return false;
  const image = regionImages(grid, cellImage, states[0].length);
  return states.every((materials) => isEven(materials, image, circuit));
}

/** As `prepare`, by half where it can be. */
export function prepareFolded(
  grid: Grid,
  states: readonly (readonly RegionMaterial[])[],
  circuit: Circuit,
  tick?: Tick,
): Prepared | Folded {
  const turnOfRegion = states[0].map((m) => m.turn);
  return isFoldable(grid, states, circuit)
    ? prepareHalf(grid, turnOfRegion, tick)
    : prepare(grid, turnOfRegion, tick);
}

/** As `prepare`, by half. Throws SolverError `structure` where the grid is not made of mirrored halves. */
export function prepareHalf(grid: Grid, turnOfRegion: readonly number[], tick?: Tick): Folded {
  const cellImage = cellImages(grid);
  if (cellImage === null || grid.exterior === null)
    throw new SolverError("structure", "the grid has no mirrored halves");
  const image = regionImages(grid, cellImage, turnOfRegion.length);
  return fold(grid, halve(grid, cellImage, grid.exterior), turnOfRegion, image, tick);
}

/** The mirror image of each region; itself where it has no cells. */
function regionImages(grid: Grid, cellImage: Int32Array, regions: number): Int32Array {
  const image = Int32Array.from({ length: regions }, (_, k) => k);
  for (let c = 0; c < cellImage.length; c++) {
    const own = grid.cellRegion[c];
    const twin = grid.cellRegion[cellImage[c]];
    image[own] = twin;
    image[twin] = own;
  }
  return image;
}

function isEven(materials: readonly RegionMaterial[], image: Int32Array, { path, sense }: Circuit): boolean {
  return materials.every((m, region) => {
    const twin = materials[image[region]];
    if (m.conductivity !== twin.conductivity) return false;
    if (m.reluctivity.re !== twin.reluctivity.re || m.reluctivity.im !== twin.reluctivity.im) return false;
    if (m.turn < 0 || twin.turn < 0) return m.turn === twin.turn;
    return path[m.turn] === path[twin.turn] && sense[m.turn] === sense[twin.turn];
  });
}

function fold(
  grid: Grid,
  half: Half,
  turnOfRegion: readonly number[],
  image: Int32Array,
  tick?: Tick,
): Folded {
  const { turnOf, share } = foldTurns(turnOfRegion, image);
  const halfTurns = turnOfRegion.map((turn) => (turn < 0 ? -1 : turnOf[turn]));
  const prepared = prepare(half.grid, halfTurns, tick);
  let free = 0;
  for (let i = 0; i < grid.fixed.length; i++) if (grid.fixed[i] === 0) free++;
  return {
    grid,
    integrals: unfoldIntegrals(grid, half, prepared.integrals),
    system: { ...turnsOfCells(grid, turnOfRegion), unknowns: free + turnOf.length },
    half: prepared,
    nodeOf: half.nodeOf,
    turnOf,
    share,
  };
}

/** Turns of the half: one for each pair, and one for each turn on the plane, of which half is there. */
function foldTurns(
  turnOfRegion: readonly number[],
  image: Int32Array,
): { turnOf: Int32Array; share: Float64Array } {
  const turnOf = new Int32Array(Math.max(...turnOfRegion) + 1).fill(-1);
  const share: number[] = [];
  turnOfRegion.forEach((turn, region) => {
    if (turn < 0 || turnOf[turn] >= 0) return;
    const twin = turnOfRegion[image[region]];
    turnOf[turn] = share.length;
    turnOf[twin] = share.length;
    share.push(turn === twin ? 0.5 : 1);
  });
  return { turnOf, share: Float64Array.from(share) };
}

/** The integrals of the whole: those of the half, and the same at the images' places. */
function unfoldIntegrals(grid: Grid, half: Half, of: CellIntegrals): CellIntegrals {
  const cells = grid.cellRegion.length;
  const kind = new Uint8Array(cells);
  const touch = new Uint8Array(cells);
  for (let c = 0; c < cells; c++) {
    kind[c] = kindOfCell(grid.r, grid.z, grid.cellNodes, c * NODES);
    touch[c] = touchOfCell(grid.r, grid.cellNodes, c * NODES);
  }
  const inner = (packed: Float64Array): Float64Array => {
    const out = new Float64Array(2 * packed.length);
    out.set(packed);
    half.cellImage.forEach((twin, c) => {
      copyPacked(packed, c, out, twin, INNER_ORDER);
    });
    return out;
  };
  const outer = new Float64Array(2 * of.exteriorStiffness.length);
  half.outerCell.forEach((cell, c) => {
    copyPacked(of.exteriorStiffness, c, outer, cell, SAME_ORDER);
    copyPacked(of.exteriorStiffness, c, outer, half.outerImage[c], OUTER_ORDER);
  });
  const leastJacobian = new Float64Array(cells);
  leastJacobian.set(of.leastJacobian);
  half.cellImage.forEach((twin, c) => {
    leastJacobian[twin] = of.leastJacobian[c];
  });
  return {
    kind,
    touch,
    stiffness: inner(of.stiffness),
    mass: inner(of.mass),
    leastJacobian,
    exteriorStiffness: outer,
  };
}

/** Places in a packed lower triangle when rows and columns are renumbered. */
function packedOrder(image: readonly number[]): Uint8Array {
  const order: number[] = [];
  image.forEach((p, i) => {
    for (const q of image.slice(0, i + 1)) {
      const [row, column] = p > q ? [p, q] : [q, p];
      order.push((row * (row + 1)) / 2 + column);
    }
  });
  return Uint8Array.from(order);
}

const SAME_ORDER = packedOrder([0, 1, 2, 3, 4, 5, 6, 7, 8]);
const INNER_ORDER = packedOrder(INNER_IMAGE);
const OUTER_ORDER = packedOrder(OUTER_IMAGE);

function copyPacked(
  from: Float64Array,
  cell: number,
  to: Float64Array,
  twin: number,
  order: Uint8Array,
): void {
  for (let k = 0; k < PACKED; k++) to[twin * PACKED + order[k]] = from[cell * PACKED + k];
}
