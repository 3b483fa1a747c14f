/** How the parts' heat is spread over the height: power per height in equal bins, whatever the skin's thickness. */
import type { HeatMap } from "../../meshes/heatmap.ts";
import { ringVolume } from "./heat-scale.ts";

/** Lowest and highest corner of a cell, m. */
function span(corners: Float64Array, cell: number): [number, number] {
  const z = [1, 3, 5, 7].map((k) => corners[8 * cell + k]!);
  return [Math.min(...z), Math.max(...z)];
}

/**
 * Power of all parts per height, W/m, in `bins` equal bins between `zMin` and `zMax` (m), which hold all parts.
 * A cell's power is spread evenly over its own height; the sum of bins times their height is the parts' power.
 */
export function powerPerHeight(heat: HeatMap, zMin: number, zMax: number, bins: number): Float64Array {
  const profile = new Float64Array(bins);
  const height = (zMax - zMin) / bins;
  const parts = new Set(heat.outlines.flatMap(({ role }, k) => (role === "part" ? [k] : [])));
  heat.density.forEach((density, cell) => {
    if (density <= 0 || !parts.has(heat.outline[cell]!)) return;
    const power = 2 * Math.PI * ringVolume(heat.corners, cell) * density;
    const [low, high] = span(heat.corners, cell);
    const first = Math.max(0, Math.floor((low - zMin) / height));
    const last = Math.min(bins - 1, Math.floor((high - zMin) / height));
    for (let bin = first; bin <= last; bin++) {
      const from = Math.max(low, zMin + bin * height);
      const to = Math.min(high, zMin + (bin + 1) * height);
      const share = high > low ? Math.max(0, to - from) / (high - low) : 1;
      profile[bin]! += (power * share) / height;
    }
  });
  return profile;
}
