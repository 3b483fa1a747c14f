/**
 * THE schema of the design document and its inferred types. Millimetres and degrees Celsius where a key says so, else SI; rms.
 * Every object is strict, so an unknown key is a fault; `z.infer` gives the completed document, defaults filled in.
 * What the schema cannot know (copper that touches, parts that overlap) is checked in check.ts.
 */
import * as z from "zod";
import { materials } from "../solver/index.ts";
import { leastSpacing } from "./leads.ts";
import {
  ConductorMaterialSchema,
  checkTemperature,
  fault,
  GuideMaterialSchema,
  PartMaterialSchema,
  temperatureC,
} from "./materials.ts";

/** Limits of what is taken at all. */
export const limits = {
  smallestMm: 1e-4,
  largestMm: 20_000,
  turns: 1000,
  bodies: 100,
  outlinePoints: 2000,
  stackCount: 500,
  strayPoints: 1000,
} as const;

const lengthMm = z.number().min(limits.smallestMm).max(limits.largestMm);
const boreMm = z.number().min(0).max(limits.largestMm).default(0);
const positionMm = z.number().min(-limits.largestMm).max(limits.largestMm);
const centreZMm = positionMm.default(0);
const pointMm = z.tuple([z.number().min(0).max(limits.largestMm), positionMm]);
const count = z.int().min(1).max(limits.turns);
/** One pitch for all, or one for each step from a turn to the next; may be left out where there is no second turn. */
const pitchMm = z.union([lengthMm, z.array(lengthMm).max(limits.turns - 1)]).optional();

// Conductor

const conductorFields = { material: ConductorMaterialSchema, temperatureC };
const round = { outsideDiameterMm: lengthMm };
const rect = { radialWidthMm: lengthMm, axialHeightMm: lengthMm };

/** A wall of half the section or more leaves no bore; a bore below a thousandth of the section is none either. */
function checkWall(side: number, wallMm: number, bar: string, context: z.core.$RefinementCtx): void {
  const half = side / 2;
  if (wallMm <= half * 0.999) return;
  const why =
    wallMm > half ? `is thicker than half the section, ${half} mm` : "leaves no bore worth the name";
  fault(
    context,
    ["wallMm"],
    `a wall of ${wallMm} mm ${why}`,
    `below ${half}, or section ${bar} for solid copper`,
  );
}

const roundTube = z
  .strictObject({ section: z.literal("roundTube"), ...round, wallMm: lengthMm, ...conductorFields })
  .superRefine((c, context) => checkWall(c.outsideDiameterMm, c.wallMm, "roundBar", context));
const rectTube = z
  .strictObject({ section: z.literal("rectTube"), ...rect, wallMm: lengthMm, ...conductorFields })
  .superRefine((c, context) =>
    checkWall(Math.min(c.radialWidthMm, c.axialHeightMm), c.wallMm, "rectBar", context),
  );
const roundBar = z.strictObject({ section: z.literal("roundBar"), ...round, ...conductorFields });
const rectBar = z.strictObject({ section: z.literal("rectBar"), ...rect, ...conductorFields });

export const ConductorSchema = z.discriminatedUnion("section", [
  roundTube.superRefine(checkTemperature),
  roundBar.superRefine(checkTemperature),
  rectTube.superRefine(checkTemperature),
  rectBar.superRefine(checkTemperature),
]);

// Winding

/** Rules that join several keys run also where one of them is out of bounds by itself, which is told already. */
const countable = (n: number): boolean => Number.isInteger(n) && n >= 1 && n <= limits.turns;

/** A pitch is wanted wherever there is a step, and a list has one entry a step. */
function checkPitch(
  pitch: number | readonly number[] | undefined,
  steps: number,
  key: string,
  context: z.core.$RefinementCtx,
): void {
  if (!countable(steps + 1)) return;
  if (pitch === undefined && steps > 0) {
    fault(context, [key], `${key} is missing`, "one number of mm, centre to centre");
  } else if (Array.isArray(pitch) && pitch.length !== steps) {
    const detail = `${key} lists ${pitch.length} pitches, but ${steps + 1} turns have ${steps} steps between them`;
    fault(context, [key], detail, `${steps} numbers, or one number for all`);
  }
}

const axialSteps = (
  w: { pitchMm?: number | number[] | undefined; turns: number },
  c: z.core.$RefinementCtx,
) => checkPitch(w.pitchMm, w.turns - 1, "pitchMm", c);

const helix = z
  .strictObject({ form: z.literal("helix"), boreDiameterMm: lengthMm, turns: count, pitchMm, centreZMm })
  .superRefine(axialSteps);
const spiral = z
  .strictObject({
    form: z.literal("spiral"),
    innerDiameterMm: lengthMm,
    turns: count,
    pitchMm,
    zMm: centreZMm,
  })
  .superRefine(axialSteps);
