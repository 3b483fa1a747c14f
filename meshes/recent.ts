/** The last few meshes: another drive, or a material of the same skin depth, needs the same again. A memo of a pure function. */
import type { PatchMesh } from "../solver/index.ts";

const MOST = 3;
const kept = new Map<string, PatchMesh>();

/** The mesh that `make` makes of what `input` says in full. */
export function recentMesh(input: unknown, make: () => PatchMesh): PatchMesh {
  const key = JSON.stringify(input);
  const mesh = kept.get(key) ?? make();
  kept.delete(key);
  kept.set(key, mesh);
  const [oldest] = kept.keys();
  if (kept.size > MOST && oldest !== undefined) kept.delete(oldest);
  return mesh;
}
