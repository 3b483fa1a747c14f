/**
 * Scene → patches and materials: the one entry to the grid generator. The plane is meshed in units of the scene's own size,
 * about its own middle and in one of its two mirrored orientations chosen by the geometry itself, so that scaled, shifted and
 * mirrored designs get the same grid, and a mirror-symmetric design a mirror-symmetric one.
 */
import { MU0, type PatchMesh, type RegionMaterial } from "../solver/index.ts";
import { type MeshInput, makeMesh } from "./grid/mesh.ts";
import { AIR, type RegionTraits, type Shape } from "./grid/shape.ts";
import { recentMesh } from "./recent.ts";
import type { Body, Piece, Point, Scene, SceneMaterial, Section } from "./scene.ts";

/** Radius of the meshed half disc in units of the scene's half-size; outside, space is mapped to its end. */
const DOMAIN_RADIUS = 1.5;
/** Positions are rounded to this part of the scene's size, so that equal designs in other units give equal grids. */
const QUANTUM = 2 ** 36;

export type State = "empty" | "loaded";

export interface Built {
  readonly mesh: PatchMesh;
  /** Region of turn k is k + 1; of body b (parts, then guides) turns + 1 + b; 0 is air. */
  readonly regionOfBody: (body: number) => number;
  readonly materials: (state: State) => RegionMaterial[];
}

/** √(ρ/(π f µ)), m. */
export function skinDepth(material: SceneMaterial, frequency: number): number {
  if (material.resistivity === null) return Infinity;
  return Math.sqrt(material.resistivity / (Math.PI * frequency * MU0 * material.relativePermeability));
}

export function build(scene: Scene): Built {
  const { centre, size } = extent(scene);
  const shapes = sceneShapes(scene);
  const scaled = shapes.map((s) => scaleShape(s, centre, size));
  const flipped = scaled.map(flipShape);
  const traits = sceneTraits(scene, size);
  const flip = compareSignatures(signature(flipped, traits), signature(scaled, traits)) < 0;
  const chosen = flip ? flipped : scaled;
  const mirrorRegion = findMirror(chosen, traits);
  const input: MeshInput = {
    shapes: chosen,
    traits,
    domain: { kind: "open", radius: DOMAIN_RADIUS, mirror: mirrorRegion !== null },
    mirrorRegion: mirrorRegion ?? new Int32Array(traits.length),
  };
  const mesh = recentMesh([input, centre, size, flip, scene.turns.length], () =>
    placeMesh(makeMesh(input), centre, size, flip),
  );
  return {
    mesh,
    regionOfBody: (body) => scene.turns.length + 1 + body,
    materials: (state) => sceneMaterials(scene, state),
  };
}

/** Middle height and half-size (radius of the enclosing sphere about it) of coil and bodies, m. */
function extent(scene: Scene): { centre: number; size: number } {
  const points: Point[] = [];
  const [w, h] = halfSize(scene.section);
  for (const t of scene.turns) points.push([t.r + w, t.z - h], [t.r + w, t.z + h]);
  for (const piece of scene.bodies.flatMap((b) => b.pieces)) {
    if (piece.kind === "polygon") points.push(...piece.points);
    else {
      const { centreZ, radius } = piece;
      points.push([radius, centreZ], [0, centreZ - radius], [0, centreZ + radius]);
    }
  }
  const zs = points.map((p) => p[1]);
  const centre = (Math.min(...zs) + Math.max(...zs)) / 2;
  const size = Math.max(...points.map((p) => Math.hypot(p[0], p[1] - centre)));
  return { centre, size };
}

function halfSize(section: Section): [number, number] {
  return section.kind === "round"
    ? [section.radius, section.radius]
    : [section.width / 2, section.height / 2];
}

function sceneShapes(scene: Scene): Shape[] {
  const shapes: Shape[] = [];
  scene.turns.forEach((t, k) => {
    shapes.push(...turnShapes(scene.section, t.r, t.z, k + 1));
  });
  scene.bodies.forEach((body, b) => {
    for (const piece of body.pieces) shapes.push(pieceShape(piece, scene.turns.length + 1 + b));
  });
  return shapes;
}

