/** Text → design → scene, with every fault on the way told at once. */
import type * as z from "zod";
import { cornersOf, MOST_CORNERS, shapeFaults } from "./bodies.ts";
import { clearanceFaults } from "./clearances.ts";
import {
  ConductorSchema,
  type Design,
  DesignSchema,
  GuideSchema,
  PartSchema,
  WindingSchema,
} from "./design.ts";
import { readJson } from "./json.ts";
import { type Layout, type Placed, placeBodies, placeCopper } from "./layout.ts";
import { sceneOf } from "./place.ts";
import { type Fault, Refusal } from "./refusal.ts";
import type { Scene } from "./scene.ts";
import { sectionOf } from "./windings.ts";
import { bounded, carryKnownKeys, faultsFromIssues } from "./words.ts";

/** A design fit to be solved. */
export interface Checked {
  /** Completed: every default filled in. */
  readonly design: Design;
  readonly scene: Scene;
}

/**
 * The completed design of a JSON text.
 * @throws Refusal "unparsable" with line and column, or "refused" with every fault found.
 */
export function readDesign(text: string): Design {
  return checkDesign(readJson(text)).design;
}

/**
 * Checks a parsed document against schema and geometry; a completed design comes back unchanged.
 * @throws Refusal "refused" with every fault found. Geometry is checked as far as the schema lets it be known.
 */
export function checkDesign(value: unknown): Checked {
  const parsed = DesignSchema.safeParse(value, { error: carryKnownKeys });
  const faults = parsed.success ? [] : faultsFromIssues(parsed.error.issues, value);
  const sound = parsed.success ? soundDesign(parsed.data) : soundFragments(value);
  const { layout, faults: geometric } = place(sound);
  faults.push(...geometric, ...clearanceFaults(layout));
  if (!parsed.success || faults.length > 0) throw new Refusal("refused", bounded(faults));
  return { design: parsed.data, scene: sceneOf(parsed.data, layout) };
}

/** The pieces of a document geometry can be made of. */
interface Sound {
  readonly coil: {
    readonly conductor: Design["coil"]["conductor"];
    readonly winding: Design["coil"]["winding"];
  } | null;
  readonly bodies: readonly Pick<Placed, "pointer" | "body">[];
}

function soundDesign({ coil, parts, guides }: Design): Sound {
  const bodies = [
    ...parts.map((body, i) => ({ pointer: `/parts/${i}`, body })),
    ...guides.map((body, i) => ({ pointer: `/guides/${i}`, body })),
  ];
  return { coil, bodies };
}

/** Whatever of a faulty document is sound by itself. */
function soundFragments(value: unknown): Sound {
  const coil = member(value, "coil");
  const conductor = ConductorSchema.safeParse(member(coil, "conductor"));
  const winding = WindingSchema.safeParse(member(coil, "winding"));
  const listed = <T>(key: string, schema: z.ZodType<T>): { pointer: string; body: T }[] => {
    const list = member(value, key);
    if (!Array.isArray(list)) return [];
    return list.slice(0, 1000).flatMap((item: unknown, i) => {
      const parsed = schema.safeParse(item);
      return parsed.success ? [{ pointer: `/${key}/${i}`, body: parsed.data }] : [];
    });
  };
  return {
    coil: conductor.success && winding.success ? { conductor: conductor.data, winding: winding.data } : null,
    bodies: [...listed("parts", PartSchema), ...listed("guides", GuideSchema)],
  };
}

function member(value: unknown, key: string): unknown {
  return value !== null && typeof value === "object" && Object.hasOwn(value, key)
    ? (value as Record<string, unknown>)[key]
    : undefined;
}

/** Puts copper and bodies in their places; bodies whose outline is none are told and left out. */
function place({ coil, bodies }: Sound): { layout: Layout; faults: Fault[] } {
  const copper = coil === null ? null : placeCopper(sectionOf(coil.conductor), coil.winding);
  const corners = bodies.reduce((sum, { body }) => sum + cornersOf(body), 0);
  if (corners > MOST_CORNERS) {
    const detail = `parts and guides have ${corners} corners in all; at most ${MOST_CORNERS} are solved`;
    return { layout: { copper, bodies: [] }, faults: [{ pointer: "/parts", detail }] };
  }
  const faults: Fault[] = [];
  const sound = bodies.filter(({ body, pointer }) => {
    const found = shapeFaults(body, pointer);
    faults.push(...found);
    return found.length === 0;
  });
  return { layout: { copper, bodies: placeBodies(sound) }, faults };
}
