/**
 * The lines of the grid that fields are resampled onto: 0 = r_0 < r_1 < … and z_0 < z_1 < …. They cover turns and bodies with a margin, pass through the
 * edges of their boxes, through tubes' bores and outlines' corners where the count allows, and stand closer towards these marks:
 *
 *   h(x) = c·min(h_max, min_m (h_m + G |x − x_m|)),   h_m a share of the skin depth at mark m,   lines at equal steps of F(x) = ∫ dx / h(x),
 *
 * c ≥ 1 as small as the greatest number of nodes allows.
 */
import { skinDepth } from "./build.ts";
import type { Piece, Scene } from "./scene.ts";

/** No grid has more nodes than this. */
export const MOST_NODES = 24_000;
/** Marks are given up, the least important first, where their lines alone would make more nodes than this. */
const MOST_MARKED = 8_000;
/** Cell at a surface, in skin depths and in widths of what lies behind it. */
const PER_SKIN_DEPTH = 0.5;
const PER_WIDTH = 0.2;
/** Cell anywhere, in widths of the whole. */
const PER_WHOLE = 1 / 32;
/** Growth of a cell's size per distance from a mark. */
const GROWTH = 0.25;
/** Space round the arrangement, in its half-size. */
const MARGIN = 0.5;
/** Marks nearer than this part of the half-size are one: far above rounding, far below the thinnest gap a design may have. */
const SAME = 1e-7;
const HALVINGS = 40;

/** One direction's lines. */
export interface Lines {
  /** m, ascending. */
  readonly at: Float64Array;
  /** Where what asked for the line lies: −1 below it, +1 above, 0 if nothing did. */
  readonly side: Int8Array;
}

/** What a mark is given up by: ends never, then boxes of bodies, boxes of turns, bores of tubes, corners of outlines. */
const RANK = { end: 0, body: 1, turn: 2, bore: 3, corner: 4 } as const;
const RANKS = [4, 3, 2, 1];

interface Mark {
  readonly at: number;
  readonly side: -1 | 0 | 1;
  readonly rank: number;
  /** h_m, m. */
  readonly size: number;
}

interface Marks {
  readonly r: Mark[];
  readonly z: Mark[];
}

/** Lines in both directions, and the arrangement's half-size (m): the greater of its radius and half its height. Depends on the scene alone. */
export function fieldLines(scene: Scene): { r: Lines; z: Lines; size: number } {
  const marks: Marks = { r: [], z: [] };
  addBodies(scene, marks);
  addTurns(scene, marks);
  const [low, high] = range(marks.z.map((m) => m.at));
  const [, reach] = range(marks.r.map((m) => m.at));
  const size = Math.max(reach, (high - low) / 2);
  const margin = MARGIN * size;
  const r = merge([end(0), ...marks.r.filter((m) => m.at > SAME * size), end(reach + margin)], SAME * size);
  const z = merge([end(low - margin), ...marks.z, end(high + margin)], SAME * size);
  const kept = (all: readonly Mark[], rank: number): number => all.filter((m) => m.rank <= rank).length;
  const rank = RANKS.find((k) => kept(r, k) * kept(z, k) <= MOST_MARKED) ?? RANK.end;
  const ways = [wayAlong(r, rank), wayAlong(z, rank)] as const;
  const c = leastCoarsening((x) => count(ways[0], x) * count(ways[1], x));
  return { r: linesOf(ways[0], c), z: linesOf(ways[1], c), size };
}

const end = (at: number): Mark => ({ at, side: 0, rank: RANK.end, size: Infinity });

const range = (x: readonly number[]): [number, number] => [
  x.reduce((a, b) => Math.min(a, b)),
  x.reduce((a, b) => Math.max(a, b)),
];

/** Both edges of what lies between `low` and `high`. */
function edges(low: number, high: number, rank: number, depth: number): Mark[] {
  const size = Math.min(depth, PER_WIDTH * (high - low));
  return [
    { at: low, side: 1, rank, size },
    { at: high, side: -1, rank, size },
  ];
}

function addBodies(scene: Scene, marks: Marks): void {
  for (const { pieces, material } of scene.bodies) {
    const depth = PER_SKIN_DEPTH * skinDepth(material, scene.frequency);
    for (const piece of pieces) {
      const box = boxOf(piece);
      const [r, z] = [edges(...box.r, RANK.body, depth), edges(...box.z, RANK.body, depth)];
      marks.r.push(...r);
      marks.z.push(...z);
      if (piece.kind === "sphere") continue;
      const corner = { side: 0, rank: RANK.corner } as const;
      for (const [x, y] of piece.points) {
        marks.r.push({ ...corner, at: x, size: r[0]?.size ?? depth });
        marks.z.push({ ...corner, at: y, size: z[0]?.size ?? depth });
      }
    }
  }
}

function boxOf(piece: Piece): { r: [number, number]; z: [number, number] } {
  if (piece.kind === "sphere") {
    return { r: [0, piece.radius], z: [piece.centreZ - piece.radius, piece.centreZ + piece.radius] };
  }
  return { r: range(piece.points.map((p) => p[0])), z: range(piece.points.map((p) => p[1])) };
}