const cone = z
  .strictObject({
    form: z.literal("cone"),
    boreDiameterMm: lengthMm,
    topBoreDiameterMm: lengthMm,
    turns: count,
    pitchMm,
    centreZMm,
  })
  .superRefine((w, context) => {
    axialSteps(w, context);
    if (w.turns > 1 || w.topBoreDiameterMm === w.boreDiameterMm) return;
    const detail = "a single turn has one bore, but topBoreDiameterMm differs from boreDiameterMm";
    fault(context, ["topBoreDiameterMm"], detail, `${w.boreDiameterMm}, or two turns and more`);
  });
const layers = z
  .strictObject({
    form: z.literal("layers"),
    boreDiameterMm: lengthMm,
    turnsPerLayer: count,
    layers: count,
    pitchMm,
    layerPitchMm: lengthMm.optional(),
    centreZMm,
  })
  .superRefine((w, context) => {
    checkPitch(w.pitchMm, w.turnsPerLayer - 1, "pitchMm", context);
    checkPitch(w.layerPitchMm, w.layers - 1, "layerPitchMm", context);
    const total = w.layers * w.turnsPerLayer;
    if (total <= limits.turns || !countable(w.layers) || !countable(w.turnsPerLayer)) return;
    const detail = `${w.layers} layers of ${w.turnsPerLayer} turns are ${total} turns; at most ${limits.turns} are solved`;
    fault(context, ["layers"], detail, `at most ${Math.floor(limits.turns / w.turnsPerLayer)}`);
  });
const rings = z
  .strictObject({
    form: z.literal("rings"),
    centresMm: z.array(pointMm).min(1).max(limits.turns),
    sense: z
      .array(z.literal([1, -1]))
      .max(limits.turns)
      .optional(),
  })
  .superRefine((w, context) => {
    if (w.sense === undefined || w.sense.length === w.centresMm.length) return;
    const detail = `sense has ${w.sense.length} entries for ${w.centresMm.length} rings`;
    fault(context, ["sense"], detail, `${w.centresMm.length} entries, each 1 or -1`);
  });

export const WindingSchema = z.discriminatedUnion("form", [helix, spiral, layers, cone, rings]);

/** Number of turns of a winding. */
export function turnCount(w: Winding): number {
  if (w.form === "layers") return w.layers * w.turnsPerLayer;
  return w.form === "rings" ? w.centresMm.length : w.turns;
}

// Coil

const LeadsSchema = z.strictObject({ lengthMm, spacingMm: lengthMm });

function strandFault(turn: number, turns: number, before: number | undefined): string | undefined {
  if (turn >= turns) return `there is no turn ${turn}: turns are counted from 0 to ${turns - 1}`;
  if (before === undefined) return undefined;
  return `turn ${turn} is in strand ${before} already; each turn belongs to one strand`;
}

/** Each turn in exactly one strand; a document beyond help is not told every fault. */
function checkStrands(
  strands: readonly (readonly number[])[],
  turns: number,
  context: z.core.$RefinementCtx,
): void {
  if (!countable(turns)) return;
  const seenIn = new Map<number, number>();
  let told = 0;
  for (const [s, strand] of strands.entries()) {
    for (const [i, turn] of strand.entries()) {
      const detail = strandFault(turn, turns, seenIn.get(turn));
      if (detail === undefined) seenIn.set(turn, s);
      else fault(context, ["strands", s, i], detail, `each of 0 to ${turns - 1} once`);
      if (detail !== undefined && ++told === 50) return;
    }
  }
  const missing = Array.from({ length: turns }, (_, k) => k).filter((k) => !seenIn.has(k));
  if (missing.length === 0) return;
  const shown = missing.slice(0, 12).join(", ") + (missing.length > 12 ? ", …" : "");
  const detail = `${missing.length === 1 ? "turn" : "turns"} ${shown} (counted from 0) ${missing.length === 1 ? "is" : "are"} in no strand`;
  fault(context, ["strands"], detail, "every turn once");
}

/** Leads lie one above the other, so that a rectangular section counts by its axial height. */
function checkLeads(
  spacingMm: number,
  c: z.infer<typeof ConductorSchema>,
  context: z.core.$RefinementCtx,
): void {
  const [along, radial] =
    "outsideDiameterMm" in c
      ? [c.outsideDiameterMm, c.outsideDiameterMm]
      : [c.axialHeightMm, c.radialWidthMm];
  const least = leastSpacing({ along, across: Math.max(along, radial) });
  if (spacingMm >= least) return;
  const side = `the conductor is ${along} mm ${along === radial ? "wide" : "high, and the leads lie one above the other"}`;
  const detail =
    spacingMm > along
      ? `leads ${spacingMm} mm apart, centre to centre, leave too fine a gap to resolve: ${side}`
      : `leads ${spacingMm} mm apart, centre to centre, touch: ${side}`;
  fault(context, ["leads", "spacingMm"], detail, `at least ${Number((least * 1.0005).toPrecision(4))}`);
}

const CoilSchema = z
  .strictObject({
    conductor: ConductorSchema,
    winding: WindingSchema,
    strands: z
      .array(z.array(z.int().min(0).max(limits.turns)).min(1).max(limits.turns))
      .min(1)
      .max(limits.turns)
      .optional(),
    leads: LeadsSchema.optional(),
  })
  .superRefine((coil, context) => {
    if (coil.strands !== undefined) checkStrands(coil.strands, turnCount(coil.winding), context);
    if (coil.leads !== undefined) checkLeads(coil.leads.spacingMm, coil.conductor, context);
  });

