/**
 * From millimetres to the screen: the scale at which drawing and dimensions fit a picture of so many pixels, and the lanes beside
 * the drawing in which dimensions stand without overlapping each other or the bodies.
 */
import type { Box } from "../../../meshes/planar.ts";
import type { Dimension, Side } from "./dimensions.ts";

/** The picture's place on the screen: x = axisX + scale·r, y = zeroY − scale·z, px. */
export interface View {
  readonly scale: number;
  readonly axisX: number;
  readonly zeroY: number;
}

export const xOf = (view: View, r: number): number => view.axisX + view.scale * r;
export const yOf = (view: View, z: number): number => view.zeroY - view.scale * z;

/** A dimension in its lane, px. */
export interface Laid {
  readonly dimension: Dimension;
  /** Ends along the lane, and the dimension line's place across it. */
  readonly from: number;
  readonly to: number;
  readonly line: number;
  /** Starts of the extension lines, across the lane. */
  readonly fromAt: number;
  readonly toAt: number;
  /** Middle of the words. */
  readonly x: number;
  readonly y: number;
}

export interface Arranged {
  readonly view: View;
  readonly laid: readonly Laid[];
}

/** Thickness of a lane: the line, and words as high as a finger may hit. */
const LANE = 30;
/** From a lane's inner edge to its line, and to the middle of its words. */
const TO_LINE = 8;
const TO_WORDS = 19;
/** Free room around the drawing. */
const MARGIN = 14;
/** Below everything: scale bar and note. */
export const FOOT = 34;

const sides: readonly Side[] = ["top", "bottom", "left", "right"];
const level = (side: Side): boolean => side === "top" || side === "bottom";

/** Room that words take, px; a little much rather than too little. */
export const wordsWidth = (words: string, fontPx: number): number => words.length * 0.62 * fontPx + 10;

interface Picture {
  readonly width: number;
  readonly height: number;
  readonly fontPx: number;
}

/** Lays out a drawing `box` mm large (its right half; it is mirrored) with its dimensions. */
export function arrange(box: Box, dimensions: readonly Dimension[], picture: Picture): Arranged {
  let lanes = new Map<Side, Dimension[][]>();
  let view = viewOf(box, lanes, picture);
  // Which dimensions share a lane depends on the scale, and the scale on the number of lanes: twice is enough in practice.
  for (let pass = 0; pass < 3; pass++) {
    lanes = lanesOf(dimensions, view, picture);
    view = viewOf(box, lanes, picture);
  }
  lanes = lanesOf(dimensions, view, picture);
  const final = viewOf(box, lanes, picture);
  return {
    view: final,
    laid: sides.flatMap((side) => laidOut(side, lanes.get(side) ?? [], box, final, picture)),
  };
}

function viewOf(box: Box, lanes: ReadonlyMap<Side, readonly unknown[]>, { width, height }: Picture): View {
  const room = (side: Side) => MARGIN + LANE * (lanes.get(side)?.length ?? 0);
  const [left, right, top, bottom] = [room("left"), room("right"), room("top"), room("bottom") + FOOT];
  const scale = Math.max(
    1e-6,
    Math.min((width - left - right) / (2 * box.right), (height - top - bottom) / (box.high - box.low)),
  );
  return {
    scale,
    axisX: left + (width - left - right) / 2,
    zeroY: top + (height - top - bottom) / 2 + (scale * (box.high + box.low)) / 2,
  };
}

/** Dimensions of each side by lane, inner first: short ones inside, those told by a leader outside of all. */
function lanesOf(dimensions: readonly Dimension[], view: View, picture: Picture): Map<Side, Dimension[][]> {
  const lanes = new Map<Side, Dimension[][]>();
  for (const side of sides) {
    const own = dimensions.filter((d) => d.side === side);
    const plain = own.filter((d) => d.segment === undefined).sort((a, b) => spanOf(a) - spanOf(b));
    const inner = packed(plain, view, picture);
    const outer = packed(
      own.filter((d) => d.segment !== undefined),
      view,
      picture,
    );
    lanes.set(side, [...inner, ...outer]);
  }
  return lanes;
}

const spanOf = (d: Dimension): number => Math.abs(d.to - d.from);

/** Each dimension in the first lane where neither its line nor its words meet another's, never inside a shorter one it spans. */
function packed(dimensions: readonly Dimension[], view: View, picture: Picture): Dimension[][] {
  const lanes: Dimension[][] = [];
  for (const dimension of dimensions) {
    const meets = (other: Dimension) =>
      intervalsMeet(interval(dimension, view, picture), interval(other, view, picture));
    const last = lanes.findLastIndex((lane) => lane.some(meets));
    const lane = lanes[last + 1];
    if (lane === undefined) lanes.push([dimension]);
    else lane.push(dimension);
  }
  return lanes;
}

/** What a dimension takes of its lane, px: its line or its words, whichever is longer. */
function interval(d: Dimension, view: View, { fontPx }: Picture): readonly [number, number] {
  const [a, b] = level(d.side) ? [xOf(view, d.from), xOf(view, d.to)] : [yOf(view, d.from), yOf(view, d.to)];
  const middle = (a + b) / 2;
  const half = Math.max(Math.abs(b - a), wordsWidth(d.words, fontPx)) / 2;
  return [middle - half, middle + half];
}

const intervalsMeet = (a: readonly [number, number], b: readonly [number, number]): boolean =>
  a[0] < b[1] - 0.5 && b[0] < a[1] - 0.5;

function laidOut(
  side: Side,
  lanes: readonly Dimension[][],
  box: Box,
  view: View,
  { width, height, fontPx }: Picture,
): Laid[] {
  const edge = {
    top: yOf(view, box.high),
    bottom: yOf(view, box.low),
    left: xOf(view, -box.right),
    right: xOf(view, box.right),
  }[side];
  const outward = side === "top" || side === "left" ? -1 : 1;
  return lanes.flatMap((lane, i) =>
    lane.map((dimension): Laid => {
      const across = (to: number) => edge + outward * (MARGIN / 2 + LANE * i + to);
      const place = level(side) ? xOf : yOf;
      const start = level(side) ? yOf : xOf;
      const [from, to] = [place(view, dimension.from), place(view, dimension.to)];
      const half = wordsWidth(dimension.words, fontPx) / 2;
      const end = level(side) ? width : height;
      const middle = Math.max(half + 2, Math.min(end - half - 2, (from + to) / 2));
      const words = across(TO_WORDS);
      return {
        dimension,
        from,
        to,
        line: across(TO_LINE),
        fromAt: start(view, dimension.fromAt),
        toAt: start(view, dimension.toAt),
        x: level(side) ? middle : words,
        y: level(side) ? words : middle,
      };
    }),
  );
}

/** A length in mm for the scale bar: 1, 2 or 5 times a power of ten, at most a fifth of the picture. */
export function scaleBarMm(view: View, width: number): number {
  const most = Math.min(width / 5, 160) / view.scale;
  const power = 10 ** Math.floor(Math.log10(most));
  return [5, 2, 1].map((n) => n * power).find((n) => n <= most) ?? power;
}
