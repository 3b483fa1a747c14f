/**
 * Closed forms for the few designs of the battery that have them, by path, each with what it leaves out as its doubt.
 *
 * - Thin rings at low frequency (wire below a third of a skin depth): R of each is ρ/(a − √(a² − b²)), as the current goes as 1/r, times the
 *   wire's skin effect.
 * - Sphere of radius a in coaxial rings: order l of the coil's field at the sphere is
 *     G_l = Σ ⟨µ0 I sin α/2 (a/d)^l P_l¹(cos α)⟩/(l(l+1)), d and α the wire's distance and angle from the middle (J. D. Jackson, Classical
 *   Electrodynamics, problem 5.8, from memory; the first order checked against the field of a ring), and inside A_l = (2l+1) G_l/(l + w),
 *     w = (z i_(l−1)(z)/i_l(z) − l)/µr, z = (1+j) a/δ;  P = Σ 4π a l(l+1)/(2l+1) ω|A_l|² Im w/µ0.
 * - Parts of given power: over their surface, which washers stacked without a gap have as one ring.
 */
import type { Scene } from "../../meshes/scene.ts";
import type { Uncertain } from "../../meshes/uncertain.ts";
import { type Complex, MU0 } from "../../solver/index.ts";
import { abs, add, complex, div, scale } from "../analytic/complex.ts";
import { skinDepth, wireImpedanceRatio } from "../analytic/skin.ts";

/** Relative doubts: proximity between and within thin wires leaves some (b/δ)⁴ (b/2a)² or less. */
const RING_DOUBT = 5e-7;
const SPHERE_DOUBT = 5e-6;
/** Orders of the coil's field at a sphere; the highest is below 1e-12 of the first. */
const ORDERS = 40;

type Closed = ReadonlyMap<string, Uncertain>;

const FORMS: Readonly<Record<string, (scene: Scene) => Closed>> = {
  "one-ring-mains": thinRings,
  "two-wires-mains": thinRings,
  "ball-in-rings-wide-skin": sphereInRings,
  "ball-in-rings-thin-skin": sphereInRings,
  "ball-by-power": powerOverSurface,
  "balls-tenth-gap": powerOverSurface,
  "washers-no-gap": powerOverSurface,
};

/** Closed forms a design of this id has; none for most. */
export function closedForms(id: string, scene: Scene): Closed {
  return FORMS[id]?.(scene) ?? new Map();
}

const within = (value: number, doubt: number): Uncertain => ({ value, plusMinus: doubt * value });

function wireOf(scene: Scene): { b: number; rho: number; current: number } {
  const { section, conductor, drive } = scene;
  if (section.kind !== "round" || section.wall > 0 || conductor.resistivity === null)
    throw new RangeError("closed forms are for wires");
  if (drive.kind !== "current") throw new RangeError("closed forms are for a given current");
  return { b: section.radius, rho: conductor.resistivity, current: drive.ampere };
}

function thinRings(scene: Scene): Closed {
  const { b, rho } = wireOf(scene);
  const skin = wireImpedanceRatio(b / skinDepth(rho, scene.frequency, 1)).re;
  const ohm = scene.turns.reduce((sum, t) => sum + (skin * rho) / (t.r - Math.sqrt(t.r ** 2 - b ** 2)), 0);
  return new Map([["empty.resistanceOhm", within(ohm, RING_DOUBT)]]);
}

/** The power the drive fixes over the surface: 4πa² of each sphere, 2π ∮ r dl of an outline off the axis (chord times twice π times its middle radius). */
function powerOverSurface({ drive, bodies }: Scene): Closed {
  if (drive.kind !== "power") throw new RangeError("the power is not given");
  const area = bodies[0]!.pieces.reduce((sum, piece) => {
    if (piece.kind === "sphere") return sum + 4 * Math.PI * piece.radius ** 2;
    const { points } = piece;
    return points.reduce((side, p, i) => {
      const q = points[(i + 1) % points.length]!;
      return side + Math.PI * (p[0] + q[0]) * Math.hypot(q[0] - p[0], q[1] - p[1]);
    }, sum);
  }, 0);
  return new Map([["parts.0.surfaceWPerM2", within(drive.watt / area, 0)]]);
}

/** Mean of f(r, z) over a wire of radius b at (a, z0), weighted 1/r: Gauss points in the radius squared, equal steps in the angle. */
function overSection(a: number, z0: number, b: number, f: (r: number, z: number) => number): number {
  const rings = [0.5 - Math.sqrt(0.15), 0.5, 0.5 + Math.sqrt(0.15)];
  const weights = [5 / 18, 8 / 18, 5 / 18];
  const steps = 12;
  let [sum, total] = [0, 0];
  rings.forEach((q, i) => {
    for (let k = 0; k < steps; k++) {
      const angle = (2 * Math.PI * (k + 0.5)) / steps;
      const r = a + b * Math.sqrt(q) * Math.cos(angle);
      const weight = weights[i]! / r;
      total += weight;
      sum += weight * f(r, z0 + b * Math.sqrt(q) * Math.sin(angle));
    }
  });
  return sum / total;
}

function sphereInRings(scene: Scene): Closed {
  const { b, current } = wireOf(scene);
  const { pieces, material } = scene.bodies[0]!;
  const ball = pieces[0]!;
  if (ball.kind !== "sphere" || material.resistivity === null) throw new RangeError("no conducting sphere");
  const a = ball.radius;
  const mur = material.relativePermeability;
  const depth = skinDepth(material.resistivity, scene.frequency, mur);
  const w = waveRatios(complex(a / depth, a / depth), mur);
  const omega = 2 * Math.PI * scene.frequency;
  let power = 0;
  for (let l = 1; l <= ORDERS; l++) {
    const order = (r: number, z: number): number => {
      const d = Math.hypot(r, z);
      return ((r / d) * (a / d) ** l * legendre1(l, z / d)) / (2 * l * (l + 1));
    };
    const turns = scene.turns.map((t) => overSection(t.r, t.z - ball.centreZ, b, order));
    const applied = MU0 * current * turns.reduce((sum, g) => sum + g, 0);
    const inside = ((2 * l + 1) * applied) / abs(add(complex(l), w[l]!));
    const norm = (4 * Math.PI * a * l * (l + 1)) / (2 * l + 1);
    power += (norm * omega * inside ** 2 * w[l]!.im) / MU0;
  }
  return new Map([["parts.0.powerW", within(power, SPHERE_DOUBT)]]);
}

/** w_l, l = 0 … ORDERS, by i_(l−1)/i_l = (2l+1)/z + i_(l+1)/i_l from far above downwards. */
function waveRatios(z: Complex, mur: number): Complex[] {
  const start = ORDERS + Math.ceil(abs(z)) + 40;
  let ratio = div(complex(2 * start + 3), z);
  const w: Complex[] = [];
  for (let l = start; l >= 0; l--) {
    ratio = add(div(complex(2 * l + 1), z), div(complex(1), ratio));
    const zr = { re: z.re * ratio.re - z.im * ratio.im, im: z.re * ratio.im + z.im * ratio.re };
    if (l <= ORDERS) w[l] = scale(add(zr, complex(-l)), 1 / mur);
  }
  return w;
}

/** P_l¹(x) without the sign (−1), so that P_1¹ = √(1 − x²). */
function legendre1(l: number, x: number): number {
  let [before, now] = [0, Math.sqrt(1 - x * x)];
  for (let k = 1; k < l; k++) [before, now] = [now, ((2 * k + 1) * x * now - (k + 1) * before) / k];
  return now;
}
