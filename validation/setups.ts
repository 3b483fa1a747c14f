/**
 * The bench for checks a design document cannot say: meshes of given shapes in metres, materials, and figures read on
 * two grids, the finer one's with half their distance as bar (errors of the nine-node cells fall about tenfold between them).
 */
import { makeMesh } from "../meshes/grid/mesh.ts";
import type { Domain, RegionTraits, Shape } from "../meshes/grid/shape.ts";
import {
  cutGrid,
  MU0,
  type PatchMesh,
  type Prepared,
  prepare,
  type RegionMaterial,
  solvePrescribed,
} from "../solver/index.ts";
import type { Constants, Figure } from "./check.ts";

/** √(2/(ωμσ)), m. */
export function skinDepth(conductivity: number, omega: number, mur = 1): number {
  return Math.sqrt(2 / (omega * MU0 * mur * conductivity));
}

/** Air as the (possibly spoiled) constants have it. */
export function air(constants: Constants): RegionMaterial {
  return { conductivity: 0, reluctivity: { re: 1 / constants.permeability, im: 0 }, turn: -1 };
}

/** A conductor; `turn` −1 for a part. */
export function metal(constants: Constants, conductivity: number, mur = 1, turn = -1): RegionMaterial {
  return {
    conductivity: conductivity * constants.conductivity,
    reluctivity: { re: 1 / (mur * constants.permeability), im: 0 },
    turn,
  };
}

/** A region that neither conducts nor magnetises: air, a watching coil. */
export const PASSIVE: RegionTraits = { skinDepth: Infinity, wall: 0, active: false, magnetic: false };

/** The same with small cells at its corners: a winding of prescribed current whose corners the field bends round. */
export const WINDING: RegionTraits = { ...PASSIVE, active: true };

/** A conducting region of this skin depth (m), given in units of `unit`. */
export function conducting(depth: number, unit: number, mur = 1): RegionTraits {
  return { skinDepth: depth / unit, wall: 0, active: true, magnetic: mur > 1 };
}

/** Patches of shapes given in units of `unit` metres; the domain too. */
export function meshOf(
  shapes: readonly Shape[],
  traits: readonly RegionTraits[],
  domain: Domain,
  unit: number,
): PatchMesh {
  const mesh = makeMesh({ shapes, traits, domain, mirrorRegion: Int32Array.from(traits, (_, i) => i) });
  return {
    ...mesh,
    r: mesh.r.map((x) => x * unit),
    z: mesh.z.map((x) => x * unit),
    edgeArc: mesh.edgeArc.map((x) => x * unit),
    outer:
      mesh.outer === null ? null : { centreZ: mesh.outer.centreZ * unit, radius: mesh.outer.radius * unit },
  };
}

/** A rectangle, counter-clockwise. */
export function box(r1: number, r2: number, z1: number, z2: number, region: number): Shape {
  const points = [
    [r1, z1],
    [r2, z1],
    [r2, z2],
    [r1, z2],
  ] as const;
  return { kind: "polygon", points, region, around: 0 };
}

/** A disc, or a half disc about a point of the axis. */
export function disc(r: number, z: number, radius: number, region: number, around = 0): Shape {
  return { kind: "disc", centre: [r, z], radius, region, around };
}

/**
 * Figures on the grids of two levels: the finer one's, its bar half the distance of the two.
 * `measure` gets each grid prepared and returns the figures in one order.
 */
export function onTwoGrids(
  mesh: PatchMesh,
  turnOfRegion: readonly number[],
  levels: readonly [number, number],
  measure: (prepared: Prepared) => readonly number[],
): Figure[] {
  const [coarse, fine] = levels.map((n) => measure(prepare(cutGrid(mesh, n), turnOfRegion)));
  return fine!.map((value, i) => ({ value, bar: Math.abs(value - coarse![i]!) / 2 }));
}

/** ω at which a conductivity has this skin depth (m) at µr. */
export function omegaFor(depth: number, conductivity: number, mur = 1): number {
  return 2 / (depth * depth * MU0 * mur * conductivity);
}

/**
 * Figures at h, h/2 and h/4 taken to h = 0 by the quadratic through them: weights 1/3, −2, 8/3.
 * Bars add with the weights' sizes.
 */
export function limitOfHalves(figures: readonly (readonly Figure[])[]): Figure[] {
  const weights = [1 / 3, -2, 8 / 3];
  return figures[0]!.map((_, i) => {
    const column = figures.map((row) => row[i]!);
    return {
      value: column.reduce((sum, f, k) => sum + weights[k]! * f.value, 0),
      bar: column.some((f) => f.bar === null)
        ? null
        : column.reduce((sum, f, k) => sum + Math.abs(weights[k]!) * (f.bar ?? 0), 0),
    };
  });
}

/** r lines from the surface a inward to b, first step half a skin depth, growing by half; ascending. */
export function gradedInward(a: number, b: number, depth: number): number[] {
  const lines = [a];
  let step = Math.min(depth / 2, (a - b) / 5);
  let r = a;
  while (r - b > 1.6 * step) {
    r -= step;
    lines.push(r);
    step *= 1.5;
  }
  return [b, ...lines.reverse()];
}

/**
 * ΔR (Ω) and ΔL (H) a conductor (region 2) adds to a coil of N turns (region 1, uniform density): the difference of two
 * solutions on one grid, with the conductor and with air in its place.
 */
export function reflectedImpedance(
  mesh: PatchMesh,
  turns: number,
  omega: number,
  conductivity: number,
  mur: number,
  constants: Constants,
): [Figure, Figure] {
  const space = air(constants);
  const coil = [{ region: 1, density: { re: 1, im: 0 } }];
  const [dR, dL] = onTwoGrids(mesh, [-1, -1, -1], [1, 2], (prepared) => {
    const [loaded, empty] = [metal(constants, conductivity, mur), space].map((third) => {
      const [link] = solvePrescribed(prepared, { materials: [space, space, third], omega }, coil).linkages;
      const ampere = link!.current.re / turns;
      return { re: (turns * link!.linkage.re) / ampere, im: (turns * link!.linkage.im) / ampere };
    });
    return [-omega * (loaded!.im - empty!.im), loaded!.re - empty!.re];
  });
  return [dR!, dL!];
}
