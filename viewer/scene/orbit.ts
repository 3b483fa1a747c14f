/** The eye that goes round the solid: where it stands, and the ray under a pixel. Lengths in m, y is the axis upwards. */
import { mat4, vec3 } from "gl-matrix";
import type { Bounds } from "../heat.ts";

/** The eye, seen from the solid's middle. */
export interface Orbit {
  /** Angle about the axis, and above the horizontal, rad. */
  readonly azimuth: number;
  readonly elevation: number;
  /** 1 shows the whole; 2 twice as large. */
  readonly zoom: number;
  /** Where the picture's middle lies, in shares of its height to the right and upwards. */
  readonly shift: readonly [number, number];
}

/** Looks into the opened quarter, whose middle lies at azimuth π/4, a little from above. */
export const atFirst: Orbit = { azimuth: Math.PI / 4, elevation: 0.42, zoom: 1, shift: [0, 0] };

const limits = { elevation: 1.55, closest: 400, furthest: 0.4 };
/** Vertical angle of view, rad: narrow, so that lengths stay comparable. */
const fieldOfView = 0.42;

const hold = (x: number, low: number, high: number): number => Math.min(high, Math.max(low, x));

export function turned(orbit: Orbit, azimuth: number, elevation: number): Orbit {
  return {
    ...orbit,
    azimuth: orbit.azimuth + azimuth,
    elevation: hold(orbit.elevation + elevation, -limits.elevation, limits.elevation),
  };
}

/** `factor` times as large; what lies at `at` (shares of the height from the middle, upwards) stays there. */
export function closer(orbit: Orbit, factor: number, at: readonly [number, number] = [0, 0]): Orbit {
  const zoom = hold(orbit.zoom * factor, limits.furthest, limits.closest);
  const by = zoom / orbit.zoom;
  const move = (k: 0 | 1): number => hold(at[k] + (orbit.shift[k] - at[k]) * by, -zoom, zoom);
  return { ...orbit, zoom, shift: [move(0), move(1)] };
}

/** Eye and matrices of one picture. */
export interface Camera {
  readonly eye: vec3;
  /** World to camera, and camera to the clip cube (WebGL's, z −1 … 1). */
  readonly view: mat4;
  readonly projection: mat4;
  /** m a px of a picture of `height` px at the solid's middle, times that height. */
  readonly span: number;
}

/** The least ball about the middle of the bounds that holds the solid. */
export function ballOf({ rMax, zMin, zMax }: Bounds): { middle: number; radius: number } {
  return { middle: (zMin + zMax) / 2, radius: Math.hypot(rMax, (zMax - zMin) / 2) };
}

/** The camera for a picture of the aspect width / height. */
export function cameraOf(orbit: Orbit, bounds: Bounds, aspect: number): Camera {
  const { eye, view, projection, distance } = unzoomed(orbit, bounds, aspect);
  const { shift } = orbit;
  const zoom = orbit.zoom * fitting(bounds, aspect);
  // Zooming enlarges the picture about its middle rather than walking into the solid, and the shift moves it.
  const enlarge = mat4.create();
  mat4.fromTranslation(enlarge, [(2 * shift[0]) / aspect, 2 * shift[1], 0]);
  mat4.scale(enlarge, enlarge, [zoom, zoom, 1]);
  mat4.multiply(projection, enlarge, projection);
  return { eye, view, projection, span: (2 * distance * Math.tan(fieldOfView / 2)) / zoom };
}

/** The camera at a distance from which the ball round the solid fits the picture's narrower side. */
function unzoomed({ azimuth, elevation }: Orbit, bounds: Bounds, aspect: number) {
  const { middle, radius } = ballOf(bounds);
  const distance = radius / Math.sin(Math.atan(Math.tan(fieldOfView / 2) * Math.min(1, aspect)));
  const level = Math.cos(elevation) * distance;
  const eye = vec3.fromValues(
    level * Math.cos(azimuth),
    middle + distance * Math.sin(elevation),
    level * Math.sin(azimuth),
  );
  const view = mat4.lookAt(mat4.create(), eye, [0, middle, 0], [0, 1, 0]);
  const [near, far] = [distance - 1.01 * radius, distance + 1.01 * radius];
  const projection = mat4.perspective(mat4.create(), fieldOfView, aspect, near, far);
  return { eye, view, projection, distance };
}

/** Share of the picture that the solid fills at first. */
const filled = 0.94;

/** How many times as large as its ball would allow the solid fits, looked at as at first. */
function fitting(bounds: Bounds, aspect: number): number {
  const { view, projection } = unzoomed(atFirst, bounds, aspect);
  const { rMax, zMin, zMax } = bounds;
  let most = 0;
  for (let k = 0; k < 32; k++) {
    const angle = (k * Math.PI) / 16;
    for (const z of [zMin, zMax]) {
      const [x, y] = placeOf({ view, projection }, [rMax * Math.cos(angle), z, rMax * Math.sin(angle)]);
      most = Math.max(most, Math.abs(x), Math.abs(y));
    }
  }
  return filled / most;
}

/** The ray from the eye through a place of the picture, x and y from −1 to 1, upwards. */
export function rayAt({ view, projection, eye }: Camera, x: number, y: number): { from: vec3; along: vec3 } {
  const back = mat4.invert(mat4.create(), mat4.multiply(mat4.create(), projection, view))!;
  const far = vec3.transformMat4(vec3.create(), [x, y, 1], back);
  return { from: eye, along: vec3.normalize(vec3.create(), vec3.subtract(vec3.create(), far, eye)) };
}

/** Where a point of the solid stands in the picture, x and y from −1 to 1. */
export function placeOf(
  { view, projection }: Pick<Camera, "view" | "projection">,
  point: vec3 | [number, number, number],
): [number, number] {
  const clip = vec3.transformMat4(vec3.create(), point, mat4.multiply(mat4.create(), projection, view));
  return [clip[0], clip[1]];
}
