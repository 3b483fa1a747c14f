/**
 * How thick the layers may be at every node of a region's surface: as the skin depth asks, but no more than a share of the clear
 * way to the other side, smoothly changing along the surface, and so that no two fronts meet.
 */
import { type Chain, cornerCots, type Plan, setDisplacements, type Use } from "./chains.ts";
import type { Plane } from "./sides.ts";

/** Share of the clear thickness one surface's layers may take: two opposite ones leave a fifth between them. */
const SHARE_FACING = 0.4;
/** The same towards the axis or a mirror plane, where nothing comes from the other side. */
const SHARE_EDGE = 0.7;
/** Deepest layers of a disc, in radii. */
const SHARE_RADIUS = 0.6;
const SHRINK_ROUNDS = 16;

/** Places [r, z]. */
export type Places = readonly (readonly [number, number])[];

export interface Segment {
  readonly p: number;
  readonly q: number;
  readonly side: number;
  readonly share: number;
}

export function boundarySegments(
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

export function planChain(
  plane: Plane,
  sideNodes: readonly (readonly number[])[],
  chain: Chain,
  full: number,
  segments: readonly Segment[],
  thin: readonly Places[],
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
    clear: new Float64Array(n).fill(Infinity),
    room: 0,
    useOf: Int32Array.from(use),
  };
  setDisplacements(plane, plan);
  limitByClearance(plane, plan, segments);
  const room = Math.max(...plan.thickness);
  thinAt(plane, plan, thin);
  smoothThickness(plane, plan);
  setDisplacements(plane, plan);
  return { ...plan, room };
}

const onArc = (plane: Plane, plan: Plan, j: number): boolean =>
  plane.sides[plan.chain.uses[plan.useOf[j]].index].arc !== null;

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
      if (hit <= 1e-12) continue;
      thickness[j] = Math.min(thickness[j], (s.share * hit) / long);
      plan.clear[j] = Math.min(plan.clear[j], hit);
    }
  }
  let arcLimit = Infinity;
  for (let j = 0; j < ids.length; j++) {
    const k = plan.useOf[j];
    const side = plane.sides[chain.uses[k].index];
    if (side.arc !== null) {
      arcLimit = Math.min(arcLimit, thickness[j], SHARE_RADIUS * side.arc.radius);
      continue;
    }
    for (const c of [cots.start[k], cots.end[k]]) {
      if (Math.abs(c) > 1e-9) thickness[j] = Math.min(thickness[j], (0.36 * side.length) / Math.abs(c));
    }
  }
  // Concentric layers need one thickness all along the arc.
  if (arcLimit < Infinity) {
    for (let j = 0; j < ids.length; j++) if (onArc(plane, plan, j)) thickness[j] = arcLimit;
  }
}

