/** Where a body's name fits into it, px; null where it has to be told outside. */
import type { Placed } from "../../../meshes/layout.ts";
import { inside, type Xy } from "../../../meshes/planar.ts";
import { type Figure, figureBox } from "../../../meshes/shapes.ts";
import { type View, wordsWidth, xOf, yOf } from "./arrange.ts";
import type { Dimension } from "./dimensions.ts";

export interface NamePlace {
  readonly x: number;
  readonly y: number;
  readonly upright: boolean;
}

/** Levels tried across a body's height or width. */
const LEVELS = [0.5, 0.4, 0.6, 0.3, 0.7, 0.2, 0.8];

/** A place inside one of a body's pieces for words of so many px; solid ones take them across the axis. */
export function placeName(
  pieces: readonly Figure[],
  words: string,
  view: View,
  fontPx: number,
): NamePlace | null {
  const need = wordsWidth(words, fontPx);
  for (const piece of pieces) {
    const points = outlineOf(piece, view);
    const found =
      alongRows(points, need, fontPx, view.axisX) ?? alongColumns(points, need, fontPx, view.axisX);
    if (found !== null) return found;
  }
  return null;
}

/** The right half's corners, px. */
function outlineOf(piece: Figure, view: View): readonly Xy[] {
  if (piece.kind === "polygon") return piece.points.map(([r, z]): Xy => [xOf(view, r), yOf(view, z)]);
  return Array.from({ length: 25 }, (_, i): Xy => {
    const angle = (Math.PI * i) / 24;
    return [
      xOf(view, piece.r + piece.radius * Math.sin(angle)),
      yOf(view, piece.z - piece.radius * Math.cos(angle)),
    ];
  });
}

/** In the right half where there is room, else across the axis: a piece that reaches it goes on in its mirror image. */
function alongRows(points: readonly Xy[], need: number, fontPx: number, axisX: number): NamePlace | null {
  const rows = levels(points, 1).map((y) => ({ y, ends: clear(points, y, fontPx / 2 + 3, 1) }));
  const right = rows.find(({ ends: [a, b] }) => b - a >= need);
  if (right !== undefined) return { x: (right.ends[0] + right.ends[1]) / 2, y: right.y, upright: false };
  const across = rows.find(({ ends: [a, b] }) => a <= axisX + 0.5 && 2 * (b - axisX) >= need);
  return across === undefined ? null : { x: axisX, y: across.y, upright: false };
}

function alongColumns(points: readonly Xy[], need: number, fontPx: number, axisX: number): NamePlace | null {
  for (const x of levels(points, 0)) {
    const [a, b] = clear(points, x, fontPx / 2 + 3, 0);
    if (x > axisX + fontPx && b - a >= need) return { x, y: (a + b) / 2, upright: true };
  }
  return null;
}

function levels(points: readonly Xy[], axis: 0 | 1): number[] {
  const values = points.map((p) => p[axis]);
  const [low, high] = [Math.min(...values), Math.max(...values)];
  return LEVELS.map((part) => low + part * (high - low));
}

/** The widest stretch inside the outline at `level` and at `reach` on both sides of it; [0, 0] where there is none. */
function clear(points: readonly Xy[], level: number, reach: number, axis: 0 | 1): readonly [number, number] {
  const rows = [level - reach, level, level + reach].map((at) => widest(points, at, axis));
  const a = Math.max(...rows.map((row) => row[0]));
  const b = Math.min(...rows.map((row) => row[1]));
  return b > a ? [a, b] : [0, 0];
}

function widest(points: readonly Xy[], at: number, axis: 0 | 1): readonly [number, number] {
  const other = axis === 1 ? 0 : 1;
  const cuts: number[] = [];
  points.forEach((p, i) => {
    const q = points[(i + 1) % points.length]!;
    if (p[axis] > at === q[axis] > at) return;
    cuts.push(p[other] + ((at - p[axis]) / (q[axis] - p[axis])) * (q[other] - p[other]));
  });
  cuts.sort((x, y) => x - y);
  let best: readonly [number, number] = [Infinity, -Infinity];
  for (let i = 0; i + 1 < cuts.length; i += 2) {
    const [a, b] = [cuts[i]!, cuts[i + 1]!];
    if (b - a > best[1] - best[0] || best[0] === Infinity) best = [a, b];
  }
  return best;
}

/** What a leader to a name does when pressed. */
export const nameLabel = "go to its words";

/** More names than this are not told outside: each takes a lane of the drawing's room. */
const MOST_LEADERS = 6;

/** Leaders to the names that fit into no piece of their body, as measures without arrows under the drawing. */
export function nameLeaders(bodies: readonly Placed[], view: View, fontPx: number): Dimension[] {
  const leaders = bodies.flatMap((body): Dimension[] => {
    const lowest = body.pieces[0];
    if (lowest === undefined || placeName(body.pieces, body.label, view, fontPx) !== null) return [];
    const { left, right, low, high } = figureBox(lowest);
    const r = lowest.kind === "disc" ? lowest.r + 0.4 * lowest.radius : (left + right) / 2;
    const from: Xy = [r, inside([r, (low + high) / 2], cornersOf(lowest)) ? (low + high) / 2 : low];
    return [
      {
        side: "bottom",
        from: r,
        to: r,
        fromAt: from[1],
        toAt: from[1],
        words: body.label.length > 28 ? `${body.label.slice(0, 27)}…` : body.label,
        label: nameLabel,
        pointer: body.pointer,
        segment: [from, from],
      },
    ];
  });
  return leaders.slice(0, MOST_LEADERS);
}

const cornersOf = (f: Figure): readonly Xy[] =>
  f.kind === "polygon"
    ? f.points
    : [
        [0, f.z - f.radius],
        [f.radius, f.z],
        [0, f.z + f.radius],
      ];
