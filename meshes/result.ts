/**
 * THE schema of the result document and its inferred types. Millimetres where a key says so, else SI; rms.
 * `null` stands for what has no meaning in the design at hand: `loaded` without a part, `leads` where the design has none,
 * side and bore shares of what is no cylinder, skin depths and the depth shares of what does not conduct.
 */
import * as z from "zod";
import { DesignSchema } from "./design.ts";

const finite = z.number();
const nonNegative = z.number().min(0);

/** A computed scalar: the truth of the stated model lies within value ± plusMinus. */
const UncertainSchema = z.strictObject({ value: finite, plusMinus: nonNegative });

/** The coil's terminal values in one state (leads included); reactance and q at the drive's frequency. */
const TerminalSchema = z.strictObject({
  resistanceOhm: UncertainSchema,
  inductanceH: UncertainSchema,
  reactanceOhm: UncertainSchema,
  q: UncertainSchema,
});

/** Powers and drive in the loaded state (the empty one when there is no part). */
const PowerSchema = z.strictObject({
  totalW: UncertainSchema,
  /** Copper of the coil and of its leads. */
  coilW: UncertainSchema,
  heatedW: UncertainSchema,
  /** Parts that are not to be heated, and guides. */
  otherW: UncertainSchema,
  /** heatedW / totalW; 0 when nothing is heated. */
  efficiency: UncertainSchema,
  currentA: UncertainSchema,
  /** Leads included. */
  coilVoltageV: UncertainSchema,
  /** I²X. */
  reactiveVar: UncertainSchema,
  /** 1/(ωX). */
  resonantCapacitanceF: UncertainSchema,
});

const TurnResultSchema = z.strictObject({ rMm: finite, zMm: finite, powerW: finite });

/** Share of a part's power within a depth of its nearest surface. */
const DepthShareSchema = z.strictObject({ depthMm: nonNegative, share: finite });

const pointMm = z.tuple([finite, finite]);
const depthShares = z.array(DepthShareSchema);

const PartResultSchema = z.strictObject({
  name: z.string(),
  powerW: UncertainSchema,
  /** null when it does not conduct; its surface's value when it saturates. */
  skinDepthMm: nonNegative.nullable(),
  /** Power over its whole surface, bore and ends counted. */
  surfaceWPerM2: UncertainSchema,
  /** Tangential field, rms over the same surface. */
  surfaceHAPerM: UncertainSchema,
  /** The density not exceeded in 99.9 % of its volume. */
  peakWPerM3: UncertainSchema,
  /** Where that density is, [r, z]; null where no heat arises. */
  hotSpotMm: pointMm.nullable(),
  /** Shares in eight slices of equal height, bottom to top; all 0 where no heat arises. */
  sliceShares: z.array(finite).length(8),
  /** Within 0.5, 1 and 2 skin depths of the nearest surface; null when it does not conduct. */
  depthShares: depthShares.nullable(),
  /** The same from the outer side alone: cylinders only. */
  sideDepthShares: depthShares.nullable(),
  /** The same from the bore alone: cylinders with a bore only. */
  boreDepthShares: depthShares.nullable(),
});

const StrayFieldSchema = z.strictObject({ rMm: finite, zMm: finite, fluxDensityT: UncertainSchema });

/** The pair of leads, skin and proximity effect included; already inside empty, loaded and coilW. */
const LeadsResultSchema = z.strictObject({ resistanceOhm: nonNegative, inductanceH: nonNegative });

/** For cutting the copper; the helix's surplus over closed rings is added to nothing else. */
const CopperSchema = z.strictObject({
  lengthMm: nonNegative,
  helixExtraOhm: finite,
  helixExtraH: finite,
});

const NumericsSchema = z.strictObject({
  /** Of the finest grid. */
  unknowns: nonNegative,
  grids: nonNegative,
  iterations: nonNegative,
  /** Wall time from parsed document to result. */
  seconds: nonNegative,
  /** The process's maximum resident set. */
  peakMemoryBytes: nonNegative,
  /** |Re(V·I*) − Σ losses| / Re(V·I*), before leads. */
  powerBalance: nonNegative,
  accuracyMet: z.boolean(),
});

export const ResultSchema = z.strictObject({
  /** The design as solved, defaults filled in. */
  design: DesignSchema,
  /** All parts taken out, guides kept. */
  empty: TerminalSchema,
  /** null when there is no part. */
  loaded: TerminalSchema.nullable(),
  power: PowerSchema,
  /** In the winding's order. */
  turns: z.array(TurnResultSchema),
  parts: z.array(PartResultSchema),
  strayField: z.array(StrayFieldSchema),
  /** null when the design has no leads. */
  leads: LeadsResultSchema.nullable(),
  copper: CopperSchema,
  numerics: NumericsSchema,
  cautions: z.array(z.string()),
});

export type Uncertain = z.infer<typeof UncertainSchema>;
export type Terminal = z.infer<typeof TerminalSchema>;
export type Power = z.infer<typeof PowerSchema>;
export type TurnResult = z.infer<typeof TurnResultSchema>;
export type DepthShare = z.infer<typeof DepthShareSchema>;
export type PartResult = z.infer<typeof PartResultSchema>;
export type StrayField = z.infer<typeof StrayFieldSchema>;
export type LeadsResult = z.infer<typeof LeadsResultSchema>;
export type Copper = z.infer<typeof CopperSchema>;
export type Numerics = z.infer<typeof NumericsSchema>;
/** The result document. */
export type Result = z.infer<typeof ResultSchema>;
