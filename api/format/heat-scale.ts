/** Which power densities get which colours: the range, log or linear, and the marks beside the legend. */
import type { Outline } from "../../meshes/heatmap.ts";

/** A colour scale in W/m³. */
export interface HeatScale {
  readonly kind: "linear" | "log";
  /** Density at t = 0 and at t = 1, W/m³. */
  readonly low: number;
  readonly high: number;
}

/** A heat map of any width of numbers. */
interface Cells {
  readonly corners: ArrayLike<number>;
  readonly density: ArrayLike<number>;
  readonly outline: ArrayLike<number>;
  readonly outlines: readonly Outline[];
}

/** Decades that a logarithmic scale spans. */
const decades = 3;

/** Volume of a ring of quadrilateral section over 2π, m³: area times its centroid's radius, by the shoelace formula. */
export function ringVolume(corners: ArrayLike<number>, cell: number): number {
  let sum = 0;
  for (let k = 0; k < 4; k++) {
    const i = 8 * cell + 2 * k;
    const j = 8 * cell + 2 * ((k + 1) % 4);
    const [r0, z0, r1, z1] = [corners[i]!, corners[i + 1]!, corners[j]!, corners[j + 1]!];
    sum += (z1 - z0) * (r0 * r0 + r0 * r1 + r1 * r1);
  }
  return Math.abs(sum) / 6;
}

/**
 * The scale that suits a map: its top is the density not exceeded in 99.9 % of the heated volume, so that a sharp edge does
 * not darken all the rest. Logarithmic when less than a third of the volume lies above a twentieth of the top (a thin hot
 * skin), else linear from 0. Null when nothing is heated.
 */
export function scaleFor({ corners, density, outline, outlines }: Cells): HeatScale | null {
  const coloured = outlines.map(({ role }) => role !== "guide");
  const cells = Uint32Array.from(density, (_, k) => k)
    .filter((k) => density[k]! > 0 && coloured[outline[k]!])
    .sort((a, b) => density[b]! - density[a]!);
  const volumes = Float64Array.from(cells, (k) => ringVolume(corners, k));
  const total = volumes.reduce((sum, volume) => sum + volume, 0);
  if (total === 0) return null;
  let above = 0;
  const at = volumes.findIndex((volume) => {
    above += volume;
    return above >= 1e-3 * total;
  });
  const high = density[cells[at]!]!;
  const warm = volumes.reduce((sum, volume, i) => sum + (density[cells[i]!]! > high / 20 ? volume : 0), 0);
  return warm < total / 3
    ? { kind: "log", low: high / 10 ** decades, high }
    : { kind: "linear", low: 0, high };
}

/** Where a density lies on the scale, held within 0 … 1. */
export function position(scale: HeatScale, density: number): number {
  const t =
    scale.kind === "linear"
      ? density / scale.high
      : 1 + Math.log10(Math.max(density, scale.low) / scale.high) / decades;
  return Math.min(1, Math.max(0, t));
}

/** The round step (1, 2 or 5 times a power of ten) that divides `span` into at most `most` pieces. */
export function roundStep(span: number, most: number): number {
  const rough = span / most;
  const power = 10 ** Math.floor(Math.log10(rough));
  return power * ([1, 2, 5].find((m) => m * power >= rough * (1 - 1e-9)) ?? 10);
}

/** Densities to mark beside the legend, W/m³, in the scale's order. */
export function marks(scale: HeatScale): number[] {
  if (scale.kind === "linear") {
    const step = roundStep(scale.high, 5);
    return Array.from({ length: Math.floor(scale.high / step + 1e-9) + 1 }, (_, k) => k * step);
  }
  const first = Math.floor(Math.log10(scale.low));
  return Array.from({ length: decades + 2 }, (_, k) => 10 ** (first + k))
    .flatMap((decade) => [decade, 2 * decade, 5 * decade])
    .filter((mark) => mark >= scale.low * 0.999 && mark <= scale.high * 1.001);
}
