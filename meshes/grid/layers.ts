/**
 * Layers of cells along the normals inside conductors, thin at the surface and growing by half each, down to where the
 * current has died out: depth_k = first·δ·(1.5^k − 1)/0.5. A tube's wall is layered right through.
 *
 * Every surface node j moves inward by a displacement d_j: the mitre at corners, the normal along straight sides with the
 * mitre's tangential part fading out, the radius on arcs. Where a body is thin its layers are squeezed: thickness T_j.
 */
import { type Arc, type RegionTraits, type Side, sideDirection } from "./shape.ts";
import type { Plane } from "./sides.ts";

/** First layer and growth; the sum of four is 6.1 δ, where 1 − e^(−12) of the heat lies outside. */
const FIRST_SKIN = 0.75;
const RATIO = 1.5;
const FULL_LAYERS = 4;
/** Share of the clear thickness one surface's layers may take: two opposite ones leave a fifth between them. */
const SHARE_FACING = 0.4;
/** The same towards the axis or a mirror plane, where nothing comes from the other side. */
const SHARE_EDGE = 0.7;
/** Longest mitre, in thicknesses. */
const LONGEST_MITRE = 2.5;

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
}

interface Use {
  readonly index: number;
  readonly forward: boolean;
}

interface Chain {
  readonly uses: readonly Use[];
  readonly closed: boolean;
  readonly before: Use | null;
  readonly after: Use | null;
}

const startOf = (sides: readonly Side[], u: Use): number => (u.forward ? sides[u.index].a : sides[u.index].b);
const endOf = (sides: readonly Side[], u: Use): number => (u.forward ? sides[u.index].b : sides[u.index].a);

