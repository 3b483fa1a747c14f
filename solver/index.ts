/** The solver's public surface: other folders import only this. */
export { MU0 } from "./constants.ts";
export { countNodes, cutGrid } from "./grid/cut.ts";
export { type ArcOfEdge, makePatchMesh, tensorPatches } from "./grid/patches.ts";
export { type MaterialState, materialAt, materialIds, materials } from "./materials/catalogue.ts";
export type { Cited, LinearResistivity, MaterialRecord, ResistivityLaw } from "./materials/laws.ts";
export type {
  Circuit,
  Complex,
  ComplexVector,
  Exterior,
  Grid,
  PatchMesh,
  RegionMaterial,
} from "./types.ts";
