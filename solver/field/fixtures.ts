/** Grids and materials for the tests of this folder. */
import { cutGrid } from "../grid/cut.ts";
import { type ArcOfEdge, makePatchMesh, tensorPatches } from "../grid/patches.ts";
import type { Circuit, PatchMesh, RegionMaterial } from "../types.ts";
import { type Prepared, prepare } from "./prepare.ts";

export const AIR: RegionMaterial = { conductivity: 0, reluctivity: { re: 1, im: 0 }, turn: -1 };

/** A part of resistivity ρ (Ω·m) and relative permeability µ. */
export function part(resistivity: number, mu = 1): RegionMaterial {
  return { conductivity: 1 / resistivity, reluctivity: { re: 1 / mu, im: 0 }, turn: -1 };
}

/** Copper of turn k. */
export function copper(turn: number, resistivity = 1.75e-8): RegionMaterial {
  return { conductivity: 1 / resistivity, reluctivity: { re: 1, im: 0 }, turn };
}

/** Series circuit, or one with the paths given. */
export function circuit(sense: readonly number[], path: readonly number[] = sense.map(() => 0)): Circuit {
  return { turns: sense.length, path: Int32Array.from(path), sense: Int8Array.from(sense) };
}

/**
 * Tensor patches over [0, r_max] × [z_min, z_max] set inside a half disc of radius R about z = 0, with
 * `layers` rings of patches between the rectangle and the circle. The rings are region 0.
 */
export function openMesh(
  rLines: readonly number[],
  zLines: readonly number[],
  regionAt: (r: number, z: number) => number,
  radius: number,
  layers: number,
): PatchMesh {
  const core = tensorPatches(rLines, zLines, regionAt);
  const nr = rLines.length;
  const nz = zLines.length;
  const rim: number[] = [];
  for (let i = 0; i < nr; i++) rim.push(i);
  for (let j = 1; j < nz; j++) rim.push(j * nr + nr - 1);
  for (let i = nr - 2; i >= 0; i--) rim.push((nz - 1) * nr + i);
  const r = Array.from(core.r);
  const z = Array.from(core.z);
  const corners = Array.from(core.corners);
  const region = Array.from(core.region);
  const arcs: ArcOfEdge[] = [];
  let inner = rim;
  for (let k = 1; k <= layers; k++) {
    const blend = k / layers;
    const outer = rim.map((node, i) => {
      const angle = Math.atan2(core.z[node], core.r[node]);
      const onAxis = i === 0 || i === rim.length - 1;
      r.push(onAxis ? 0 : (1 - blend) * core.r[node] + blend * radius * Math.cos(angle));
      z.push((1 - blend) * core.z[node] + blend * radius * Math.sin(angle));
      return r.length - 1;
    });
    for (let i = 0; i + 1 < rim.length; i++) {
      corners.push(inner[i], outer[i], outer[i + 1], inner[i + 1]);
      region.push(0);
      if (k === layers) arcs.push({ a: outer[i], b: outer[i + 1], centreR: 0, centreZ: 0, radius });
    }
    inner = outer;
  }
  return makePatchMesh(
    Float64Array.from(r),
    Float64Array.from(z),
    Int32Array.from(corners),
    Int32Array.from(region),
    arcs,
    { centreZ: 0, radius },
  );
}

/** Level n of a mesh, prepared; turns by region. */
export function prepared(mesh: PatchMesh, n: number, turnOfRegion: readonly number[]): Prepared {
  return prepare(cutGrid(mesh, n), turnOfRegion);
}

/**
 * A small coil of square solid turns (side 2h about r = a, z = z_k) over a solid part of radius b, height 2c: region 0 air,
 * 1 the part, 2 … the turns. Lines follow every surface with two thin cells on the copper's inside.
 */
export function coilMesh(scale = 1, mirrored = false, radius = 0.16): PatchMesh {
  const sign = mirrored ? -1 : 1;
  const turnZ = COIL_Z.map((z) => z * sign);
  const { a, h, b, c } = COIL;
  const rLines = [0, b / 2, 0.85 * b, b, (a - h + b) / 2, a - h, a - h / 2, a, a + h / 2, a + h, 0.05];
  const zSet = new Set<number>([-0.06, -c, c, 0.06, -0.8 * c, 0.8 * c]);
  for (const z of turnZ) for (const f of [-1, -0.5, 0, 0.5, 1]) zSet.add(Number((z + f * h).toFixed(9)));
  const zLines = [...zSet].sort((x, y) => x - y);
  const regionAt = (r: number, z: number): number => {
    if (r < b * scale && Math.abs(z) < c * scale) return 1;
    const k = turnZ.findIndex((t) => Math.abs(z - t * scale) < h * scale);
    return k >= 0 && Math.abs(r - a * scale) < h * scale ? 2 + k : 0;
  };
  const scaled = (lines: readonly number[]): number[] => lines.map((x) => x * scale);
  return openMesh(scaled(rLines), scaled(zLines), regionAt, radius * scale, 3);
}

