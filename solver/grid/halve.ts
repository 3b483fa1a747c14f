/**
 * The half of a grid that was made of mirrored halves (`Grid.mirrored`), and who is whose mirror image: cell (i, j) of patch p has
 * the image (j, i) of patch p + half the patches; exterior cells lie ring after ring, each from bottom to top.
 */
import { SolverError } from "../errors.ts";
import type { Exterior, Grid } from "../types.ts";

const NODES = 9;
/** Local nodes of a cell's image: mirrored across ξ = η inside the circle, along ξ outside. */
export const INNER_IMAGE = [0, 3, 6, 1, 4, 7, 2, 5, 8] as const;
export const OUTER_IMAGE = [2, 1, 0, 5, 4, 3, 8, 7, 6] as const;

/** Half a grid. */
export interface Half {
  readonly grid: Grid;
  /** Node of the half for every node of the whole. */
  readonly nodeOf: Int32Array;
  /** Per cell of the half inside the circle: its image in the whole (its own number there is the same). */
  readonly cellImage: Int32Array;
  /** Per exterior cell of the half: its number in the whole, and its image there. */
  readonly outerCell: Int32Array;
  readonly outerImage: Int32Array;
}

/** Per cell inside the circle of the first half: its image; null where the grid is not made of mirrored halves. */
export function cellImages({ mirrored, exterior, cellRegion, level }: Grid): Int32Array | null {
  if (mirrored !== true || exterior === null || columnsOf(exterior) % 2 !== 0) return null;
  const half = cellRegion.length / 2;
  const image = new Int32Array(half);
  for (let c = 0; c < half; c++) {
    const i = c % level;
    const j = Math.floor(c / level) % level;
    image[c] = half + c + (i - j) * level + (j - i);
  }
  return image;
}

/** Exterior cells a ring: the first ring starts on the outer circle, t = 1. */
function columnsOf({ t }: Exterior): number {
  let cells = 0;
  while (t[cells * NODES] === 1) cells++;
  return cells;
}

/** The first half of the cells as a grid of its own. Throws SolverError `structure` where the halves do not match. */
export function halve(grid: Grid, cellImage: Int32Array, exterior: Exterior): Half {
  const nodeOf = new Int32Array(grid.r.length).fill(-1);
  const kept: number[] = [];
  const keep = (nodes: Int32Array): Int32Array =>
    nodes.map((node) => {
      if (nodeOf[node] < 0) nodeOf[node] = kept.push(node) - 1;
      return nodeOf[node];
    });
  const cells = cellImage.length;
  const cellNodes = keep(grid.cellNodes.subarray(0, cells * NODES));
  const { outerCell, outerImage } = pairOuter(exterior, nodeOf[exterior.cellNodes[0]] >= 0);
  const outerNodes = keep(pick(exterior.cellNodes, outerCell, Int32Array));
  for (let c = 0; c < cells; c++) match(grid.cellNodes, c, cellImage[c], INNER_IMAGE, nodeOf);
  for (let c = 0; c < outerCell.length; c++)
    match(exterior.cellNodes, outerCell[c], outerImage[c], OUTER_IMAGE, nodeOf);
  const half: Grid = {
    r: Float64Array.from(kept, (node) => grid.r[node]),
    z: Float64Array.from(kept, (node) => grid.z[node]),
    fixed: Uint8Array.from(kept, (node) => grid.fixed[node]),
    cellNodes,
    cellRegion: grid.cellRegion.slice(0, cells),
    cellPatch: grid.cellPatch.slice(0, cells),
    level: grid.level,
    exterior: {
      ...exterior,
      cellNodes: outerNodes,
      t: pick(exterior.t, outerCell, Float64Array),
      c: pick(exterior.c, outerCell, Float64Array),
    },
  };
  return { grid: half, nodeOf, cellImage, outerCell, outerImage };
}

/** The exterior cells on one side, with their images. */
function pairOuter(exterior: Exterior, lower: boolean): Pick<Half, "outerCell" | "outerImage"> {
  const columns = columnsOf(exterior);
  const width = columns / 2;
  const count = exterior.cellNodes.length / NODES / 2;
  const outerCell = new Int32Array(count);
  const outerImage = new Int32Array(count);
  for (let k = 0; k < count; k++) {
    const ring = Math.floor(k / width) * columns;
    const column = (k % width) + (lower ? 0 : width);
    outerCell[k] = ring + column;
    outerImage[k] = ring + columns - 1 - column;
  }
  return { outerCell, outerImage };
}

/** The nine numbers of each of the cells named. */
function pick<T extends Float64Array | Int32Array>(
  all: T,
  cells: Int32Array,
  kind: new (length: number) => T,
): T {
  const out = new kind(cells.length * NODES);
  cells.forEach((cell, k) => {
    for (let i = 0; i < NODES; i++) out[k * NODES + i] = all[cell * NODES + i];
  });
  return out;
}

/** Gives the nodes of cell `to` the numbers of their images in cell `from`. */
function match(
  nodes: Int32Array,
  from: number,
  to: number,
  image: readonly number[],
  nodeOf: Int32Array,
): void {
  for (let i = 0; i < NODES; i++) {
    const own = nodeOf[nodes[from * NODES + i]];
    const twin = nodes[to * NODES + image[i]];
    if (nodeOf[twin] < 0) nodeOf[twin] = own;
    else if (nodeOf[twin] !== own)
      throw new SolverError("structure", `node ${twin} is the image of two nodes: the halves do not match`);
  }
}