function addTurns(scene: Scene, marks: Marks): void {
  const { section } = scene;
  const depth = PER_SKIN_DEPTH * skinDepth(scene.conductor, scene.frequency);
  const [w, h] =
    section.kind === "round" ? [section.radius, section.radius] : [section.width / 2, section.height / 2];
  const across = (into: Mark[], middle: number, half: number): void => {
    into.push(...edges(middle - half, middle + half, RANK.turn, depth));
    if (section.wall === 0) return;
    const size = Math.min(depth, PER_WIDTH * section.wall);
    const inner = half - section.wall;
    into.push({ at: middle - inner, side: -1, rank: RANK.bore, size });
    into.push({ at: middle + inner, side: 1, rank: RANK.bore, size });
  };
  for (const t of scene.turns) {
    across(marks.r, t.r, w);
    across(marks.z, t.z, h);
  }
}

/** Ascending, those nearer than `same` made one: the first of the least rank, with the smallest size. */
function merge(marks: readonly Mark[], same: number): Mark[] {
  const sorted = [...marks].sort((a, b) => a.at - b.at || a.rank - b.rank);
  const merged: Mark[] = [];
  for (const m of sorted) {
    const last = merged.at(-1);
    if (last === undefined || m.at - last.at > same) {
      merged.push(m);
      continue;
    }
    merged[merged.length - 1] = { ...(m.rank < last.rank ? m : last), size: Math.min(m.size, last.size) };
  }
  return merged;
}

/** h on one stretch of the way, linear: `slope` G, 0 or −G; `steps` is F over it. */
interface Stretch {
  readonly from: number;
  readonly size: number;
  readonly slope: number;
  readonly steps: number;
}

/** The way between two kept marks. */
interface Span {
  readonly from: number;
  readonly side: Mark["side"];
  readonly stretches: readonly Stretch[];
  readonly steps: number;
}

/** A direction's spans, and where they end. */
interface Way {
  readonly spans: readonly Span[];
  readonly end: number;
}

/** Marks that are given up still say how fine the grid is where they stand. */
function wayAlong(marks: readonly Mark[], rank: number): Way {
  const at = marks.map((m) => m.at);
  const [from, to] = [at[0] ?? 0, at.at(-1) ?? 0];
  const most = PER_WHOLE * (to - from);
  const sizes = marks.map((m) => Math.min(most, m.size));
  const spread = (i: number, j: number): void => {
    const reached = (sizes[j] ?? most) + GROWTH * Math.abs((at[i] ?? 0) - (at[j] ?? 0));
    sizes[i] = Math.min(sizes[i] ?? most, reached);
  };
  for (let i = 1; i < at.length; i++) spread(i, i - 1);
  for (let i = at.length - 2; i >= 0; i--) spread(i, i + 1);
  const spans: { from: number; side: Mark["side"]; stretches: Stretch[]; steps: number }[] = [];
  marks.slice(0, -1).forEach((m, i) => {
    if (m.rank <= rank) spans.push({ from: m.at, side: m.side, stretches: [], steps: 0 });
    const span = spans.at(-1);
    for (const s of stretches(m.at, at[i + 1] ?? to, sizes[i] ?? most, sizes[i + 1] ?? most, most)) {
      span?.stretches.push(s);
      if (span !== undefined) span.steps += s.steps;
    }
  });
  return { spans, end: to };
}

/** Up from size p at a, level at most, down to size q at b. */
function stretches(a: number, b: number, p: number, q: number, most: number): Stretch[] {
  const top = Math.min(most, (p + q + GROWTH * (b - a)) / 2);
  const up = (top - p) / GROWTH;
  const down = (top - q) / GROWTH;
  const level = b - a - up - down;
  return [
    { from: a, size: p, slope: GROWTH, steps: Math.log(top / p) / GROWTH },
    { from: a + up, size: top, slope: 0, steps: Math.max(0, level / top) },
    { from: b - down, size: top, slope: -GROWTH, steps: Math.log(top / q) / GROWTH },
  ];
}

const cellsOf = (span: Span, c: number): number => Math.max(1, Math.round(span.steps / c));
const count = ({ spans }: Way, c: number): number => spans.reduce((n, s) => n + cellsOf(s, c), 1);

/** Least c ≥ 1 (to 40 halvings of its range) at which nodes(c) is within bounds. */
function leastCoarsening(nodes: (c: number) => number): number {
  if (nodes(1) <= MOST_NODES) return 1;
  let [low, high] = [1, 2];
  while (nodes(high) > MOST_NODES) high *= 2;
  for (let k = 0; k < HALVINGS; k++) {
    const middle = (low + high) / 2;
    if (nodes(middle) > MOST_NODES) low = middle;
    else high = middle;
  }
  return high;
}

function linesOf({ spans, end: last }: Way, c: number): Lines {
  const at: number[] = [];
  const side: number[] = [];
  for (const span of spans) {
    const n = cellsOf(span, c);
    for (let k = 0; k < n; k++) {
      at.push(k === 0 ? span.from : placeOf(span, (span.steps * k) / n));
      side.push(k === 0 ? span.side : 0);
    }
  }
  return { at: Float64Array.from([...at, last]), side: Int8Array.from([...side, 0]) };
}

/** x at which F has grown by `steps` since the span's beginning. */
function placeOf({ stretches: all }: Span, steps: number): number {
  let left = steps;
  let s = all[0];
  for (const next of all) {
    s = next;
    if (left <= next.steps) break;
    left -= next.steps;
  }
  if (s === undefined) return 0;
  return s.slope === 0 ? s.from + left * s.size : s.from + (s.size * Math.expm1(s.slope * left)) / s.slope;
}
