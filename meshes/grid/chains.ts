/**
 * The surfaces of one region as chains of nodes, each with the direction in which its layers grow: the mitre at corners, the
 * normal along straight sides with the mitre's tangential part fading out, the radius on arcs, along the edge at the domain's edge.
 */
import { type Side, sideDirection } from "./shape.ts";
import type { Plane } from "./sides.ts";

/** Longest mitre, in thicknesses. */
const LONGEST_MITRE = 2.5;

export interface Use {
  readonly index: number;
  readonly forward: boolean;
}

export interface Chain {
  readonly uses: readonly Use[];
  readonly closed: boolean;
  readonly before: Use | null;
  readonly after: Use | null;
}

export interface Plan {
  readonly chain: Chain;
  /** Nodes in order; a closed chain does not repeat its first. */
  readonly ids: number[];
  /** Unit displacement of each node. */
  readonly dr: Float64Array;
  readonly dz: Float64Array;
  readonly thickness: Float64Array;
  /** Clear way along the displacement to the next boundary of the region. */
  readonly clear: Float64Array;
  /** Thickest the layers may be anywhere along the chain. */
  readonly room: number;
  /** Use (index in chain.uses) of the interval that starts at each node. */
  readonly useOf: Int32Array;
}

const startOf = (sides: readonly Side[], u: Use): number => (u.forward ? sides[u.index].a : sides[u.index].b);
const endOf = (sides: readonly Side[], u: Use): number => (u.forward ? sides[u.index].b : sides[u.index].a);

/** Runs of surface sides with the region on their left, broken at the domain's edges. */
export function findChains(sides: readonly Side[], uses: readonly Use[]): Chain[] {
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

/** Direction of travel along a use, at its start or end. */
export function travel(plane: Plane, u: Use, atEnd: boolean): [number, number] {
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

/** Tangential share (cot) at the start and the end of every use of the chain. */
export function cornerCots(plane: Plane, chain: Chain): { start: number[]; end: number[] } {
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
export function setDisplacements(plane: Plane, plan: Plan): void {
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