function turnShapes(section: Section, r: number, z: number, region: number): Shape[] {
  const hollow = section.wall > 0;
  if (section.kind === "round") {
    const disc = (radius: number, inside: number, around: number): Shape => ({
      kind: "disc",
      centre: [r, z],
      radius,
      region: inside,
      around,
    });
    const outer = disc(section.radius, region, AIR);
    return hollow ? [outer, disc(section.radius - section.wall, AIR, region)] : [outer];
  }
  const box = (inset: number, inside: number, around: number): Shape => {
    const w = section.width / 2 - inset;
    const h = section.height / 2 - inset;
    return {
      kind: "polygon",
      points: [
        [r - w, z - h],
        [r + w, z - h],
        [r + w, z + h],
        [r - w, z + h],
      ],
      region: inside,
      around,
    };
  };
  return hollow ? [box(0, region, AIR), box(section.wall, AIR, region)] : [box(0, region, AIR)];
}

function pieceShape(piece: Piece, region: number): Shape {
  return piece.kind === "polygon"
    ? { kind: "polygon", points: piece.points, region, around: AIR }
    : { kind: "disc", centre: [0, piece.centreZ], radius: piece.radius, region, around: AIR };
}

const snap = (x: number): number => Math.round(x * QUANTUM) / QUANTUM;

function scaleShape(shape: Shape, centre: number, size: number): Shape {
  if (shape.kind === "disc") {
    return {
      ...shape,
      centre: [snap(shape.centre[0] / size), snap((shape.centre[1] - centre) / size)],
      radius: snap(shape.radius / size),
    };
  }
  return {
    ...shape,
    points: shape.points.map(([r, z]) => [snap(r / size), snap((z - centre) / size)] as const),
  };
}

/** The mirror image about z = 0, corners again counter-clockwise. */
function flipShape(shape: Shape): Shape {
  const minus = (z: number): number => (z === 0 ? 0 : -z);
  if (shape.kind === "disc") return { ...shape, centre: [shape.centre[0], minus(shape.centre[1])] };
  return { ...shape, points: shape.points.map(([r, z]) => [r, minus(z)] as const).reverse() };
}

/** The geometry as one list of numbers that does not depend on the order of turns, parts or corners. */
function signature(shapes: readonly Shape[], traits: readonly RegionTraits[]): number[] {
  const rows = shapes.map((s) => shapeKey(s, traits));
  rows.sort(compareSignatures);
  return rows.flat();
}

function shapeKey(shape: Shape, traits: readonly RegionTraits[]): number[] {
  const skin = traits[shape.region]?.skinDepth ?? Infinity;
  const depth = Number.isFinite(skin) ? skin : -1;
  if (shape.kind === "disc") return [0, ...shape.centre, shape.radius, depth];
  const points = [...shape.points].sort((p, q) => p[0] - q[0] || p[1] - q[1]);
  return [1, ...points.flat(), depth];
}

function compareSignatures(a: readonly number[], b: readonly number[]): number {
  for (let i = 0; i < Math.min(a.length, b.length); i++) {
    const d = (a[i] ?? 0) - (b[i] ?? 0);
    if (d !== 0) return d;
  }
  return a.length - b.length;
}

/** Region of every region's mirror image, or null when the plane is not symmetric about z = 0 (or touches it along a side). */
function findMirror(shapes: readonly Shape[], traits: readonly RegionTraits[]): Int32Array | null {
  const image = new Int32Array(traits.length).fill(-1);
  image[AIR] = AIR;
  const byKey = new Map(shapes.map((s) => [shapeKey(s, traits).join(), s]));
  for (const s of shapes) {
    const twin = byKey.get(shapeKey(flipShape(s), traits).join());
    if (twin === undefined || touchesPlane(s)) return null;
    if (image[s.region] !== -1 && image[s.region] !== twin.region) return null;
    image[s.region] = twin.region;
    if (traits[s.region]?.active !== traits[twin.region]?.active) return null;
  }
  return image;
}

