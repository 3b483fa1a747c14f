/**
 * A document in its places for drawing, faults or not: copper and bodies of whatever in it says where they are. What is wrong
 * with the document is check.ts's to say; here a bad temperature or material keeps nothing from being drawn. Lengths in mm.
 */
import type * as z from "zod";
import { cornersOf, MOST_CORNERS } from "./bodies.ts";
import { ConductorSchema, PartSchema, WindingSchema } from "./design.ts";
import { type Copper, type Layout, placeBodies, placeCopper } from "./layout.ts";
import { sectionOf } from "./windings.ts";

type Keyed = Readonly<Record<string, unknown>>;

const sectionKeys = ["section", "outsideDiameterMm", "radialWidthMm", "axialHeightMm", "wallMm"];
const windingKeys = [
  "form",
  "boreDiameterMm",
  "topBoreDiameterMm",
  "innerDiameterMm",
  "turns",
  "turnsPerLayer",
  "layers",
  "pitchMm",
  "layerPitchMm",
  "centreZMm",
  "zMm",
  "centresMm",
  "sense",
];
const solidKeys = ["shape", "diameterMm", "lengthMm", "boreDiameterMm", "centreZMm", "pointsMm"];
const bodyKeys = [...solidKeys, "count", "gapMm"];

/** Where copper and bodies of any value stand, as far as it says so: copper null where it does not, bodies left out. */
export function sketch(value: unknown): Layout {
  const bodies = [...bodiesOf(value, "parts"), ...bodiesOf(value, "guides")];
  const corners = bodies.reduce((sum, { body }) => sum + cornersOf(body), 0);
  return {
    copper: copperOf(member(value, "coil")),
    bodies: corners > MOST_CORNERS ? [] : placeBodies(bodies),
  };
}

function copperOf(coil: unknown): Copper | null {
  const section = picked(member(coil, "conductor"), sectionKeys);
  const conductor = firstSound(ConductorSchema, [
    { ...section, material: "copper" },
    // A wall that leaves no bore is drawn as solid copper.
    { ...without(section, ["wallMm"]), section: solidName(section["section"]), material: "copper" },
  ]);
  const bare = picked(member(coil, "winding"), windingKeys);
  const winding = firstSound(
    WindingSchema,
    [[], ["sense"], ["centreZMm", "zMm"]].map((k) => without(bare, k)),
  );
  return conductor === null || winding === null ? null : placeCopper(sectionOf(conductor), winding);
}

const solidName = (section: unknown): unknown =>
  typeof section === "string" ? section.replace("Tube", "Bar") : section;

function bodiesOf(value: unknown, list: "parts" | "guides") {
  const items = member(value, list);
  if (!Array.isArray(items)) return [];
  return items.slice(0, 1000).flatMap((item: unknown, i) => {
    const body = firstSound(PartSchema, bareBodies(item, list === "parts" ? "part" : "guide"));
    return body === null ? [] : [{ pointer: `/${list}/${i}`, body }];
  });
}

/** A body without what drawing does not need, then also without a bore or a place that cannot be. */
function bareBodies(item: unknown, plainName: string): Keyed[] {
  const own = picked(item, bodyKeys);
  const of = member(item, "of");
  const given = member(item, "name");
  const name = typeof given === "string" ? given.slice(0, 200) : plainName;
  return [[], ["boreDiameterMm"], ["centreZMm"], ["boreDiameterMm", "centreZMm"]].map((keys) => ({
    ...without(own, keys),
    ...(of === undefined ? {} : { of: without(picked(of, solidKeys), keys) }),
    name,
    material: {},
  }));
}

function firstSound<T>(schema: z.ZodType<T>, attempts: readonly Keyed[]): T | null {
  for (const attempt of attempts) {
    const parsed = schema.safeParse(attempt);
    if (parsed.success) return parsed.data;
  }
  return null;
}

function member(value: unknown, key: string): unknown {
  return value !== null && typeof value === "object" && Object.hasOwn(value, key)
    ? (value as Keyed)[key]
    : undefined;
}

function picked(value: unknown, keys: readonly string[]): Keyed {
  return Object.fromEntries(keys.map((k) => [k, member(value, k)]).filter(([, v]) => v !== undefined));
}

function without(value: Keyed, keys: readonly string[]): Keyed {
  return Object.fromEntries(Object.entries(value).filter(([k]) => !keys.includes(k)));
}
