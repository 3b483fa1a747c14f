/** Which piece of the cut faces a picture shows, so that only that is drawn finely. */
import { mat4, vec4 } from "gl-matrix";
import type { Bounds } from "../heat.ts";
import type { Camera } from "./orbit.ts";
import { opening } from "./pick.ts";
import type { Window } from "./raster.ts";

/** A corner of a face: where it stands on the section, and in the clip cube. */
interface Corner {
  readonly r: number;
  readonly z: number;
  readonly clip: vec4;
}

/** Insides of the picture's four sides: positive within. */
const sides: readonly ((clip: vec4) => number)[] = [
  (c) => c[3] - c[0],
  (c) => c[3] + c[0],
  (c) => c[3] - c[1],
  (c) => c[3] + c[1],
];

/** Cuts a polygon at one side (Sutherland and Hodgman, Comm. ACM 17(1), 1974, 32-42). */
function cut(polygon: readonly Corner[], side: (clip: vec4) => number): Corner[] {
  return polygon.flatMap((from, k) => {
    const to = polygon[(k + 1) % polygon.length]!;
    const [a, b] = [side(from.clip), side(to.clip)];
    const stays = a >= 0 ? [from] : [];
    return a >= 0 === b >= 0 ? stays : [...stays, between(from, to, a / (a - b))];
  });
}

const between = (p: Corner, q: Corner, t: number): Corner => ({
  r: p.r + t * (q.r - p.r),
  z: p.z + t * (q.z - p.z),
  clip: vec4.lerp(vec4.create(), p.clip, q.clip, t),
});

/** Pixels a drawn window has at most each way. */
const most = 2048;

/** The window on the section that holds all that is seen of both faces, about a pixel of the picture fine; null when nothing is. */
export function visibleWindow(
  camera: Camera,
  { rMax, zMin, zMax }: Bounds,
  pixels: { width: number; height: number },
): Window | null {
  const whole = mat4.multiply(mat4.create(), camera.projection, camera.view);
  const seen = [opening.from, opening.to].flatMap((angle) => {
    const corner = (r: number, z: number): Corner => {
      const clip = vec4.fromValues(r * Math.cos(angle), z, r * Math.sin(angle), 1);
      return { r, z, clip: vec4.transformMat4(clip, clip, whole) };
    };
    const face = [corner(0, zMin), corner(rMax, zMin), corner(rMax, zMax), corner(0, zMax)];
    return sides.reduce<readonly Corner[]>(cut, face);
  });
  if (seen.length === 0) return null;
  const [left, right] = [Math.min(...seen.map((c) => c.r)), Math.max(...seen.map((c) => c.r))];
  const [bottom, top] = [Math.min(...seen.map((c) => c.z)), Math.max(...seen.map((c) => c.z))];
  const [wide, high] = [right - left, top - bottom];
  const step = Math.max(camera.span / pixels.height, wide / most, high / most);
  return {
    left,
    top,
    step,
    width: Math.max(1, Math.ceil(wide / step)),
    height: Math.max(1, Math.ceil(high / step)),
  };
}
