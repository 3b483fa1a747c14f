/** The solver's public surface: other folders import only this. */
export { MU0 } from "./constants.ts";
export { type CellSamples, heatSampler } from "./field/density.ts";
export { makeProbe, type PointField } from "./field/evaluate.ts";
export { isFoldable, prepareFolded, prepareHalf } from "./field/fold.ts";
export type { CellIntegrals } from "./field/integrals.ts";
export { makeLocator, type Place } from "./field/locate.ts";
export { type Losses, lossesOf, powerBalance } from "./field/losses.ts";
export { type HotSpot, quantileDensity, sharesBelow, sliceShares } from "./field/observe.ts";
export {
  type CoilSolution,
  type Folded,
  type Prepared,
  prepare,
  type Solution,
  type Tick,
} from "./field/prepare.ts";
export { fieldOfRings, type RingSources, ringSources } from "./field/rings.ts";
export { solveState } from "./field/solve.ts";
export { type Linkage, solveApplied, solvePrescribed, type Winding } from "./field/sources.ts";
export { type SurfaceField, surfaceField } from "./field/surface.ts";
export { elementValues, type FieldState } from "./field/system.ts";
export { countNodes, cutGrid } from "./grid/cut.ts";
export { type ArcOfEdge, makePatchMesh, tensorPatches } from "./grid/patches.ts";
export {
  type Analysis,
  analyse,
  type ElementStructure,
  type ElementValues,
  factorise,
  solve,
} from "./linear/direct.ts";
export {
  type MaterialState,
  materialAt,
  materialIdsFor,
  materials,
  type Role,
} from "./materials/catalogue.ts";
export type {
  Cited,
  LinearResistivity,
  Magnetism,
  MaterialRecord,
  ResistivityLaw,
  Row,
  Table,
  Thermal,
} from "./materials/laws.ts";
export { type Fall, type GridAnswer, type Kin, type Refined, refine, remaining } from "./refine.ts";
export type {
  Circuit,
  Complex,
  ComplexVector,
  Exterior,
  Grid,
  PatchMesh,
  RegionMaterial,
} from "./types.ts";
