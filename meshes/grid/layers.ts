/**
 * Layers of cells along the normals inside conductors, thin at the surface and growing by half each, down to where the
 * current has died out: depth_k = first·δ·(1.5^k − 1)/0.5. A tube's wall is layered right through.
 */
import { findChains, type Plan, type Use } from "./chains.ts";
import type { Arc, RegionTraits } from "./shape.ts";
import type { Plane } from "./sides.ts";
import {
  boundarySegments,
  type Demand,
  type Places,
  planChain,
  shrinkUntilApart,
  unfinishedDepths,
} from "./thickness.ts";

/** First layer and growth; the sum of four is 6.1 δ, where 1 − e^(−12) of the heat lies outside. */
const FIRST_SKIN = 0.75;
const RATIO = 1.5;
const FULL_LAYERS = 4;

export interface Quad {
  readonly corners: readonly [number, number, number, number];
  readonly region: number;
}

export interface ArcEdge {
  readonly a: number;
  readonly b: number;
  readonly arc: Arc;
}

export interface Layers {
  readonly quads: Quad[];
  readonly arcs: ArcEdge[];
  /** Nodes of each front, in the direction that keeps the rest of the region on the left; first = last when closed. */
  readonly fronts: { readonly nodes: number[]; readonly region: number }[];
  /** Regions whose surfaces carry layers on the inside: nothing is filled between them and the front. */
  readonly layered: Set<number>;
  /** Where an edge side of the domain really starts and ends once layers have taken their part. */
  readonly trims: Map<number, { start?: number; end?: number }>;
  /** Cell lengths the layers would like to see on their surface, where they are not met already the caller tries again. */
  readonly demands: Demand[];
}

/** Layers of all regions that want them. `sideNodes`: node ids of every surface side. */
export function makeLayers(
  plane: Plane,
  sideNodes: readonly (readonly number[])[],
  traits: readonly RegionTraits[],
  innerOf: (outerSide: number) => number | null,
  thin: readonly Places[],
): Layers {
  const out: Layers = { quads: [], arcs: [], fronts: [], layered: new Set(), trims: new Map(), demands: [] };
  traits.forEach((trait, region) => {
    if (trait.wall > 0) layerWall(plane, sideNodes, region, trait, innerOf, out);
    else if (Number.isFinite(trait.skinDepth))
      layerSkin(plane, sideNodes, region, trait.skinDepth, thin, out);
  });
  return out;
}

/** Relative depths 0 < τ_1 < … < τ_K = 1 of layers filling the given thickness. */
export function depthProfile(thickness: number, skinDepth: number, through: boolean): number[] {
  const depths: number[] = [];
  let step = FIRST_SKIN * skinDepth;
  let x = 0;
  while (x < 0.9 * thickness && (through || depths.length < FULL_LAYERS)) {
    x += step;
    depths.push(x);
    step *= depths.length < FULL_LAYERS ? RATIO : 2.5;
  }
  return depths.map((d) => d / x);
}

/** Copper between a tube's outside and its bore, whose nodes face each other one by one. */
function layerWall(
  plane: Plane,
  sideNodes: readonly (readonly number[])[],
  region: number,
  trait: RegionTraits,
  innerOf: (outerSide: number) => number | null,
  out: Layers,
): void {
  const depths = depthProfile(trait.wall, trait.skinDepth, true);
  const made = new Map<number, number[]>();
  const { nodes } = plane;
  plane.sides.forEach((side, index) => {
    if (side.kind !== "surface" || side.left !== region) return;
    const inner = innerOf(index);
    if (inner === null) return;
    const columns = sideNodes[index].map((id, j) => {
      const known = made.get(id);
      if (known !== undefined) return known;
      const last = sideNodes[inner][j];
      const column = [id];
      for (const t of depths.slice(0, -1)) {
        column.push(
          nodes.add(
            nodes.r[id] + t * (nodes.r[last] - nodes.r[id]),
            nodes.z[id] + t * (nodes.z[last] - nodes.z[id]),
          ),
        );
      }
      column.push(last);
      made.set(id, column);
      return column;
    });
    addQuads(columns, region, out);
    if (side.arc !== null) addArcs(columns, side.arc, [0, ...depths.map((t) => t * trait.wall)], 1, out);
  });
  out.layered.add(region);
}

