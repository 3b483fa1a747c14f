/**
 * What every grid must satisfy, whatever the design: no cell turned over, edges shared by two patches or on the domain's
 * boundary, areas and volumes those of the exact shapes, thin enough cells under every conducting surface.
 * Run on every fixture by the tests, and never in a solve.
 */
import { cutGrid, type Grid, type PatchMesh } from "../solver/index.ts";
import { build, skinDepth } from "./build.ts";
import type { Piece, Scene, Section } from "./scene.ts";

export interface Inspection {
  /** Least cross product at a corner of any quarter cell over the product of its two sides: > 0 where nothing is turned over. */
  readonly leastSine: number;
  /** Edges that belong to more than two patches, or to one without being on the boundary. */
  readonly looseEdges: number;
  /** Largest relative difference of a region's area and of its volume of revolution from the exact shape. */
  readonly areaError: number;
  readonly volumeError: number;
  /** Thickest cell under a conducting surface, in skin depths. */
  readonly surfaceCell: number;
  readonly patches: number;
}

/** Inspects the grid of level n of a scene. */
export function inspect(scene: Scene, n: number): Inspection {
  const { mesh } = build(scene);
  const grid = cutGrid(mesh, n);
  const exact = exactRegions(scene);
  const measured = measureRegions(grid, exact.length);
  let areaError = 0;
  let volumeError = 0;
  exact.forEach((e, region) => {
    if (region === 0) return;
    areaError = Math.max(areaError, Math.abs((measured[region]?.area ?? 0) / e.area - 1));
    volumeError = Math.max(volumeError, Math.abs((measured[region]?.volume ?? 0) / e.volume - 1));
  });
  return {
    leastSine: leastSine(grid),
    looseEdges: looseEdges(mesh),
    areaError,
    volumeError,
    surfaceCell: surfaceCell(scene, mesh) / n,
    patches: mesh.region.length,
  };
}

function leastSine(grid: Grid): number {
  let least = 1;
  for (let c = 0; c < grid.cellRegion.length; c++) {
    for (let k = 0; k < 4; k++) {
      const at = c * 9 + (k % 2) + 3 * (k >> 1);
      const quad = [at, at + 1, at + 4, at + 3].map((i) => grid.cellNodes[i] ?? 0);
      for (let i = 0; i < 4; i++) {
        const [p, q, o] = [quad[i] ?? 0, quad[(i + 1) % 4] ?? 0, quad[(i + 3) % 4] ?? 0];
        const u = difference(grid, q, p);
        const v = difference(grid, o, p);
        least = Math.min(least, (u[0] * v[1] - u[1] * v[0]) / (Math.hypot(...u) * Math.hypot(...v)));
      }
    }
  }
  return least;
}

function difference(grid: Grid, a: number, b: number): [number, number] {
  return [(grid.r[a] ?? 0) - (grid.r[b] ?? 0), (grid.z[a] ?? 0) - (grid.z[b] ?? 0)];
}

function looseEdges(mesh: PatchMesh): number {
  const uses = new Int32Array(mesh.edgeEnds.length / 2);
  for (const e of mesh.patchEdges) uses[e] = (uses[e] ?? 0) + 1;
  const outer = new Set(mesh.outerEdges);
  let loose = 0;
  uses.forEach((count, e) => {
    const onAxis = [0, 1].every((k) => mesh.r[mesh.edgeEnds[2 * e + k] ?? 0] === 0);
    const boundary = onAxis || outer.has(e);
    if (count !== (boundary ? 1 : 2)) loose++;
  });
  return loose;
}

interface Measure {
  readonly area: number;
  readonly volume: number;
}

/** Area (m²) and volume of revolution (m³) of every region's cells, by 4 × 4 Gauss points on the (r, z) and the (s, z) map. */
function measureRegions(grid: Grid, regions: number): Measure[] {
  const area = new Float64Array(regions);
  const volume = new Float64Array(regions);
  for (let c = 0; c < grid.cellRegion.length; c++) {
    const m = measureCell(grid, c);
    const region = grid.cellRegion[c] ?? 0;
    area[region] = (area[region] ?? 0) + m.area;
    volume[region] = (volume[region] ?? 0) + m.volume;
  }
  return Array.from({ length: regions }, (_, k) => ({ area: area[k] ?? 0, volume: volume[k] ?? 0 }));
}

const GAUSS = [-0.8611363115940526, -0.3399810435848563, 0.3399810435848563, 0.8611363115940526] as const;
const WEIGHT = [0.3478548451374538, 0.6521451548625461, 0.6521451548625461, 0.3478548451374538] as const;

function measureCell(grid: Grid, c: number): Measure {
  let area = 0;
  let volume = 0;
  GAUSS.forEach((xi, i) => {
    GAUSS.forEach((eta, j) => {
      const m = mapAt(grid, c, xi, eta);
      const w = (WEIGHT[i] ?? 0) * (WEIGHT[j] ?? 0) * m.jacobian;
      volume += Math.PI * w;
      area += (WEIGHT[i] ?? 0) * (WEIGHT[j] ?? 0) * m.plane;
    });
  });
  return { area, volume };
}

const quadratic = (x: number): [number, number, number] => [(x * (x - 1)) / 2, 1 - x * x, (x * (x + 1)) / 2];
const slope = (x: number): [number, number, number] => [x - 0.5, -2 * x, x + 0.5];

