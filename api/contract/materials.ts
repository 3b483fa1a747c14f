/** The wire form of the library of materials: laws with a citation per number, °C at this edge. */
import * as z from "zod";

const CitedSchema = z.object({
  value: z.number(),
  source: z.string(),
  /** Relative spread to expect; there exactly when the number is from memory. */
  spread: z.number().optional(),
});

/** ρ(T) = ρ_ref · [1 + α (T − T_ref)]. */
const LinearResistivitySchema = z.object({
  law: z.literal("linear"),
  /** ρ_ref. */
  atReferenceOhmM: CitedSchema,
  /** T_ref. */
  referenceC: CitedSchema,
  /** α at T_ref. */
  perKelvin: CitedSchema,
});

/** Rows of rising temperature, straight in between; values in the unit the key above or `rows…` names. */
const RowsSchema = z.array(CitedSchema.extend({ atC: z.number() }));

const TableSchema = z.object({ law: z.literal("table"), rows: RowsSchema });

const MagnetismSchema = z.object({
  /** From here up it is as air. A spread is relative to kelvin. */
  curieC: CitedSchema,
  /** Saturation polarisation at 20 °C. */
  saturationT: CitedSchema,
  /** How µr − 1 and Bs fall towards the Curie point. */
  falls: z.discriminatedUnion("law", [
    /** Both as m(t) = [1 − s t^1.5 − (1 − s) t^p]^(1/3), t = T/T_C in kelvin, from their values at `referenceC`. */
    z.object({ law: z.literal("magnetisation"), referenceC: z.number(), s: CitedSchema, p: CitedSchema }),
    z.object({ law: z.literal("tables"), rowsPermeability: RowsSchema, rowsSaturationT: RowsSchema }),
  ]),
});

/** Recorded, not yet computed with; a single number stands at 20 °C (a melt: where it melts). */
const ThermalSchema = z.object({
  densityKgPerM3: CitedSchema.optional(),
  specificHeatJPerKgK: z.union([CitedSchema, TableSchema]).optional(),
  conductivityWPerMK: z.union([CitedSchema, TableSchema]).optional(),
  emissivity: CitedSchema.optional(),
});

const MaterialSchema = z.object({
  id: z.string(),
  description: z.string(),
  kind: z.enum(["metal", "melt", "nonmetal", "core"]),
  /** What it may be in a design. */
  roles: z.array(z.enum(["conductor", "part", "guide"])),
  /** null: does not conduct. */
  resistivity: z
    .discriminatedUnion("law", [
      LinearResistivitySchema,
      z.object({ law: z.literal("table"), rowsOhmM: RowsSchema }),
    ])
    .nullable(),
  /** At low field; of what is magnetic, at 20 °C. */
  relativePermeability: CitedSchema,
  magnetism: MagnetismSchema.optional(),
  /** Of a core at low field. */
  lossTangent: CitedSchema.optional(),
  thermal: ThermalSchema,
  /** Where its laws hold, and why no further. */
  range: z.object({ fromC: z.number(), toC: z.number(), why: z.string() }),
});

/** Answer of `GET /v1/materials`. */
export const MaterialListSchema = z.object({ materials: z.array(MaterialSchema) });

export type MaterialList = z.infer<typeof MaterialListSchema>;
