/**
 * Shapes and domain → patches: sides sampled by the wanted sizes, layers inside conductors, the rest filled, every face cut
 * into quadrilaterals at the middles of its edges. What comes out wrong anywhere is tried again with smaller cells there.
 */
import { type ArcOfEdge, makePatchMesh, type PatchMesh } from "../../solver/index.ts";
import { fill } from "./fill.ts";
import { type Layers, makeLayers } from "./layers.ts";
import { AIR, type Arc, type Domain, OUTSIDE, type RegionTraits, type Shape } from "./shape.ts";
import { makePlane, type Plane } from "./sides.ts";
import { makeSizing, type Sizing, sampleSide } from "./sizes.ts";
import { badPatches } from "./soundness.ts";
import type { Places } from "./thickness.ts";
import { type FillEdge, FillError } from "./triangulation.ts";

export interface MeshInput {
  readonly shapes: readonly Shape[];
  /** By region id; entry 0 is air. */
  readonly traits: readonly RegionTraits[];
  readonly domain: Domain;
  /** Region of the mirror image of each region; used with a mirrored domain only. */
  readonly mirrorRegion: Int32Array;
}

/** No valid grid was found: a defect of the generator, not of the input. */
export class MeshError extends Error {}

const ATTEMPTS = 12;

/** The patches of the whole domain. */
export function makeMesh(input: MeshInput): PatchMesh {
  const extra: [number, number, number][] = [];
  const thin: Places[] = [];
  for (let attempt = 0; attempt < ATTEMPTS; attempt++) {
    try {
      const mesh = tryMesh(input, extra, thin, attempt < ATTEMPTS / 2);
      if (mesh === null) continue;
      const bad = badPatches(mesh);
      if (bad.length === 0)
        return input.domain.kind === "open" && input.domain.mirror ? reflect(mesh, input) : mesh;
      for (const { r, z, size } of bad) extra.push([r, z, size / (3 * 1.6 ** attempt)]);
      thin.push(bad.filter((b) => Number.isFinite(input.traits[b.region]?.skinDepth)).map((b) => [b.r, b.z]));
    } catch (error) {
      if (!(error instanceof FillError)) throw error;
      thin.push([[error.x, error.y]]);
    }
  }
  throw new MeshError("no valid grid for this geometry");
}

/** One try; null when the layers ask for smaller cells first (now in `extra`), which is heeded at first. */
function tryMesh(
  input: MeshInput,
  extra: [number, number, number][],
  thin: readonly Places[],
  heed: boolean,
): PatchMesh | null {
  const { shapes, traits, domain } = input;
  const plane = makePlane(shapes, domain);
  const sizing = makeSizing(plane, shapes, traits, extra);
  const innerOf = pairWalls(plane, shapes, traits);
  const sideNodes: number[][] = plane.sides.map(() => []);
  const isInner = new Set([...innerOf.values()]);
  plane.sides.forEach((side, index) => {
    if (side.kind !== "surface" || isInner.has(index)) return;
    const params = sampleSide(plane, index, sizing);
    sideNodes[index] = placeNodes(plane, index, params);
    const inner = innerOf.get(index);
    if (inner !== undefined) sideNodes[inner] = placeNodes(plane, inner, params);
  });
  const layers = makeLayers(plane, sideNodes, traits, (outer) => innerOf.get(outer) ?? null, thin);
  const unmet = layers.demands.filter(([r, z, size]) => sizing.field.at(r, z) > 1.3 * size);
  if (heed && unmet.length > 0) {
    for (const [r, z, size] of unmet) extra.push([r, z, size]);
    return null;
  }
  plane.sides.forEach((side, index) => {
    if (side.kind === "edge") sideNodes[index] = sampleEdge(plane, index, sizing, layers, traits);
  });
  return assemble(plane, sideNodes, layers, domain);
}

/** Outer side → inner side of every tube, in the same order round the section. */
function pairWalls(
  plane: Plane,
  shapes: readonly Shape[],
  traits: readonly RegionTraits[],
): Map<number, number> {
  const inner = new Map<number, number[]>();
  const outer = new Map<number, number[]>();
  plane.sides.forEach((side, index) => {
    if (side.shape < 0) return;
    const shape = shapes[side.shape];
    const around = traits[shape.around];
    const own = traits[shape.region];
    if (shape.around !== AIR && around !== undefined && around.wall > 0) {
      inner.set(shape.around, [...(inner.get(shape.around) ?? []), index]);
    } else if (own !== undefined && own.wall > 0) {
      outer.set(shape.region, [...(outer.get(shape.region) ?? []), index]);
    }
  });
  const pairs = new Map<number, number>();
  for (const [region, list] of outer) {
    const mates = inner.get(region) ?? [];
    if (mates.length !== list.length) throw new MeshError("a tube's outside and bore do not match");
    list.forEach((o, k) => {
      pairs.set(o, mates[k]);
    });
  }
  return pairs;
}