// Parts and guides

const cylinderFields = {
  shape: z.literal("cylinder"),
  diameterMm: lengthMm,
  lengthMm,
  boreDiameterMm: boreMm,
  centreZMm,
};
const sphereFields = { shape: z.literal("sphere"), diameterMm: lengthMm, centreZMm };
const outlineFields = {
  shape: z.literal("outline"),
  pointsMm: z.array(pointMm).min(3).max(limits.outlinePoints),
};

function checkBore(c: { diameterMm: number; boreDiameterMm: number }, context: z.core.$RefinementCtx): void {
  if (c.boreDiameterMm === 0 || c.boreDiameterMm < c.diameterMm) return;
  const detail = `a bore of ${c.boreDiameterMm} mm leaves nothing of a diameter of ${c.diameterMm} mm`;
  fault(context, ["boreDiameterMm"], detail, `below ${c.diameterMm}`);
}

/** What a stack repeats. */
const SolidSchema = z.discriminatedUnion("shape", [
  z.strictObject(cylinderFields).superRefine(checkBore),
  z.strictObject(sphereFields),
  z.strictObject(outlineFields),
]);
const stackFields = {
  shape: z.literal("stack"),
  count: z.int().min(1).max(limits.stackCount),
  gapMm: z.number().min(0).max(limits.largestMm),
  of: SolidSchema,
};

const name = z.string().max(200);
const partFields = {
  name: name.default("part"),
  material: PartMaterialSchema,
  temperatureC,
  heated: z.boolean().default(true),
};
const guideFields = { name: name.default("guide"), material: GuideMaterialSchema, temperatureC };

export const PartSchema = z.discriminatedUnion("shape", [
  z
    .strictObject({ ...partFields, ...cylinderFields })
    .superRefine(checkBore)
    .superRefine(checkTemperature),
  z.strictObject({ ...partFields, ...sphereFields }).superRefine(checkTemperature),
  z.strictObject({ ...partFields, ...outlineFields }).superRefine(checkTemperature),
  z.strictObject({ ...partFields, ...stackFields }).superRefine(checkTemperature),
]);

export const GuideSchema = z.discriminatedUnion("shape", [
  z
    .strictObject({ ...guideFields, ...cylinderFields })
    .superRefine(checkBore)
    .superRefine(checkTemperature),
  z.strictObject({ ...guideFields, ...sphereFields }).superRefine(checkTemperature),
  z.strictObject({ ...guideFields, ...outlineFields }).superRefine(checkTemperature),
  z.strictObject({ ...guideFields, ...stackFields }).superRefine(checkTemperature),
]);

// Drive and the whole

const drivers = ["currentA", "partPowerW", "coilVoltageV"] as const;

const DriveSchema = z
  .strictObject({
    frequencyHz: z.number().min(1).max(1e7),
    currentA: z.number().min(1e-6).max(1e7).optional(),
    partPowerW: z.number().min(1e-9).max(1e9).optional(),
    coilVoltageV: z.number().min(1e-9).max(1e7).optional(),
  })
  .superRefine((drive, context) => {
    const given = drivers.filter((key) => drive[key] !== undefined);
    if (given.length === 1) return;
    const detail =
      given.length === 0
        ? "the drive says how fast, but not how strong"
        : `the drive is fixed ${given.length === 2 ? "twice" : "three times"}: by ${given.join(" and ")}`;
    fault(context, [], detail, "exactly one of currentA, partPowerW, coilVoltageV");
  });

/** The design document. */
export const DesignSchema = z
  .strictObject({
    format: z.literal("emberturn/1").default("emberturn/1"),
    name: name.default("unnamed design"),
    coil: CoilSchema,
    parts: z.array(PartSchema).max(limits.bodies).default([]),
    guides: z.array(GuideSchema).max(limits.bodies).default([]),
    drive: DriveSchema,
    strayPointsMm: z
      .array(z.tuple([z.number().min(0).max(1e6), z.number().min(-1e6).max(1e6)]))
      .max(limits.strayPoints)
      .default([]),
    accuracyPercent: z.number().min(0.01).max(10).default(0.2),
  })
  .superRefine((design, context) => {
    if (design.drive.partPowerW === undefined) return;
    const conducts = (m: Part["material"]) =>
      typeof m === "string" ? materials.get(m)?.resistivity !== null : m.resistivityOhmM !== null;
    if (design.parts.some((part) => part.heated && conducts(part.material))) return;
    const detail = "partPowerW is the heat in the parts to be heated, but no such part conducts";
    fault(
      context,
      ["drive", "partPowerW"],
      detail,
      "currentA or coilVoltageV, or a heated part with a resistivity",
    );
  });

export type Design = z.infer<typeof DesignSchema>;
export type Conductor = z.infer<typeof ConductorSchema>;
export type Winding = z.infer<typeof WindingSchema>;
export type Solid = z.infer<typeof SolidSchema>;
export type Part = z.infer<typeof PartSchema>;
export type Guide = z.infer<typeof GuideSchema>;
