/** The surface of what the cells fill: edges that belong to one cell only, which a solid of revolution shows as rings. */
import type { Heat } from "../heat.ts";

/** An edge of the surface, the body to the left of it on the way from (r0, z0) to (r1, z1); m. */
export interface Boundary {
  /** r0, z0, r1, z1 an edge. */
  readonly edges: Float64Array;
  /** The cell behind each edge. */
  readonly cells: Int32Array;
}

/** Sides this much nearer to each other than the whole picture's size are one: far above rounding, far below any cell. */
const grain = 2 ** -20;

/** All edges of one cell only; those on the axis, which is no surface, are left out. */
export function boundaryOf({ corners }: Pick<Heat, "corners">): Boundary {
  const count = corners.length / 2;
  const size = largest(corners);
  const keys = edgeKeys(corners, size);
  const single = singles(keys);
  const axis = size * grain;
  const found: number[] = [];
  for (let k = 0; k < count; k++) {
    if (single[k] === 0) continue;
    const [r0, , r1] = ends(corners, k);
    if (r0 > axis || r1 > axis) found.push(k);
  }
  const edges = new Float64Array(4 * found.length);
  found.forEach((k, i) => {
    const [r0, z0, r1, z1] = ends(corners, k);
    edges.set(area(corners, k >> 2) >= 0 ? [r0, z0, r1, z1] : [r1, z1, r0, z0], 4 * i);
  });
  return { edges, cells: Int32Array.from(found, (k) => k >> 2) };
}

/** The largest coordinate; 1 where there is none. */
function largest(coordinates: Heat["corners"]): number {
  let most = 0;
  for (const x of coordinates) most = Math.max(most, Math.abs(x));
  return most || 1;
}

/** Ends of edge k: corner k mod 4 of cell k / 4, and the next. */
function ends(corners: Heat["corners"], k: number): [number, number, number, number] {
  const next = (k & ~3) + ((k + 1) & 3);
  return [corners[2 * k]!, corners[2 * k + 1]!, corners[2 * next]!, corners[2 * next + 1]!];
}

/** Twice the cell's area, positive when its corners run counter-clockwise (r to the right, z up). */
function area(corners: Heat["corners"], cell: number): number {
  const c = (k: number): number => corners[8 * cell + k]!;
  return (c(4) - c(0)) * (c(7) - c(3)) - (c(6) - c(2)) * (c(5) - c(1));
}

/** A whole number an edge, the same for both cells that share it: its ends' sum, which does not know their order. */
function edgeKeys(corners: Heat["corners"], size: number): Float64Array {
  const scale = 1 / (size * grain);
  const keys = new Float64Array(corners.length / 2);
  for (let k = 0; k < keys.length; k++) {
    const next = 2 * ((k & ~3) + ((k + 1) & 3));
    const r = Math.round((corners[2 * k]! + corners[next]!) * scale);
    const z = Math.round((corners[2 * k + 1]! + corners[next + 1]!) * scale);
    keys[k] = r * 2 ** 24 + z;
  }
  return keys;
}

/** 1 where a key is there once, by an open hash table of twice the room. */
function singles(keys: Float64Array): Uint8Array {
  const bits = Math.ceil(Math.log2(Math.max(2, keys.length))) + 1;
  const mask = 2 ** bits - 1;
  const slots = new Int32Array(2 ** bits).fill(-1);
  const single = new Uint8Array(keys.length).fill(1);
  for (let k = 0; k < keys.length; k++) {
    const key = keys[k]!;
    // Both halves of the key are spread over the table (Knuth's multiplicative hashing).
    let at = (Math.imul(key % 2 ** 31, 0x9e3779b1) ^ Math.imul(key / 2 ** 24, 0x85ebca6b)) >>> (32 - bits);
    at &= mask;
    while (slots[at]! >= 0 && keys[slots[at]!] !== key) at = (at + 1) & mask;
    if (slots[at]! < 0) slots[at] = k;
    else {
      single[slots[at]!] = 0;
      single[k] = 0;
    }
  }
  return single;
}

/** Edges of the surface one after another, as far as they hang together. */
export interface Chain {
  /** Points [r, z], m; one more than edges, the first again at the end where it is closed. */
  readonly points: readonly (readonly [number, number])[];
  /** The cell behind each edge. */
  readonly cells: readonly number[];
}

/** The edges joined end to start. */
export function chainsOf({ edges, cells }: Boundary): Chain[] {
  const size = largest(edges);
  const key = (at: number): string =>
    `${Math.round(edges[at]! / (size * grain))} ${Math.round(edges[at + 1]! / (size * grain))}`;
  const starts = new Map<string, number[]>();
  const entered = new Set<string>();
  for (let k = 0; k < cells.length; k++) {
    const from = key(4 * k);
    starts.set(from, [...(starts.get(from) ?? []), k]);
    entered.add(key(4 * k + 2));
  }
  const chains: Chain[] = [];
  const walk = (first: number): void => {
    const points: [number, number][] = [[edges[4 * first]!, edges[4 * first + 1]!]];
    const behind: number[] = [];
    for (let k: number | undefined = first; k !== undefined; ) {
      const waiting = starts.get(key(4 * k))!;
      waiting.splice(waiting.indexOf(k), 1);
      points.push([edges[4 * k + 2]!, edges[4 * k + 3]!]);
      behind.push(cells[k]!);
      k = starts.get(key(4 * k + 2))?.[0];
    }
    chains.push({ points, cells: behind });
  };
  // Those that start in the open (on the axis) first, then what is left runs in circles.
  for (let k = 0; k < cells.length; k++) if (!entered.has(key(4 * k))) walk(k);
  for (const waiting of starts.values()) while (waiting.length > 0) walk(waiting[0]!);
  return chains;
}