function addQuads(columns: readonly (readonly number[])[], region: number, out: Layers): void {
  for (let j = 0; j + 1 < columns.length; j++) {
    for (let i = 0; i + 1 < columns[j].length; i++) {
      out.quads.push({
        corners: [columns[j][i], columns[j + 1][i], columns[j + 1][i + 1], columns[j][i + 1]],
        region,
      });
    }
  }
}

/** Edges along layers that follow an arc: concentric, at the given depths; sign +1 where the region is inside the arc. */
function addArcs(
  columns: readonly (readonly number[])[],
  arc: Arc,
  depths: readonly number[],
  sign: number,
  out: Layers,
): void {
  for (let j = 0; j + 1 < columns.length; j++) {
    for (let i = 1; i < depths.length; i++) {
      const radius = arc.radius - sign * depths[i];
      out.arcs.push({ a: columns[j][i], b: columns[j + 1][i], arc: { ...arc, radius } });
    }
  }
}

function layerSkin(
  plane: Plane,
  sideNodes: readonly (readonly number[])[],
  region: number,
  skinDepth: number,
  thin: readonly Places[],
  out: Layers,
): void {
  const uses: Use[] = [];
  plane.sides.forEach((s, index) => {
    if (s.left === region) uses.push({ index, forward: true });
    if (s.right === region) uses.push({ index, forward: false });
  });
  const segments = boundarySegments(plane, sideNodes, uses);
  const chains = findChains(plane.sides, uses);
  const full = ((RATIO ** FULL_LAYERS - 1) / (RATIO - 1)) * FIRST_SKIN * skinDepth;
  const plans = chains.map((chain) => planChain(plane, sideNodes, chain, full, segments, thin));
  // A body thinner than this everywhere is resolved by its filling alone.
  if (plans.every((p) => p.room < 0.45 * skinDepth)) return;
  shrinkUntilApart(plane, plans, segments);
  const next = (thickness: number): number => FIRST_SKIN * skinDepth + (RATIO - 1) * thickness;
  for (const plan of plans) out.demands.push(...unfinishedDepths(plane, plan, full, next));
  for (const plan of plans) {
    const T = Math.max(...plan.thickness);
    const depths = depthProfile(T, skinDepth, false);
    buildChain(plane, plan, depths, region, out);
  }
  out.layered.add(region);
}

function buildChain(plane: Plane, plan: Plan, depths: readonly number[], region: number, out: Layers): void {
  const { ids, dr, dz, thickness, chain } = plan;
  const { nodes } = plane;
  const columns = ids.map((id, j) => [
    id,
    ...depths.map((t) =>
      nodes.add(nodes.r[id] + t * thickness[j] * dr[j], nodes.z[id] + t * thickness[j] * dz[j]),
    ),
  ]);
  const ring = chain.closed ? [...columns, columns[0]] : columns;
  addQuads(ring, region, out);
  for (let j = 0; j + 1 < ring.length; j++) {
    const u = chain.uses[plan.useOf[j]];
    const arc = plane.sides[u.index].arc;
    if (arc === null) continue;
    const sign = Math.sign(arc.sweep) * (u.forward ? 1 : -1);
    addArcs(ring.slice(j, j + 2), arc, [0, ...depths.map((t) => t * thickness[j])], sign, out);
  }
  const front = ring.map((c) => c[c.length - 1]);
  out.fronts.push({ nodes: front, region });
  if (chain.before !== null && chain.after !== null) {
    trim(out, chain.before, chain.before.forward ? "end" : "start", front[0]);
    trim(out, chain.after, chain.after.forward ? "start" : "end", front[front.length - 1]);
  }
}

function trim(out: Layers, use: Use, which: "start" | "end", node: number): void {
  out.trims.set(use.index, { ...out.trims.get(use.index), [which]: node });
}
