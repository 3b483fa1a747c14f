/** How sharp a wedge of air outlines leave where they touch: one too sharp can be filled by no cell, and nobody machines it. */
import { pointToSegment, type Xy } from "./planar.ts";

/** Sine of the sharpest corner and wedge taken, 0.5°. */
export const SHARPEST = Math.sin(Math.PI / 360);

/** Sine of the angle between two directions less than 90° apart, else 1. */
export function sineBetween(u: Xy, v: Xy): number {
  if (u[0] * v[0] + u[1] * v[1] <= 0) return 1;
  return Math.abs(u[0] * v[1] - u[1] * v[0]) / (Math.hypot(...u) * Math.hypot(...v));
}

/**
 * Sine of the sharpest angle between an edge of a and one of b at the places where a corner of the one stands on the other; 1 where there is
 * none. Edges that run along each other within `tolerance` (the unit of the points) leave no wedge.
 */
export function sharpestWedge(a: readonly Xy[], b: readonly Xy[], tolerance: number): number {
  return Math.min(wedgeAtCorners(a, b, tolerance), wedgeAtCorners(b, a, tolerance));
}

function wedgeAtCorners(a: readonly Xy[], b: readonly Xy[], tolerance: number): number {
  let sharpest = 1;
  a.forEach((corner, i) => {
    const own = [a.at(i - 1)!, a[(i + 1) % a.length]!].map((p) => away(corner, p));
    b.forEach((from, j) => {
      const to = b[(j + 1) % b.length]!;
      if (pointToSegment(corner, from, to) > tolerance) return;
      for (const u of own) {
        for (const v of [away(corner, from), away(corner, to)]) {
          const reach = Math.min(Math.hypot(...u), Math.hypot(...v));
          const sine = reach <= tolerance ? 0 : sineBetween(u, v);
          if (sine * reach > tolerance) sharpest = Math.min(sharpest, sine);
        }
      }
    });
  });
  return sharpest;
}

const away = (from: Xy, to: Xy): Xy => [to[0] - from[0], to[1] - from[1]];
