/**
 * Grids made ready, kept for the next design that needs the same: another drive or circuit, or a material of the same skin depth, leaves
 * the grid as it is. A memo of pure functions, so that no digit depends on what was solved before. Bounded: they go
 * with their mesh (recent.ts keeps the last few), and only grids of moderate size are kept.
 */
import {
  cutGrid,
  type Folded,
  isFoldable,
  type PatchMesh,
  type Prepared,
  prepare,
  prepareHalf,
  type Tick,
} from "../solver/index.ts";
import type { Built } from "./build.ts";
import type { Scene } from "./scene.ts";

/** Nodes of the largest grid kept; half a kilobyte a node. */
const MOST_NODES = 60_000;

/** What is kept of one mesh, by level. */
type Kept = Map<number, { whole?: Prepared; folded?: Folded }>;
const keptOf = new WeakMap<PatchMesh, Kept>();

/** Level n of a built scene, made ready for its states. */
export function readyAt(scene: Scene, built: Built, level: number, tick: Tick): Prepared | Folded {
  const states = (["empty", "loaded"] as const).map(built.materials);
  const turnOfRegion = (states[0] ?? []).map((m) => m.turn);
  const levels: Kept = keptOf.get(built.mesh) ?? new Map();
  keptOf.set(built.mesh, levels);
  const kept = levels.get(level) ?? {};
  const grid = (kept.whole ?? kept.folded)?.grid ?? cutGrid(built.mesh, level);
  if (grid.r.length <= MOST_NODES) levels.set(level, kept);
  if (isFoldable(grid, states, scene.circuit)) {
    kept.folded ??= prepareHalf(grid, turnOfRegion, tick);
    return kept.folded;
  }
  kept.whole ??= prepare(grid, turnOfRegion, tick);
  return kept.whole;
}
