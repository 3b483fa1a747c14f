/** Schemas of materials in the design document: a library id, or an inline material. */
import * as z from "zod";
import { MU0, materialIdsFor, materials, type Role } from "../solver/index.ts";
import { celsiusFromKelvin } from "./units.ts";

/** Fault inside a schema: words, where, and what would do. */
export function fault(
  context: z.core.$RefinementCtx,
  path: (string | number)[],
  message: string,
  accepted?: string,
): void {
  context.addIssue({ code: "custom", path, message, params: { accepted } });
}

const resistivityOhmM = z.number().min(1e-9).max(1e3);
const relativePermeability = z.number().min(1e-3).max(1e6).optional();
const saturationT = z.number().min(0.01).max(5).optional();
const curve = z
  .array(z.tuple([z.number().min(0).max(1e8), z.number().min(0).max(200)]))
  .min(2)
  .max(2000)
  .optional();

interface Magnetic {
  readonly relativePermeability?: number | undefined;
  readonly saturationT?: number | undefined;
  readonly curve?: readonly (readonly [number, number])[] | undefined;
}

/** Curves must start at the origin and rise throughout, never flatter than air (0.9 µ0 leaves room for printed digits). */
function checkCurve(points: readonly (readonly [number, number])[], context: z.core.$RefinementCtx): void {
  const [h0, b0] = points[0] ?? [0, 0];
  if (h0 !== 0 || b0 !== 0) fault(context, ["curve", 0], "the curve does not start at [0, 0]", "[0, 0]");
  for (let i = 1; i < points.length; i++) {
    const [h, b] = points[i]!;
    const [hBefore, bBefore] = points[i - 1]!;
    const slope = (b - bBefore) / (h - hBefore);
    if (!(h > hBefore && b > bBefore)) {
      fault(context, ["curve", i], `the curve does not rise from point ${i - 1} to point ${i}`);
    } else if (slope < 0.9 * MU0) {
      fault(context, ["curve", i], `the curve rises less steeply than that of air up to point ${i}`);
    } else if (slope > 1e6 * MU0) {
      fault(context, ["curve", i], `the curve rises more than a million times as steeply as that of air`);
    }
  }
}

function checkMagnetic(m: Magnetic, context: z.core.$RefinementCtx): void {
  if (m.curve !== undefined) checkCurve(m.curve, context);
  if (m.saturationT === undefined) return;
  if (m.curve !== undefined) {
    fault(
      context,
      ["saturationT"],
      "saturationT and curve both say how the material saturates; give one of them",
    );
  } else if (!((m.relativePermeability ?? 1) > 1)) {
    fault(
      context,
      ["relativePermeability"],
      "a material that saturates must be magnetic before: its relativePermeability has to be above 1",
      "above 1",
    );
  }
}

/** Fills in relativePermeability 1, except beside a curve, whose foot says it. */
function completed<M extends Magnetic>(m: M): M {
  if (m.relativePermeability !== undefined || m.curve !== undefined) return m;
  return { ...m, relativePermeability: 1 };
}

const magnetic = { relativePermeability, saturationT, curve };
const libraryId = (role: Role) => z.enum(materialIdsFor(role) as [string, ...string[]]);

/** The ids a document may name in a role, each with its name in words, for those who offer a choice of them. */
export const libraryChoices = (role: Role): (readonly [id: string, name: string])[] =>
  materialIdsFor(role).map((id) => [id, materials.get(id)?.description.split(",")[0] ?? id]);

/** The conductor's inline material has to conduct. */
const inlineConductor = z.strictObject({ resistivityOhmM, ...magnetic });
const inlinePart = z.strictObject({ resistivityOhmM: resistivityOhmM.nullable().default(null), ...magnetic });
/**
 * A guide may carry a resistivity: it then is solved with the eddy currents of a solid body. It stays a guide: kept in the
 * empty state, its heat never wanted.
 */
const inlineGuide = inlinePart.extend({ lossTangent: z.number().min(0).max(10).default(0) });

export const ConductorMaterialSchema = z.union([
  libraryId("conductor"),
  inlineConductor.superRefine(checkMagnetic).overwrite(completed),
]);
export const PartMaterialSchema = z.union([
  libraryId("part"),
  inlinePart.superRefine(checkMagnetic).overwrite(completed),
]);
export const GuideMaterialSchema = z.union([
  libraryId("guide"),
  inlineGuide.superRefine(checkMagnetic).overwrite(completed),
]);

/** Any material of a completed design. */
export type Material =
  | z.infer<typeof ConductorMaterialSchema>
  | z.infer<typeof PartMaterialSchema>
  | z.infer<typeof GuideMaterialSchema>;

/** A temperature in the document, °C; inline materials are taken as given at any. */
export const temperatureC = z.number().min(-273.15).max(4000).default(20);

/** Library materials are known over a range of temperatures only. */
export function checkTemperature(
  item: { readonly material: unknown; readonly temperatureC: number },
  context: z.core.$RefinementCtx,
): void {
  const record = typeof item.material === "string" ? materials.get(item.material) : undefined;
  if (record === undefined) return;
  const from = Math.round(celsiusFromKelvin(record.range.fromKelvin) * 10) / 10;
  const to = Math.round(celsiusFromKelvin(record.range.toKelvin) * 10) / 10;
  if (item.temperatureC >= from && item.temperatureC <= to) return;
  fault(
    context,
    ["temperatureC"],
    `${record.id} of the library is known from ${from} to ${to} °C, not at ${item.temperatureC} °C`,
    `${from} to ${to}, or an inline material with the resistivity it has there`,
  );
}
