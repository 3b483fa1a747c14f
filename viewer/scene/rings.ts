/** Geometry of the turned surface: every edge of the section a ring of triangles, with the opened quarter left out. */
import type { Chain } from "./boundary.ts";
import { opening } from "./pick.ts";
import { kept } from "./simplify.ts";

/** Triangles of surfaces; y is the axis. */
export interface Rings {
  readonly position: Float32Array;
  readonly normal: Float32Array;
  /** Along the chain 0 … 1, and the middle of the chain's row in the table of colours. */
  readonly uv: Float32Array;
  readonly index: Uint32Array;
}

/** A piece of a chain as it is drawn. */
interface Piece {
  readonly ends: readonly [readonly [number, number], readonly [number, number]];
  /** Outward directions at both ends, [r, z]. */
  readonly normals: readonly [readonly [number, number], readonly [number, number]];
  /** Along the chain, 0 … 1. */
  readonly along: readonly [number, number];
  readonly row: number;
}

/** Bends sharper than this are edges, gentler ones are rounded by their shading. */
const sharp = Math.cos(0.6);

/** Rings round about at most, and at least when triangles are scarce. */
const around = { most: 96, least: 30 };

/** The finest rings that need at most so many triangles; `size` is the whole picture's, m. */
export function ringsOf(chains: readonly Chain[], size: number, triangles: number): Rings {
  let tolerance = size / 4000;
  let pieces = piecesOf(chains, tolerance);
  while (2 * pieces.length * around.least > triangles && tolerance < size) {
    tolerance *= 1.6;
    pieces = piecesOf(chains, tolerance);
  }
  const fit = Math.floor(triangles / (2 * Math.max(1, pieces.length)));
  return revolved(pieces, Math.max(3, Math.min(around.most, fit)));
}

function piecesOf(chains: readonly Chain[], tolerance: number): Piece[] {
  return chains.flatMap(({ points }, row) => {
    const stay = kept(points, tolerance);
    const lengths = lengthsAlong(points);
    const total = lengths.at(-1)! || 1;
    const straight = stay.slice(1).map((to, k): [number, number] => {
      const [p, q] = [points[stay[k]!]!, points[to]!];
      const length = Math.hypot(q[0] - p[0], q[1] - p[1]) || 1;
      return [(q[1] - p[1]) / length, (p[0] - q[0]) / length];
    });
    const closed = Math.hypot(points[0]![0] - points.at(-1)![0], points[0]![1] - points.at(-1)![1]) < 1e-9;
    const neighbour = (k: number): readonly [number, number] | undefined =>
      closed ? straight.at(k % straight.length) : straight[k];
    return straight.map(
      (own, k): Piece => ({
        ends: [points[stay[k]!]!, points[stay[k + 1]!]!],
        normals: [
          rounded(own, k === 0 && !closed ? undefined : neighbour(k - 1)),
          rounded(own, neighbour(k + 1)),
        ],
        along: [lengths[stay[k]!]! / total, lengths[stay[k + 1]!]! / total],
        row: (row + 0.5) / chains.length,
      }),
    );
  });
}

function rounded(
  own: readonly [number, number],
  next: readonly [number, number] | undefined,
): [number, number] {
  if (next === undefined || own[0] * next[0] + own[1] * next[1] < sharp) return [own[0], own[1]];
  const [r, z] = [own[0] + next[0], own[1] + next[1]];
  const length = Math.hypot(r, z);
  return [r / length, z / length];
}

function lengthsAlong(points: Chain["points"]): number[] {
  let length = 0;
  return points.map((p, k) => {
    const before = points[Math.max(0, k - 1)]!;
    length += Math.hypot(p[0] - before[0], p[1] - before[1]);
    return length;
  });
}

/** Every piece turned from one cut face round to the other in so many steps. */
function revolved(pieces: readonly Piece[], steps: number): Rings {
  const ring = 2 * (steps + 1);
  const position = new Float32Array(3 * ring * pieces.length);
  const normal = new Float32Array(3 * ring * pieces.length);
  const uv = new Float32Array(2 * ring * pieces.length);
  const index = new Uint32Array(6 * steps * pieces.length);
  const sweep = 2 * Math.PI - (opening.to - opening.from);
  const turn = Array.from({ length: steps + 1 }, (_, i) => opening.to + (sweep * i) / steps);
  const [cosines, sines] = [turn.map(Math.cos), turn.map(Math.sin)];
  pieces.forEach(({ ends, normals, along, row }, k) => {
    for (let i = 0, at = ring * k; i <= steps; i++) {
      const [c, s] = [cosines[i]!, sines[i]!];
      for (let end = 0; end < 2; end++, at++) {
        const [point, out] = [ends[end]!, normals[end]!];
        position[3 * at] = point[0] * c;
        position[3 * at + 1] = point[1];
        position[3 * at + 2] = point[0] * s;
        normal[3 * at] = out[0] * c;
        normal[3 * at + 1] = out[1];
        normal[3 * at + 2] = out[0] * s;
        uv[2 * at] = along[end]!;
        uv[2 * at + 1] = row;
      }
      if (i < steps) putSquare(index, 6 * (steps * k + i), ring * k + 2 * i);
    }
  });
  return { position, normal, uv, index };
}

/** Two triangles between four vertices from `v` on. */
function putSquare(index: Uint32Array, at: number, v: number): void {
  index[at] = v;
  index[at + 1] = v + 1;
  index[at + 2] = v + 2;
  index[at + 3] = v + 1;
  index[at + 4] = v + 3;
  index[at + 5] = v + 2;
}

/** The colours along every chain, a row each, `columns` wide, packed. */
export function chainColours(
  chains: readonly Chain[],
  colourOf: (cell: number) => number,
  columns: number,
): Uint32Array {
  const table = new Uint32Array(columns * chains.length);
  chains.forEach(({ points, cells }, row) => {
    const lengths = lengthsAlong(points);
    const total = lengths.at(-1)!;
    let edge = 0;
    for (let i = 0; i < columns; i++) {
      const at = ((i + 0.5) / columns) * total;
      while (edge < cells.length - 1 && lengths[edge + 1]! < at) edge++;
      table[row * columns + i] = colourOf(cells[edge]!);
    }
  });
  return table;
}
