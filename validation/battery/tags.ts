/** The words a design counts under in the table of what the battery covers: its own, and those its numbers say. */
import { skinDepth } from "../../meshes/build.ts";
import type { Checked } from "../../meshes/check.ts";
import type { Body, Scene } from "../../meshes/scene.ts";
import type { Entry } from "./designs/index.ts";

type Bands = readonly (readonly [below: number, word: string])[];

const FREQUENCY: Bands = [
  [100, "50 Hz"],
  [3000, "0.1 … 3 kHz"],
  [30_000, "3 … 30 kHz"],
  [200_000, "30 … 200 kHz"],
  [Infinity, "200 … 450 kHz"],
];
const COPPER: Bands = [
  [1, "d/δ below 1"],
  [3, "d/δ 1 … 3"],
  [10, "d/δ 3 … 10"],
  [30, "d/δ 10 … 30"],
  [Infinity, "d/δ 30 … 64"],
];
const PERMEABILITY: Bands = [
  [1.0001, "part µr 1"],
  [20, "part µr up to 20"],
  [101, "part µr 20 … 100"],
  [301, "part µr 100 … 300"],
  [Infinity, "part µr 1000"],
];
/** Skin depth of a part over its smaller extent. */
const DEPTH: Bands = [
  [0.01, "part δ below 1 % of it"],
  [0.1, "part δ 1 … 10 % of it"],
  [1, "part δ 10 … 100 % of it"],
  [Infinity, "part δ beyond it"],
];

const band = (bands: Bands, x: number): string => bands.find(([below]) => x < below)?.[1] ?? "";

/** All words of a design, each once. */
export function tagsOf(entry: Entry, { design, scene }: Checked): string[] {
  const { winding, conductor, strands } = design.coil;
  const { frequencyHz, ...drive } = design.drive;
  const sense = winding.form === "rings" ? (winding.sense ?? []) : [];
  const guides = design.guides.map((g) =>
    typeof g.material === "object" && g.material.lossTangent > 0 ? "guide with loss" : "guide without loss",
  );
  return [
    ...new Set([
      winding.form,
      conductor.section,
      `drive ${Object.keys(drive)[0]}`,
      band(FREQUENCY, frequencyHz),
      band(COPPER, sizeOf(scene) / skinDepth(scene.conductor, scene.frequency)),
      ...scene.bodies.filter((b) => b.role === "part").flatMap((b) => partTags(b, scene.frequency)),
      ...design.parts.map((p) => p.shape),
      ...design.parts.flatMap((p) => (p.shape === "cylinder" && p.boreDiameterMm > 0 ? ["hollow"] : [])),
      ...(design.parts.length === 0 ? ["no part"] : []),
      ...guides,
      ...(sense.includes(-1) ? ["counter-wound"] : []),
      ...(strands === undefined ? [] : ["parallel strands"]),
      ...(design.coil.leads === undefined ? [] : ["leads"]),
      ...(design.strayPointsMm.length === 0 ? [] : ["stray points"]),
      ...entry.tags.filter((t) => t !== "ci"),
    ]),
  ];
}

const sizeOf = ({ section }: Scene): number =>
  section.kind === "round" ? 2 * section.radius : Math.min(section.width, section.height);

function partTags(body: Body, frequency: number): string[] {
  const depth = skinDepth(body.material, frequency);
  const thinnest = Math.min(
    ...body.pieces.map((p) => (p.kind === "sphere" ? 2 * p.radius : extent(p.points))),
  );
  return [band(PERMEABILITY, body.material.relativePermeability), band(DEPTH, depth / thinnest)];
}

/** The lesser of a polygon's radial (solid: across the axis) and axial extents. */
function extent(points: readonly (readonly [number, number])[]): number {
  const [rs, zs] = [points.map((p) => p[0]), points.map((p) => p[1])];
  const inner = Math.min(...rs);
  const wide = Math.max(...rs) - (inner > 0 ? inner : -Math.max(...rs));
  return Math.min(wide, Math.max(...zs) - Math.min(...zs));
}