function placeNodes(plane: Plane, index: number, params: readonly number[]): number[] {
  const side = plane.sides[index];
  const { nodes } = plane;
  return params.map((t, i) => {
    if (i === 0) return side.a;
    if (i === params.length - 1) return side.b;
    if (side.arc !== null) {
      const angle = side.arc.from + t * side.arc.sweep;
      return nodes.add(
        side.arc.centre[0] + side.arc.radius * Math.cos(angle),
        side.arc.centre[1] + side.arc.radius * Math.sin(angle),
      );
    }
    const { r, z } = nodes;
    return nodes.add(r[side.a] + t * (r[side.b] - r[side.a]), z[side.a] + t * (z[side.b] - z[side.a]));
  });
}

/** Nodes of a side of the domain's boundary between the layers that end on it. */
function sampleEdge(
  plane: Plane,
  index: number,
  sizing: Sizing,
  layers: Layers,
  traits: readonly RegionTraits[],
): number[] {
  const side = plane.sides[index];
  const trait = traits[side.left];
  if (trait !== undefined && trait.wall > 0) return [];
  const cut = layers.trims.get(index);
  const { r, z } = plane.nodes;
  const a = cut?.start ?? side.a;
  const b = cut?.end ?? side.b;
  if (a === side.a && b === side.b) return placeNodes(plane, index, sampleSide(plane, index, sizing));
  const part = { ...side, a, b, length: Math.hypot(r[a] - r[b], z[a] - z[b]) };
  const trimmed: Plane = { nodes: plane.nodes, sides: [part] };
  return placeNodes(trimmed, 0, sampleSide(trimmed, 0, { field: sizing.field, stops: [] }));
}

interface BaseEdge {
  readonly a: number;
  readonly b: number;
  readonly mid: number;
  readonly arc: Arc | null;
  readonly left: number;
  readonly right: number;
}

/** Edges between every second node of the sides and fronts, with what lies on either side of them. */
function baseEdges(plane: Plane, sideNodes: readonly (readonly number[])[], layers: Layers): BaseEdge[] {
  const out: BaseEdge[] = [];
  const push = (ids: readonly number[], arc: Arc | null, left: number, right: number): void => {
    for (let i = 0; i + 2 < ids.length; i += 2)
      out.push({ a: ids[i], b: ids[i + 2], mid: ids[i + 1], arc, left, right });
  };
  const open = (region: number): number => (layers.layered.has(region) ? OUTSIDE : region);
  plane.sides.forEach((side, index) => {
    if (side.kind === "edge") push(sideNodes[index], side.arc, side.left, OUTSIDE);
    else push(sideNodes[index], side.arc, open(side.left), open(side.right));
  });
  for (const front of layers.fronts) push(front.nodes, null, front.region, OUTSIDE);
  return out.filter((e) => e.left !== OUTSIDE || e.right !== OUTSIDE);
}

/** Longest edges of the filling: half the scene's size in the middle, growing outwards. */
const farCap = (x: number, y: number): number => Math.max(0.3, 0.45 * Math.hypot(x, y));