/** For every earlier try, halves the layers within reach of the places where it went wrong; an arc thins as a whole. */
function thinAt(plane: Plane, plan: Plan, tries: readonly Places[]): void {
  const { ids, thickness } = plan;
  const { r, z } = plane.nodes;
  for (const places of tries) {
    const hit = ids.map((id, j) =>
      places.some(([pr, pz]) => Math.hypot(r[id] - pr, z[id] - pz) <= 2.5 * thickness[j]),
    );
    const arc = hit.some((h, j) => h && onArc(plane, plan, j));
    for (let j = 0; j < ids.length; j++) if (onArc(plane, plan, j) ? arc : hit[j]) thickness[j] *= 0.5;
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

/** Thins the layers wherever a column is folded over or two fronts, or a front and a surface, meet. */
export function shrinkUntilApart(plane: Plane, plans: readonly Plan[], segments: readonly Segment[]): void {
  for (let round = 0; round < SHRINK_ROUNDS; round++) {
    const hits = plans.map((plan) => foldedNodes(plane, plan));
    markMeetings(plane, plans, segments, hits);
    if (hits.every((h) => h.size === 0)) return;
    plans.forEach((plan, k) => {
      if (hits[k].size > 0) shrink(plane, plan, hits[k]);
    });
  }
}

function shrink(plane: Plane, plan: Plan, hits: ReadonlySet<number>): void {
  const { ids, thickness } = plan;
  for (const j of hits) thickness[j] *= 0.7;
  const least = Math.min(...ids.map((_, j) => (onArc(plane, plan, j) ? thickness[j] : Infinity)));
  for (let j = 0; j < ids.length; j++) if (onArc(plane, plan, j)) thickness[j] = least;
  smoothThickness(plane, plan);
  setDisplacements(plane, plan);
}

/** Nodes whose interval's layers lean over or run backwards. */
function foldedNodes(plane: Plane, plan: Plan): Set<number> {
  const { ids, thickness, chain } = plan;
  const { r, z } = plane.nodes;
  const n = ids.length;
  const hits = new Set<number>();
  for (let i = 0; i < (chain.closed ? n : n - 1); i++) {
    const j = (i + 1) % n;
    const [ar, az] = frontPoint(plane, plan, i);
    const [br, bz] = frontPoint(plane, plan, j);
    const er = r[ids[j]] - r[ids[i]];
    const ez = z[ids[j]] - z[ids[i]];
    const forward = (br - ar) * er + (bz - az) * ez;
    const long = Math.hypot(er, ez);
    const lift = (pr: number, pz: number): number => (er * (pz - z[ids[i]]) - ez * (pr - r[ids[i]])) / long;
    const low = Math.min(lift(ar, az) / thickness[i], lift(br, bz) / thickness[j]);
    if (forward < 0.2 * long * long || low < 0.1) hits.add(i).add(j);
  }
  return hits;
}

function frontPoint(plane: Plane, plan: Plan, j: number): [number, number] {
  const { r, z } = plane.nodes;
  return [r[plan.ids[j]] + plan.dr[j] * plan.thickness[j], z[plan.ids[j]] + plan.dz[j] * plan.thickness[j]];
}

interface Piece {
  readonly plan: number;
  readonly i: number;
  readonly j: number;
  readonly p: readonly [number, number];
  readonly q: readonly [number, number];
}

/** Adds to `hits` the nodes of front pieces that cross another piece of a front or of the region's boundary. */
function markMeetings(
  plane: Plane,
  plans: readonly Plan[],
  segments: readonly Segment[],
  hits: readonly Set<number>[],
): void {
  const pieces: Piece[] = plans.flatMap((plan, k) => {
    const n = plan.ids.length;
    const count = plan.chain.closed ? n : n - 1;
    return Array.from({ length: count }, (_, i) => {
      const j = (i + 1) % n;
      return { plan: k, i, j, p: frontPoint(plane, plan, i), q: frontPoint(plane, plan, j) };
    });
  });
  const { r, z } = plane.nodes;
  pieces.forEach((a, index) => {
    for (let next = index + 1; next < pieces.length; next++) {
      const b = pieces[next];
      const neighbours = a.plan === b.plan && (a.i === b.j || a.j === b.i);
      if (neighbours || !crosses(a.p, a.q, b.p, b.q)) continue;
      hits[a.plan].add(a.i).add(a.j);
      hits[b.plan].add(b.i).add(b.j);
    }
    for (const s of segments) {
      const edge = plane.sides[s.side].kind === "edge";
      const touches = edge && (a.p[0] === 0 || a.q[0] === 0 || a.p[1] === 0 || a.q[1] === 0);
      if (touches || !crosses(a.p, a.q, [r[s.p], z[s.p]], [r[s.q], z[s.q]])) continue;
      hits[a.plan].add(a.i).add(a.j);
    }
  });
}

type At = readonly [number, number];

function crosses(a: At, b: At, c: At, d: At): boolean {
  if (Math.max(a[0], b[0]) < Math.min(c[0], d[0]) || Math.max(c[0], d[0]) < Math.min(a[0], b[0]))
    return false;
  if (Math.max(a[1], b[1]) < Math.min(c[1], d[1]) || Math.max(c[1], d[1]) < Math.min(a[1], b[1]))
    return false;
  const side = (p: At, q: At, o: At): number => (q[0] - p[0]) * (o[1] - p[1]) - (q[1] - p[1]) * (o[0] - p[0]);
  return side(a, b, c) * side(a, b, d) <= 0 && side(c, d, a) * side(c, d, b) <= 0;
}

/** A place and the cell length wanted there. */
export type Demand = readonly [r: number, z: number, size: number];

/**
 * Where layers end before the current has died out although there is room behind them (short sides, sharp corners, jagged
 * outlines), the filling must go on with the skin's resolution: cells there as the next layer would have been.
 */
export function unfinishedDepths(
  plane: Plane,
  plan: Plan,
  full: number,
  next: (thickness: number) => number,
): Demand[] {
  const { r, z } = plane.nodes;
  const out: Demand[] = [];
  plan.ids.forEach((id, j) => {
    const T = plan.thickness[j];
    if (T > 0.97 * full) return;
    const size = next(T);
    const behind = plan.clear[j] - 2 * T;
    if (behind > 3 * size) out.push([r[id], z[id], size]);
  });
  return out;
}
