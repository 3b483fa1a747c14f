/** The wire form of the library of materials: laws with a citation per number, °C at this edge. */
import * as z from "zod";

const CitedSchema = z.object({ value: z.number(), source: z.string() });

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

const MaterialSchema = z.object({
  id: z.string(),
  description: z.string(),
  /** null: does not conduct. */
  resistivity: LinearResistivitySchema.nullable(),
  relativePermeability: CitedSchema,
  /** Where its laws hold, and why no further. */
  range: z.object({ fromC: z.number(), toC: z.number(), why: z.string() }),
});

/** Answer of `GET /v1/materials`. */
export const MaterialListSchema = z.object({ materials: z.array(MaterialSchema) });

export type MaterialList = z.infer<typeof MaterialListSchema>;