/** Layers of all regions that want them. `sideNodes`: node ids of every surface side. */
export function makeLayers(
  plane: Plane,
  sideNodes: readonly (readonly number[])[],
  traits: readonly RegionTraits[],
  innerOf: (outerSide: number) => number | null,
): Layers {
  const out: Layers = { quads: [], arcs: [], fronts: [], layered: new Set(), trims: new Map() };
  traits.forEach((trait, region) => {
    if (trait.wall > 0) layerWall(plane, sideNodes, region, trait, innerOf, out);
    else if (Number.isFinite(trait.skinDepth)) layerSkin(plane, sideNodes, region, trait.skinDepth, out);
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
  const plans = chains.map((chain) => planChain(plane, sideNodes, chain, full, segments));
  // A body thinner than this everywhere is resolved by its filling alone.
  if (plans.every((p) => Math.max(...p.thickness) < 0.45 * skinDepth)) return;
  shrinkUntilApart(plane, plans);
  for (const plan of plans) {
    const T = Math.max(...plan.thickness);
    const depths = depthProfile(T, skinDepth, false);
    buildChain(plane, plan, depths, region, out);
  }
  out.layered.add(region);
}

interface Segment {
  readonly p: number;
  readonly q: number;
  readonly side: number;
  readonly share: number;
}

function boundarySegments(
  plane: Plane,
  sideNodes: readonly (readonly number[])[],
  uses: readonly Use[],
): Segment[] {
  const out: Segment[] = [];
  for (const u of uses) {
    const side = plane.sides[u.index];
    const ids = side.kind === "edge" ? [side.a, side.b] : sideNodes[u.index];
    const share = side.kind === "edge" ? SHARE_EDGE : SHARE_FACING;
    for (let i = 0; i + 1 < ids.length; i++) out.push({ p: ids[i], q: ids[i + 1], side: u.index, share });
  }
  return out;
}

/** Runs of surface sides with the region on their left, broken at the domain's edges. */
function findChains(sides: readonly Side[], uses: readonly Use[]): Chain[] {
  const byStart = new Map<number, Use>();
  for (const u of uses) byStart.set(startOf(sides, u), u);
  const seen = new Set<Use>();
  const chains: Chain[] = [];
  for (const first of uses) {
    if (seen.has(first)) continue;
    const loop: Use[] = [];
    for (let u: Use | undefined = first; u !== undefined && !seen.has(u); u = byStart.get(endOf(sides, u))) {
      seen.add(u);
      loop.push(u);
    }
    const isEdge = (u: Use): boolean => sides[u.index].kind === "edge";
    const cut = loop.findIndex(isEdge);
    if (cut < 0) {
      chains.push({ uses: loop, closed: true, before: null, after: null });
      continue;
    }
    const turned = [...loop.slice(cut), ...loop.slice(0, cut)];
    let run: Use[] = [];
    let before: Use = turned[0];
    for (const u of [...turned, turned[0]]) {
      if (!isEdge(u)) {
        run.push(u);
        continue;
      }
      if (run.length > 0) chains.push({ uses: run, closed: false, before, after: u });
      run = [];
      before = u;
    }
  }
  return chains;
}

interface Plan {
  readonly chain: Chain;
  /** Nodes in order; a closed chain does not repeat its first. */
  readonly ids: number[];
  /** Unit displacement of each node. */
  readonly dr: Float64Array;
  readonly dz: Float64Array;
  readonly thickness: Float64Array;
  /** Use (index in chain.uses) of the interval that starts at each node. */
  readonly useOf: Int32Array;
}

/** Direction of travel along a use, at its start or end. */
function travel(plane: Plane, u: Use, atEnd: boolean): [number, number] {
  const d = sideDirection(plane.sides[u.index], plane.nodes, u.forward === atEnd ? 1 : 0);
  return u.forward ? d : [-d[0], -d[1]];
}

/** cot(α/2) at the corner between two directions of travel, region on the left. */
function mitreCot(from: readonly [number, number], to: readonly [number, number]): number {
  const turn = Math.atan2(from[0] * to[1] - from[1] * to[0], from[0] * to[0] + from[1] * to[1]);
  return Math.tan(turn / 2);
}

/** cot β at a chain's end on an edge of the domain, β between the chain and the edge, both led away from the corner. */
function edgeCot(along: readonly [number, number], edge: readonly [number, number]): number {
  const cross = Math.abs(along[0] * edge[1] - along[1] * edge[0]);
  return (along[0] * edge[0] + along[1] * edge[1]) / Math.max(cross, 1e-12);
}

function planChain(
  plane: Plane,
  sideNodes: readonly (readonly number[])[],
  chain: Chain,
  full: number,
  segments: readonly Segment[],
): Plan {
  const ids: number[] = [];
  const use: number[] = [];
  chain.uses.forEach((u, k) => {
    const own = u.forward ? sideNodes[u.index] : [...sideNodes[u.index]].reverse();
    for (let i = 0; i + 1 < own.length; i++) {
      ids.push(own[i]);
      use.push(k);
    }
    if (!chain.closed && k === chain.uses.length - 1) {
      ids.push(own[own.length - 1]);
      use.push(k);
    }
  });
  const n = ids.length;
  const plan: Plan = {
    chain,
    ids,
    dr: new Float64Array(n),
    dz: new Float64Array(n),
    thickness: new Float64Array(n).fill(full),
    useOf: Int32Array.from(use),
  };
  setDisplacements(plane, plan);
  limitByClearance(plane, plan, segments);
  smoothThickness(plane, plan);
  setDisplacements(plane, plan);
  return plan;
}

/** Tangential share (cot) at the start and the end of every use of the chain. */
function cornerCots(plane: Plane, chain: Chain): { start: number[]; end: number[] } {
  const n = chain.uses.length;
  const start = new Array<number>(n).fill(0);
  const end = new Array<number>(n).fill(0);
  for (let k = 0; k < n; k++) {
    const here = chain.uses[k];
    const next = k + 1 < n ? chain.uses[k + 1] : chain.closed ? chain.uses[0] : null;
    if (next !== null) {
      const c = mitreCot(travel(plane, here, true), travel(plane, next, false));
      end[k] = c;
      start[(k + 1) % n] = c;
    }
  }
  if (!chain.closed && chain.before !== null && chain.after !== null) {
    const back = travel(plane, chain.before, true);
    start[0] = edgeCot(travel(plane, chain.uses[0], false), [-back[0], -back[1]]);
    const last = travel(plane, chain.uses[n - 1], true);
    end[n - 1] = edgeCot([-last[0], -last[1]], travel(plane, chain.after, false));
  }
  return { start, end };
}

/** d_j per unit thickness: normal plus the corners' tangential parts, fading over a few thicknesses. */
function setDisplacements(plane: Plane, plan: Plan): void {
  const { chain, ids, thickness, useOf } = plan;
  const { nodes } = plane;
  const cots = cornerCots(plane, chain);
  for (let j = 0; j < ids.length; j++) {
    const u = chain.uses[useOf[j]];
    const side = plane.sides[u.index];
    const id = ids[j];
    const T = thickness[j];
    const sign = u.forward ? 1 : -1;
    let d: [number, number];
    if (side.arc !== null) {
      const s = Math.sign(side.arc.sweep) * sign;
      const l = Math.hypot(nodes.r[id] - side.arc.centre[0], nodes.z[id] - side.arc.centre[1]);
      d = [(-s * (nodes.r[id] - side.arc.centre[0])) / l, (-s * (nodes.z[id] - side.arc.centre[1])) / l];
      if (nodes.r[id] === 0) d[0] = 0;
    } else {
      const t = travel(plane, u, false);
      const fromStart = Math.hypot(
        nodes.r[id] - nodes.r[startOf(plane.sides, u)],
        nodes.z[id] - nodes.z[startOf(plane.sides, u)],
      );
      const a = fade(cots.start[useOf[j]], fromStart, T, side.length);
      const b = fade(cots.end[useOf[j]], side.length - fromStart, T, side.length);
      d = [-t[1] + t[0] * (a - b), t[0] + t[1] * (a - b)];
    }
    const edge = !chain.closed && (j === 0 ? chain.before : j === ids.length - 1 ? chain.after : null);
    if (edge) d = alongEdge(d, travel(plane, edge, j === 0));
    const long = Math.hypot(d[0], d[1]);
    const cap = Math.min(1, LONGEST_MITRE / long);
    plan.dr[j] = d[0] * cap;
    plan.dz[j] = d[1] * cap;
  }
}

/** Tangential part left at distance x from a corner with the given cot. */
function fade(cot: number, x: number, T: number, length: number): number {
  const range = Math.min(3 * T * Math.max(1, Math.abs(cot)), 0.5 * length);
  return cot * Math.max(0, 1 - x / range);
}

/** A displacement put exactly onto a straight edge of the domain, its normal part kept. */
function alongEdge(d: readonly [number, number], edge: readonly [number, number]): [number, number] {
  const dot = d[0] * edge[0] + d[1] * edge[1];
  const ahead = dot < 0 ? -1 : 1;
  const long = Math.hypot(d[0], d[1]);
  return [ahead * long * edge[0], ahead * long * edge[1]];
}

function limitByClearance(plane: Plane, plan: Plan, segments: readonly Segment[]): void {
  const { nodes } = plane;
  const { chain, ids, dr, dz, thickness } = plan;
  const cots = cornerCots(plane, chain);
  for (let j = 0; j < ids.length; j++) {
    const long = Math.hypot(dr[j], dz[j]);
    const id = ids[j];
    for (const s of segments) {
      if (s.p === id || s.q === id) continue;
      const hit = rayHit(nodes.r[id], nodes.z[id], dr[j] / long, dz[j] / long, nodes, s);
      if (hit > 1e-12) thickness[j] = Math.min(thickness[j], (s.share * hit) / long);
    }
  }
  let arcLimit = Infinity;
  for (let j = 0; j < ids.length; j++) {
    const k = plan.useOf[j];
    const side = plane.sides[chain.uses[k].index];
    if (side.arc !== null) {
      arcLimit = Math.min(arcLimit, thickness[j], 0.6 * side.arc.radius);
      continue;
    }
    for (const c of [cots.start[k], cots.end[k]]) {
      if (Math.abs(c) > 1e-9) thickness[j] = Math.min(thickness[j], (0.36 * side.length) / Math.abs(c));
    }
  }
  // Concentric layers need one thickness all along the arc.
  if (arcLimit < Infinity) {
    for (let j = 0; j < ids.length; j++) {
      if (plane.sides[chain.uses[plan.useOf[j]].index].arc !== null) thickness[j] = arcLimit;
    }
  }
}

/** Distance along a ray to a segment, or Infinity. */
function rayHit(r: number, z: number, ur: number, uz: number, nodes: Plane["nodes"], s: Segment): number {
  const er = nodes.r[s.q] - nodes.r[s.p];
  const ez = nodes.z[s.q] - nodes.z[s.p];
  const det = ur * ez - uz * er;
  if (Math.abs(det) < 1e-14) return Infinity;
  const wr = nodes.r[s.p] - r;
  const wz = nodes.z[s.p] - z;
  const t = (wr * ez - wz * er) / det;
  const k = (wr * uz - wz * ur) / det;
  return t > 0 && k >= -1e-9 && k <= 1 + 1e-9 ? t : Infinity;
}

/** T_j ≤ T_i + half the distance between them; then middles of the filling's edges on the straight line between its ends. */
function smoothThickness(plane: Plane, plan: Plan): void {
  const { nodes } = plane;
  const { ids, thickness, chain } = plan;
  const n = ids.length;
  const gapOf = (i: number, j: number): number =>
    Math.hypot(nodes.r[ids[i]] - nodes.r[ids[j]], nodes.z[ids[i]] - nodes.z[ids[j]]);
  const rounds = chain.closed ? 2 * n : n;
  for (let k = 1; k < rounds; k++) {
    const j = k % n;
    const i = (k - 1) % n;
    thickness[j] = Math.min(thickness[j], thickness[i] + 0.5 * gapOf(i, j));
  }
  for (let k = rounds - 2; k >= 0; k--) {
    const j = k % n;
    const i = (k + 1) % n;
    thickness[j] = Math.min(thickness[j], thickness[i] + 0.5 * gapOf(i, j));
  }
  for (let j = 1; j < n; j += 2) {
    const next = (j + 1) % n;
    const part = gapOf(j - 1, j) / (gapOf(j - 1, j) + gapOf(j, next));
    thickness[j] = (1 - part) * thickness[j - 1] + part * thickness[next];
  }
}

/** Thins the layers wherever a column is folded over or two fronts would meet. */
function shrinkUntilApart(plane: Plane, plans: readonly Plan[]): void {
  for (let round = 0; round < 12; round++) {
    let bad = false;
    for (const plan of plans) if (shrinkFolded(plane, plan)) bad = true;
    if (!bad) return;
  }
}

function shrinkFolded(plane: Plane, plan: Plan): boolean {
  const { ids, dr, dz, thickness, chain } = plan;
  const { r, z } = plane.nodes;
  const n = ids.length;
  const last = chain.closed ? n : n - 1;
  const hits: number[] = [];
  for (let i = 0; i < last; i++) {
    const j = (i + 1) % n;
    const ar = r[ids[i]] + dr[i] * thickness[i];
    const az = z[ids[i]] + dz[i] * thickness[i];
    const br = r[ids[j]] + dr[j] * thickness[j];
    const bz = z[ids[j]] + dz[j] * thickness[j];
    const er = r[ids[j]] - r[ids[i]];
    const ez = z[ids[j]] - z[ids[i]];
    const forward = (br - ar) * er + (bz - az) * ez;
    const long = Math.hypot(er, ez);
    const lift = (pr: number, pz: number): number => (er * (pz - z[ids[i]]) - ez * (pr - r[ids[i]])) / long;
    const low = Math.min(lift(ar, az) / thickness[i], lift(br, bz) / thickness[j]);
    if (forward < 0.2 * long * long || low < 0.1) hits.push(i, j);
  }
  for (const j of new Set(hits)) thickness[j] *= 0.7;
  if (hits.length > 0) {
    const arcs = ids.map((_, j) => plane.sides[chain.uses[plan.useOf[j]].index].arc !== null);
    const least = Math.min(...ids.map((_, j) => (arcs[j] ? thickness[j] : Infinity)));
    for (let j = 0; j < n; j++) if (arcs[j]) thickness[j] = least;
    smoothThickness(plane, plan);
    setDisplacements(plane, plan);
  }
  return hits.length > 0;
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