/** Dimensions of `coilMesh`, m. */
export const COIL = { a: 0.03, h: 0.003, b: 0.015, c: 0.025 } as const;
/** Heights of its turns: unevenly spaced. */
export const COIL_Z = [-0.012, 0, 0.016] as const;
/** Turn by region of `coilMesh`. */
export const COIL_TURNS = [-1, -1, 0, 1, 2] as const;

/** Materials of `coilMesh` with its part. */
export function coilMaterials(resistivity = 2.5e-7, mu = 20): RegionMaterial[] {
  return [AIR, part(resistivity, mu), copper(0), copper(1), copper(2)];
}

/**
 * Half disc of radius R about the origin, cut by half circles of the given radii (ascending, the last is R): region k between
 * the (k − 1)th and the kth, a square core inside the first; 4 × `sectors` patches around.
 */
export function ballMesh(radii: readonly number[], sectors: number): PatchMesh {
  const c = radii[0] / 2;
  const n = sectors;
  const step = (k: number): number => (2 * c * k) / (2 * n) - c;
  const r: number[] = [];
  const z: number[] = [];
  const corners: number[] = [];
  const region: number[] = [];
  for (let j = 0; j <= 2 * n; j++) {
    for (let i = 0; i <= n; i++) {
      r.push((c * i) / n);
      z.push(step(j));
    }
  }
  for (let j = 0; j < 2 * n; j++) {
    for (let i = 0; i < n; i++) {
      const k = j * (n + 1) + i;
      corners.push(k, k + 1, k + n + 2, k + n + 1);
      region.push(0);
    }
  }
  let inner: number[] = [];
  for (let i = 0; i <= n; i++) inner.push(i);
  for (let j = 1; j <= 2 * n; j++) inner.push(j * (n + 1) + n);
  for (let i = n - 1; i >= 0; i--) inner.push(2 * n * (n + 1) + i);
  const arcs: ArcOfEdge[] = [];
  radii.forEach((radius, k) => {
    const outer = inner.map((_node, i) => {
      const angle = (Math.PI * i) / (inner.length - 1) - Math.PI / 2;
      const onAxis = i === 0 || i === inner.length - 1;
      r.push(onAxis ? 0 : radius * Math.cos(angle));
      z.push(onAxis ? (i === 0 ? -radius : radius) : radius * Math.sin(angle));
      return r.length - 1;
    });
    for (let i = 0; i + 1 < inner.length; i++) {
      corners.push(inner[i], outer[i], outer[i + 1], inner[i + 1]);
      region.push(k);
      arcs.push({ a: outer[i], b: outer[i + 1], centreR: 0, centreZ: 0, radius });
    }
    inner = outer;
  });
  const outer = { centreZ: 0, radius: radii[radii.length - 1] };
  return makePatchMesh(
    Float64Array.from(r),
    Float64Array.from(z),
    Int32Array.from(corners),
    Int32Array.from(region),
    arcs,
    outer,
  );
}

/**
 * A patch mesh whose cells meet the axis in every way: quadrilaterals with a side on it, slanted edges and one corner only, inside a
 * rectangle [0, 2] × [−1, 1], natural outside.
 */
export function slantedMesh(): PatchMesh {
  const points = [
    [0, -1],
    [0, -0.1],
    [0, 1],
    [1, -1],
    [0.8, -0.4],
    [1.1, 0.3],
    [0.9, 1],
    [2, -1],
    [2, 0.2],
    [2, 1],
  ];
  const quads = [
    [1, 4, 8, 5],
    [0, 3, 4, 1],
    [1, 5, 6, 2],
    [3, 7, 8, 4],
    [5, 8, 9, 6],
  ];
  return makePatchMesh(
    Float64Array.from(points, (p) => p[0]),
    Float64Array.from(points, (p) => p[1]),
    Int32Array.from(quads.flat()),
    new Int32Array(quads.length),
    [],
    null,
  );
}

/** Least-squares slope of log|error| against log(1/level): the observed order of convergence. */
export function observedOrder(levels: readonly number[], errors: readonly number[]): number {
  const x = levels.map((n) => Math.log(1 / n));
  const y = errors.map((e) => Math.log(Math.abs(e)));
  const mean = (v: readonly number[]): number => v.reduce((a, b) => a + b, 0) / v.length;
  const [mx, my] = [mean(x), mean(y)];
  const top = x.reduce((sum, xi, i) => sum + (xi - mx) * (y[i] - my), 0);
  return top / x.reduce((sum, xi) => sum + (xi - mx) ** 2, 0);
}