/** True where a corner or side lies on z = 0 without crossing it. */
function touchesPlane(shape: Shape): boolean {
  if (shape.kind === "disc") return Math.abs(shape.centre[1]) === shape.radius;
  return shape.points.some(([, z]) => z === 0);
}

/** Steps of skin depth a grid is made for, a factor of two: so that a small change of frequency or material keeps the grid. */
const STEPS = 4;

/** The step at or below a skin depth. What is a step to rounding counts as one. */
function stepBelow(depth: number): number {
  return Number.isFinite(depth) ? 2 ** (Math.floor(STEPS * Math.log2(depth) + 1e-9) / STEPS) : depth;
}

function sceneTraits(scene: Scene, size: number): RegionTraits[] {
  const air: RegionTraits = { skinDepth: Infinity, wall: 0, active: false, magnetic: false };
  const depthOf = (material: SceneMaterial): number => stepBelow(skinDepth(material, scene.frequency) / size);
  const turn: RegionTraits = {
    skinDepth: depthOf(scene.conductor),
    wall: scene.section.wall / size,
    active: true,
    magnetic: false,
  };
  const body = (b: Body): RegionTraits => ({
    skinDepth: depthOf(b.material),
    wall: 0,
    active: b.material.resistivity !== null || b.material.relativePermeability !== 1,
    magnetic: b.material.relativePermeability > 1,
  });
  return [air, ...scene.turns.map(() => turn), ...scene.bodies.map(body)];
}

/** The unit mesh at its real place and size, m. */
function placeMesh(unit: PatchMesh, centre: number, size: number, flip: boolean): PatchMesh {
  const sign = flip ? -1 : 1;
  const move = (z: number): number => centre + sign * size * z;
  const edgeArc = unit.edgeArc.slice();
  for (let e = 0; e < edgeArc.length; e += 3) {
    if (edgeArc[e + 2] === 0) continue;
    edgeArc[e] = (edgeArc[e] ?? 0) * size;
    edgeArc[e + 1] = move(edgeArc[e + 1] ?? 0);
    edgeArc[e + 2] = (edgeArc[e + 2] ?? 0) * size;
  }
  const outer = unit.outer === null ? null : { centreZ: centre, radius: unit.outer.radius * size };
  const placed = {
    ...unit,
    r: unit.r.map((r) => r * size),
    z: unit.z.map(move),
    edgeArc,
    outer,
  };
  return flip ? turnPatches(placed) : placed;
}

/** Counter-clockwise again after a flip, outer edges from below again. */
function turnPatches(mesh: PatchMesh): PatchMesh {
  const corners = mesh.corners.slice();
  const patchEdges = mesh.patchEdges.slice();
  for (let p = 0; p < corners.length; p += 4) {
    [0, 3, 2, 1].forEach((from, k) => {
      corners[p + k] = mesh.corners[p + from] ?? 0;
    });
    [3, 2, 1, 0].forEach((from, k) => {
      patchEdges[p + k] = mesh.patchEdges[p + from] ?? 0;
    });
  }
  return { ...mesh, corners, patchEdges, outerEdges: mesh.outerEdges.slice().reverse() };
}

function sceneMaterials(scene: Scene, state: State): RegionMaterial[] {
  const vacuum: RegionMaterial = { conductivity: 0, reluctivity: { re: 1, im: 0 }, turn: -1 };
  const body = (b: Body): RegionMaterial =>
    state === "empty" && b.role === "part" ? vacuum : regionMaterial(b.material, -1);
  return [
    vacuum,
    ...scene.turns.map((_, k) => regionMaterial(scene.conductor, k)),
    ...scene.bodies.map(body),
  ];
}

/** ν = 1/(µ_r (1 − j tan δ)). */
function regionMaterial(material: SceneMaterial, turn: number): RegionMaterial {
  const d = material.relativePermeability * (1 + material.lossTangent ** 2);
  return {
    conductivity: material.resistivity === null ? 0 : 1 / material.resistivity,
    reluctivity: { re: 1 / d, im: material.lossTangent / d },
    turn,
  };
}
