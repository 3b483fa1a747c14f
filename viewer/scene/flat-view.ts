/** The flat map's view: which piece of the section stands where on the screen. Screen px count from the plot's top left corner. */
import type { Bounds } from "../heat.ts";
import type { Window } from "./raster.ts";

export interface FlatView {
  /** Section at the plot's middle, m; r < 0 is the mirrored half. */
  readonly r: number;
  readonly z: number;
  /** m a px. */
  readonly step: number;
}

export interface Size {
  readonly width: number;
  readonly height: number;
}

/** Room round the whole, as a share of its size. */
const margin = 0.05;
/** How far one can come closer, and go away, from the view of the whole. */
const closest = 4000;
const furthest = 2;

/** Both halves of everything, in the middle. */
export function wholeView({ rMax, zMin, zMax }: Bounds, { width, height }: Size): FlatView {
  const by = 1 + 2 * margin;
  const step = Math.max((2 * rMax * by) / Math.max(width, 1), ((zMax - zMin) * by) / Math.max(height, 1));
  return { r: 0, z: (zMin + zMax) / 2, step };
}

/** Where a screen point lies on the section, m. */
export function sectionAt(view: FlatView, { width, height }: Size, x: number, y: number): [number, number] {
  return [view.r + (x - width / 2) * view.step, view.z - (y - height / 2) * view.step];
}

/** Where a point of the section stands on the screen. */
export function screenAt(view: FlatView, { width, height }: Size, r: number, z: number): [number, number] {
  return [(r - view.r) / view.step + width / 2, (view.z - z) / view.step + height / 2];
}

/** `factor` times as large, the section under (x, y) staying there, within what `whole` allows. */
export function zoomed(
  view: FlatView,
  size: Size,
  factor: number,
  at: readonly [number, number],
  whole: FlatView,
): FlatView {
  const step = Math.min(whole.step * furthest, Math.max(whole.step / closest, view.step / factor));
  const [r, z] = sectionAt(view, size, ...at);
  const [x, y] = at;
  return { r: r - (x - size.width / 2) * step, z: z + (y - size.height / 2) * step, step };
}

/** Moved by so many px, the middle staying within the bounds so that the picture is never lost. */
export function panned(view: FlatView, dx: number, dy: number, { rMax, zMin, zMax }: Bounds): FlatView {
  const hold = (x: number, low: number, high: number): number => Math.min(high, Math.max(low, x));
  return {
    r: hold(view.r - dx * view.step, -rMax, rMax),
    z: hold(view.z + dy * view.step, zMin, zMax),
    step: view.step,
  };
}

/** The pixels of a view on a screen of `ratio` device pixels a px. */
export function windowOf(view: FlatView, { width, height }: Size, ratio: number): Window {
  const [left, top] = sectionAt(view, { width, height }, 0, 0);
  return {
    left,
    top,
    step: view.step / ratio,
    width: Math.max(1, Math.round(width * ratio)),
    height: Math.max(1, Math.round(height * ratio)),
  };
}
