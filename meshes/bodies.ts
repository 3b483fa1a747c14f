/** What is wrong with a part or guide by itself: outlines that are none, contacts in a point, measures too fine to resolve. */
import { tooFine } from "./copper.ts";
import type { Guide, Part, Solid } from "./design.ts";
import type { Scale } from "./layout.ts";
import { narrowestNeck, outlineFaults } from "./outlines.ts";
import type { Xy } from "./planar.ts";
import { type Fault, pointerTo } from "./refusal.ts";
import { SHARPEST, sineBetween } from "./wedges.ts";
import { figure } from "./words.ts";

/** The corners of all bodies together that are taken; a round piece counts as eight. */
export const MOST_CORNERS = 20_000;

/** Corners of a body, before it is put in place. */
export function cornersOf(body: Part | Guide): number {
  const solid = body.shape === "stack" ? body.of : body;
  const corners = solid.shape === "outline" ? solid.pointsMm.length : solid.shape === "sphere" ? 8 : 4;
  return body.shape === "stack" ? body.count * corners : corners;
}

/** Faults that keep a body from being put in place at all. */
export function shapeFaults(body: Part | Guide, pointer: string): Fault[] {
  const [solid, at] = solidOf(body, pointer);
  return solid.shape === "outline" ? outlineFaults(solid.pointsMm, pointerTo(at, "pointsMm")) : [];
}

/** Faults of a placed body's own measures beside the scale of the whole arrangement. */
export function measureFaults(body: Part | Guide, pointer: string, scale: Scale): Fault[] {
  const [solid, at] = solidOf(body, pointer);
  const faults = solidFaults(solid, at, scale);
  return body.shape === "stack" && body.count > 1 ? [...faults, ...gapFaults(body, pointer, scale)] : faults;
}

function solidOf(body: Part | Guide, pointer: string): [Solid, string] {
  return body.shape === "stack" ? [body.of, pointerTo(pointer, "of")] : [body, pointer];
}

function gapFaults(stack: Extract<Part | Guide, { shape: "stack" }>, pointer: string, scale: Scale): Fault[] {
  const { gapMm, of } = stack;
  const at = pointerTo(pointer, "gapMm");
  if (gapMm === 0 && of.shape === "cylinder") return [];
  if (gapMm >= scale.finest) return [];
  if (gapMm > 0) return [tooFine(at, "a gap", gapMm, scale)];
  const pieces = of.shape === "sphere" ? "spheres" : "outlines";
  const detail = `without a gap the ${pieces} of a stack touch in a point or a line, and what passes there nobody knows`;
  return [{ pointer: at, detail, accepted: `at least ${figure(scale.finest)} mm` }];
}

function solidFaults(solid: Solid, pointer: string, scale: Scale): Fault[] {
  const fine = (key: string, what: string, mm: number): Fault[] =>
    mm < scale.finest ? [tooFine(pointerTo(pointer, key), what, mm, scale)] : [];
  if (solid.shape === "sphere") return fine("diameterMm", "a diameter", solid.diameterMm);
  if (solid.shape === "outline") return edgeFaults(solid, pointer, scale);
  const bore = solid.boreDiameterMm;
  return [
    ...fine("lengthMm", "a length", solid.lengthMm),
    ...(bore > 0 ? fine("boreDiameterMm", "a bore", bore / 2) : []),
    ...(bore > 0
      ? fine("boreDiameterMm", "a wall", (solid.diameterMm - bore) / 2)
      : fine("diameterMm", "a diameter", solid.diameterMm)),
  ];
}

function edgeFaults(solid: Extract<Solid, { shape: "outline" }>, pointer: string, scale: Scale): Fault[] {
  const points = solid.pointsMm;
  const list = pointerTo(pointer, "pointsMm");
  const faults: Fault[] = [];
  points.forEach((p, i) => {
    const q = points[(i + 1) % points.length]!;
    const length = Math.hypot(q[0] - p[0], q[1] - p[1]);
    if (length < scale.finest)
      faults.push(tooFine(pointerTo(list, i), `an edge from point ${i} to the next`, length, scale));
    if (p[0] > 0 && p[0] < scale.finest) {
      const detail = `point ${i} stands ${figure(p[0])} mm off the axis, too little to resolve`;
      faults.push({
        pointer: pointerTo(list, i),
        detail,
        accepted: `r = 0, or at least ${figure(scale.finest)}`,
      });
    }
  });
  faults.push(...points.flatMap((_, i) => axisFaults(points, i, list, scale)));
  const neck = faults.length > 0 ? null : narrowestNeck(points, scale.finest);
  if (neck !== null) {
    const what = `a neck or slot between the edges after points ${neck.edges[0]} and ${neck.edges[1]}`;
    faults.push(tooFine(list, what, neck.distance, scale));
  }
  return faults;
}

/** Fault of an edge that leaves the axis so slowly that no cell fits between. */
function axisFaults(points: readonly Xy[], i: number, list: string, scale: Scale): Fault[] {
  const p = points[i]!;
  const slow = ([r, z]: Xy): boolean =>
    r >= scale.finest && sineBetween([r, z - p[1]], [0, z - p[1]]) < SHARPEST;
  if (p[0] !== 0 || ![points.at(i - 1)!, points[(i + 1) % points.length]!].some(slow)) return [];
  const detail = `an edge at point ${i} (counted from 0) leaves the axis by less than 0.5 degrees`;
  return [{ pointer: pointerTo(list, i), detail, accepted: "edges along the axis, or 0.5 degrees off it" }];
}