function assemble(
  plane: Plane,
  sideNodes: readonly (readonly number[])[],
  layers: Layers,
  domain: Domain,
): PatchMesh {
  const { nodes } = plane;
  const base = baseEdges(plane, sideNodes, layers);
  const local = new Map<number, number>();
  const global: number[] = [];
  const localOf = (id: number): number => {
    const known = local.get(id);
    if (known !== undefined) return known;
    local.set(id, global.length);
    global.push(id);
    return global.length - 1;
  };
  const fillEdges: FillEdge[] = base.map((e) => ({
    a: localOf(e.a),
    b: localOf(e.b),
    left: e.left,
    right: e.right,
  }));
  const given = global.length;
  const filling = fill(
    global.map((id) => nodes.r[id]),
    global.map((id) => nodes.z[id]),
    fillEdges,
    farCap,
  );
  for (let i = given; i < filling.x.length; i++) global.push(nodes.add(filling.x[i], filling.y[i]));
  const arcs: ArcOfEdge[] = layers.arcs.map((e) => arcOf(e.a, e.b, e.arc));
  const middle = new Map<string, number>();
  const key = (a: number, b: number): string => (a < b ? `${a},${b}` : `${b},${a}`);
  base.forEach((e) => {
    middle.set(key(e.a, e.b), e.mid);
    if (e.arc !== null) arcs.push(arcOf(e.a, e.mid, e.arc), arcOf(e.mid, e.b, e.arc));
  });
  const middleOf = (a: number, b: number): number => {
    const known = middle.get(key(a, b));
    if (known !== undefined) return known;
    const made = nodes.add((nodes.r[a] + nodes.r[b]) / 2, (nodes.z[a] + nodes.z[b]) / 2);
    middle.set(key(a, b), made);
    return made;
  };
  const corners: number[] = [];
  const region: number[] = [];
  for (const q of layers.quads) {
    corners.push(...q.corners);
    region.push(q.region);
  }
  filling.faces.forEach((face, f) => {
    const ids = face.map((i) => global[i]);
    const mids = ids.map((id, i) => middleOf(id, ids[(i + 1) % ids.length]));
    const mean = (values: readonly number[]): number =>
      mids.reduce((s, id) => s + values[id], 0) / mids.length;
    const centre = nodes.add(mean(nodes.r), mean(nodes.z));
    ids.forEach((id, i) => {
      corners.push(id, mids[i], centre, mids[(i + ids.length - 1) % ids.length]);
      region.push(filling.labels[f]);
    });
  });
  return compact(nodes.r, nodes.z, corners, region, arcs, domain);
}

function arcOf(a: number, b: number, arc: Arc): ArcOfEdge {
  return { a, b, centreR: arc.centre[0], centreZ: arc.centre[1], radius: arc.radius };
}

/** Patches with only the nodes in use. */
function compact(
  r: readonly number[],
  z: readonly number[],
  corners: readonly number[],
  region: readonly number[],
  arcs: readonly ArcOfEdge[],
  domain: Domain,
): PatchMesh {
  const id = new Map<number, number>();
  const used: number[] = [];
  const numbered = Int32Array.from(corners, (c) => {
    const known = id.get(c);
    if (known !== undefined) return known;
    id.set(c, used.length);
    used.push(c);
    return used.length - 1;
  });
  const kept = new Map<string, ArcOfEdge>();
  for (const arc of arcs) {
    const a = id.get(arc.a);
    const b = id.get(arc.b);
    if (a !== undefined && b !== undefined) kept.set(`${a},${b}`, { ...arc, a, b });
  }
  return makePatchMesh(
    Float64Array.from(used, (c) => r[c]),
    Float64Array.from(used, (c) => z[c]),
    numbered,
    Int32Array.from(region),
    [...kept.values()],
    domain.kind === "open" ? { centreZ: 0, radius: domain.radius } : null,
  );
}

/** Both halves of a mesh made for z ≥ 0. */
function reflect(mesh: PatchMesh, input: MeshInput): PatchMesh {
  const n = mesh.r.length;
  const r = [...mesh.r];
  const z = [...mesh.z];
  const image = new Int32Array(n);
  for (let i = 0; i < n; i++) {
    if (mesh.z[i] === 0) image[i] = i;
    else {
      image[i] = r.length;
      r.push(mesh.r[i]);
      z.push(-mesh.z[i]);
    }
  }
  const corners = [...mesh.corners];
  const region = [...mesh.region];
  for (let p = 0; p < mesh.region.length; p++) {
    for (const k of [0, 3, 2, 1]) corners.push(image[mesh.corners[4 * p + k]]);
    region.push(input.mirrorRegion[mesh.region[p]]);
  }
  const arcs = new Map<string, ArcOfEdge>();
  for (let e = 0; e < mesh.edgeEnds.length / 2; e++) {
    const radius = mesh.edgeArc[3 * e + 2];
    if (radius === 0) continue;
    const [centreR, centreZ] = [mesh.edgeArc[3 * e], mesh.edgeArc[3 * e + 1]];
    const [a, b] = [mesh.edgeEnds[2 * e], mesh.edgeEnds[2 * e + 1]];
    arcs.set(`${a},${b}`, { a, b, centreR, centreZ, radius });
    arcs.set(`${image[a]},${image[b]}`, {
      a: image[a],
      b: image[b],
      centreR,
      centreZ: centreZ === 0 ? 0 : -centreZ,
      radius,
    });
  }
  const whole = makePatchMesh(
    Float64Array.from(r),
    Float64Array.from(z),
    Int32Array.from(corners),
    Int32Array.from(region),
    [...arcs.values()],
    mesh.outer,
  );
  return { ...whole, mirrored: true };
}
