/** How the parts' heat is spread along the height or the radius: power per length in equal bins, whatever the skin's thickness. */
import type { HeatMap } from "../../meshes/heatmap.ts";
import { ringVolume } from "./heat-scale.ts";

/** Equal bins along one direction between two positions, m, which hold all parts. */
export interface Bins {
  readonly along: "r" | "z";
  readonly from: number;
  readonly to: number;
  readonly count: number;
}

/** Lowest and highest corner of a cell along r or z, m. */
function span(corners: Float64Array, cell: number, along: "r" | "z"): [number, number] {
  const first = 8 * cell + (along === "r" ? 0 : 1);
  const at = [0, 2, 4, 6].map((k) => corners[first + k]!);
  return [Math.min(...at), Math.max(...at)];
}

/**
 * Power of all parts per length, W/m, a number a bin. A cell's power is spread evenly over its own extent; the sum of bins
 * times their width is the parts' power.
 */
export function powerPerLength(heat: HeatMap, { along, from, to, count }: Bins): Float64Array {
  const profile = new Float64Array(count);
  const width = (to - from) / count;
  const parts = new Set(heat.outlines.flatMap(({ role }, k) => (role === "part" ? [k] : [])));
  heat.density.forEach((density, cell) => {
    if (density <= 0 || !parts.has(heat.outline[cell]!)) return;
    const power = 2 * Math.PI * ringVolume(heat.corners, cell) * density;
    const [low, high] = span(heat.corners, cell, along);
    const first = Math.max(0, Math.floor((low - from) / width));
    const last = Math.min(count - 1, Math.floor((high - from) / width));
    for (let bin = first; bin <= last; bin++) {
      const start = Math.max(low, from + bin * width);
      const end = Math.min(high, from + (bin + 1) * width);
      const share = high > low ? Math.max(0, end - start) / (high - low) : 1;
      profile[bin]! += (power * share) / width;
    }
  });
  return profile;
}