function mapAt(grid: Grid, c: number, xi: number, eta: number): { plane: number; jacobian: number } {
  const [n, m, dn, dm] = [quadratic(xi), quadratic(eta), slope(xi), slope(eta)];
  let [sx, sy, rx, ry, zx, zy] = [0, 0, 0, 0, 0, 0];
  for (let b = 0; b < 3; b++) {
    for (let a = 0; a < 3; a++) {
      const node = grid.cellNodes[c * 9 + a + 3 * b] ?? 0;
      const [r, zz] = [grid.r[node] ?? 0, grid.z[node] ?? 0];
      const rr = r * r;
      const [na, mb, dna, dmb] = [n[a] ?? 0, m[b] ?? 0, dn[a] ?? 0, dm[b] ?? 0];
      rx += dna * mb * r;
      ry += na * dmb * r;
      sx += dna * mb * rr;
      sy += na * dmb * rr;
      zx += dna * mb * zz;
      zy += na * dmb * zz;
    }
  }
  return { plane: rx * zy - ry * zx, jacobian: sx * zy - sy * zx };
}

/** Exact area and volume of every region; entry 0 (air) is empty. */
function exactRegions(scene: Scene): Measure[] {
  const turns = scene.turns.map((t) => {
    const area = sectionArea(scene.section);
    return { area, volume: 2 * Math.PI * t.r * area };
  });
  const bodies = scene.bodies.map((b) => {
    const pieces = b.pieces.map(pieceMeasure);
    return {
      area: pieces.reduce((sum, p) => sum + p.area, 0),
      volume: pieces.reduce((sum, p) => sum + p.volume, 0),
    };
  });
  return [{ area: 0, volume: 0 }, ...turns, ...bodies];
}

function sectionArea(section: Section): number {
  const { wall } = section;
  if (section.kind === "round") {
    const inner = wall > 0 ? section.radius - wall : 0;
    return Math.PI * (section.radius ** 2 - inner ** 2);
  }
  const inner = wall > 0 ? (section.width - 2 * wall) * (section.height - 2 * wall) : 0;
  return section.width * section.height - inner;
}

/** Shoelace area, and 2π times the first moment about the axis. */
function pieceMeasure(piece: Piece): Measure {
  if (piece.kind === "sphere") {
    return { area: (Math.PI * piece.radius ** 2) / 2, volume: (4 / 3) * Math.PI * piece.radius ** 3 };
  }
  let area = 0;
  let moment = 0;
  piece.points.forEach(([r, z], i) => {
    const [r2, z2] = piece.points[(i + 1) % piece.points.length] ?? [0, 0];
    const cross = r * z2 - r2 * z;
    area += cross / 2;
    moment += (cross * (r + r2)) / 6;
  });
  return { area, volume: 2 * Math.PI * moment };
}

/** Thickest patch under a conducting surface, in skin depths. */
function surfaceCell(scene: Scene, mesh: PatchMesh): number {
  const copper = skinDepth(scene.conductor, scene.frequency);
  const skin = [
    Infinity,
    ...scene.turns.map(() => copper),
    ...scene.bodies.map((b) => skinDepth(b.material, scene.frequency)),
  ];
  const sides = new Map<number, number[]>();
  mesh.patchEdges.forEach((e, k) => {
    sides.set(e, [...(sides.get(e) ?? []), k >> 2]);
  });
  let worst = 0;
  for (const [e, patches] of sides) {
    for (const p of patches) {
      const region = mesh.region[p] ?? 0;
      const delta = skin[region] ?? Infinity;
      const other = patches.find((q) => q !== p);
      if (delta === Infinity || other === undefined || mesh.region[other] === region) continue;
      if (
        scene.section.wall > 0 &&
        region <= scene.turns.length &&
        mesh.region[other] === 0 &&
        isBore(scene, mesh, e, region)
      )
        continue;
      worst = Math.max(worst, patchArea(mesh, p) / edgeLength(mesh, e) / delta);
    }
  }
  return worst;
}

/** A tube's inside carries hardly any current: its cells may be thick. */
function isBore(scene: Scene, mesh: PatchMesh, e: number, region: number): boolean {
  const turn = scene.turns[region - 1];
  if (turn === undefined) return false;
  const at = mesh.edgeEnds[2 * e] ?? 0;
  const [dr, dz] = [Math.abs((mesh.r[at] ?? 0) - turn.r), Math.abs((mesh.z[at] ?? 0) - turn.z)];
  const { section } = scene;
  if (section.kind === "round") return Math.hypot(dr, dz) < section.radius - section.wall / 2;
  return dr < section.width / 2 - section.wall / 2 && dz < section.height / 2 - section.wall / 2;
}

function patchArea(mesh: PatchMesh, p: number): number {
  let area = 0;
  for (let k = 0; k < 4; k++) {
    const a = mesh.corners[4 * p + k] ?? 0;
    const b = mesh.corners[4 * p + ((k + 1) % 4)] ?? 0;
    area += ((mesh.r[a] ?? 0) * (mesh.z[b] ?? 0) - (mesh.r[b] ?? 0) * (mesh.z[a] ?? 0)) / 2;
  }
  return area;
}

function edgeLength(mesh: PatchMesh, e: number): number {
  const a = mesh.edgeEnds[2 * e] ?? 0;
  const b = mesh.edgeEnds[2 * e + 1] ?? 0;
  return Math.hypot((mesh.r[a] ?? 0) - (mesh.r[b] ?? 0), (mesh.z[a] ?? 0) - (mesh.z[b] ?? 0));
}
