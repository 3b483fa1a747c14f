/** Another shape for a part or guide, and parts and guides added where there is room. Lengths in mm. */
import { boxAround } from "../../../meshes/layout.ts";
import { sketch } from "../../../meshes/sketch.ts";
import { valueAt, withValueAt } from "../../pointer.ts";
import { bestOf, type Keyed, listAt, numberOf, objectAt, only, roundly, tidy, without } from "./document.ts";

export const solidShapes = ["cylinder", "sphere", "outline"] as const;
export const bodyShapes = [...solidShapes, "stack"] as const;
export type BodyShape = (typeof bodyShapes)[number];

const solidKeys = ["shape", "diameterMm", "lengthMm", "boreDiameterMm", "centreZMm", "pointsMm"];
const stackKeys = ["count", "gapMm", "of"];

/** The document with the part, guide or repeated piece at `at` in another shape, in the room of the former. */
export function reshapeBody(document: unknown, at: string, shape: BodyShape): unknown {
  const body = objectAt(document, at);
  const others = without(body, [...solidKeys, ...stackKeys]);
  const solid = body["shape"] === "stack" ? pieceOf(body, shape) : only(body, solidKeys);
  const shapes = shape === "stack" ? stacksOf(solid) : solidsOf(solid, shape);
  return bestOf(
    shapes.map((made) => withValueAt(document, at, { ...only(others, ["name"]), ...made, ...others })),
  );
}

/** What a stack becomes when it is one piece: a cylinder as high as all, else the piece it repeats. */
function pieceOf(stack: Keyed, shape: BodyShape): Keyed {
  const of = objectAt(stack, "/of");
  if (of["shape"] !== "cylinder" || shape === "stack") return of;
  const count = numberOf(stack, "count", 1);
  const lengthMm = count * numberOf(of, "lengthMm", 10) + (count - 1) * numberOf(stack, "gapMm", 0);
  return { ...of, lengthMm: tidy(lengthMm) };
}

/** Stacks to try: a cylinder cut in three in its room; of others three copies, or one to begin with. */
function stacksOf(solid: Keyed): Keyed[] {
  if (solid["shape"] === "cylinder") {
    const length = numberOf(solid, "lengthMm", 30);
    const gapMm = roundly(length / 60);
    const of = { ...solid, lengthMm: tidy((length - 2 * gapMm) / 3) };
    return [{ shape: "stack", count: 3, gapMm, of }];
  }
  const gapMm = roundly(numberOf(solid, "diameterMm", 20) / 10);
  return [3, 1].map((count) => ({ shape: "stack", count, gapMm, of: solid }));
}

/** Solids of a shape to try: as large as the former, then what fits into it. */
function solidsOf(solid: Keyed, shape: Exclude<BodyShape, "stack">): Keyed[] {
  if (solid["shape"] === shape) return [solid];
  const box = boxOf(solid);
  const centreZMm = tidy((box.low + box.high) / 2);
  const place = centreZMm === 0 ? {} : { centreZMm };
  const height = tidy(box.high - box.low);
  const across = tidy(2 * box.outer);
  switch (shape) {
    case "sphere":
      return [across, Math.min(across, height), 0.5 * across].map((diameterMm) => ({
        shape,
        diameterMm,
        ...place,
      }));
    case "cylinder": {
      const boreDiameterMm = tidy(2 * box.inner);
      const bore = boreDiameterMm === 0 ? {} : { boreDiameterMm };
      return [1, 0.7, 0.5].map((part) => ({
        shape,
        diameterMm: tidy(2 * (box.inner + part * (box.outer - box.inner))),
        lengthMm: tidy(part * height),
        ...bore,
        ...place,
      }));
    }
    case "outline":
      return [{ shape, pointsMm: solid["shape"] === "sphere" ? halfCircle(box) : rectangle(box) }];
  }
}

interface Room {
  readonly inner: number;
  readonly outer: number;
  readonly low: number;
  readonly high: number;
}

function boxOf(solid: Keyed): Room {
  const points = listAt(solid, "/pointsMm").filter(isPoint);
  if (points.length > 0) {
    const [r, z] = [points.map((p) => p[0]), points.map((p) => p[1])];
    return { inner: Math.min(...r), outer: Math.max(...r), low: Math.min(...z), high: Math.max(...z) };
  }
  const outer = numberOf(solid, "diameterMm", 30) / 2;
  const half = solid["shape"] === "sphere" ? outer : numberOf(solid, "lengthMm", 2 * outer) / 2;
  const centre = numberOf(solid, "centreZMm", 0);
  return { inner: numberOf(solid, "boreDiameterMm", 0) / 2, outer, low: centre - half, high: centre + half };
}

const isPoint = (p: unknown): p is [number, number] =>
  Array.isArray(p) && p.length === 2 && p.every((x) => typeof x === "number");

function rectangle({ inner, outer, low, high }: Room): [number, number][] {
  return [
    [inner, low],
    [outer, low],
    [outer, high],
    [inner, high],
  ];
}

/** Sixteen chords of a sphere's outline, bottom to top. */
function halfCircle({ outer, low, high }: Room): [number, number][] {
  const centre = (low + high) / 2;
  return Array.from({ length: 17 }, (_, i) => {
    const angle = (Math.PI * i) / 16;
    return [i === 16 ? 0 : round4(outer * Math.sin(angle)), round4(centre - outer * Math.cos(angle))];
  });
}

const round4 = (x: number): number => Number(x.toFixed(4)) + 0;

// Adding

/** The document with one more part: in the bore if there is room, else above everything. */
export function withPart(document: unknown): unknown {
  const room = roomOf(document);
  const diameterMm = roundly(1.2 * room.clear);
  const material = { resistivityOhmM: 2.5e-7, relativePermeability: 60 };
  const cylinder = { name: newName(document, "parts", "part"), shape: "cylinder", diameterMm };
  const inside = { lengthMm: roundly(Math.max(room.height, diameterMm)), centreZMm: room.middle };
  const above = { lengthMm: diameterMm, centreZMm: roundUp(room.top + 0.75 * diameterMm) };
  return bestOf(
    [inside, above].map((place) =>
      withValueAt(withList(document, "/parts"), "/parts/-", { ...cylinder, ...place, material }),
    ),
  );
}

/** The document with one more guide: a sleeve around the copper if there is room, else a disc above everything. */
export function withGuide(document: unknown): unknown {
  const room = roomOf(document);
  const material = { relativePermeability: 40, lossTangent: 0.01 };
  const name = newName(document, "guides", "guide");
  const bore = roundly(2.3 * room.reach);
  const sleeve = {
    diameterMm: roundly(1.15 * bore),
    boreDiameterMm: bore,
    lengthMm: roundly(room.height),
    centreZMm: room.middle,
  };
  const thick = roundly(room.reach / 5);
  const disc = {
    diameterMm: roundly(2 * room.reach),
    lengthMm: thick,
    centreZMm: roundUp(room.top + 1.5 * thick),
  };
  return bestOf(
    [sleeve, disc].map((place) =>
      withValueAt(withList(document, "/guides"), "/guides/-", {
        name,
        shape: "cylinder",
        ...place,
        material,
      }),
    ),
  );
}

const roundUp = (x: number): number => Math.ceil(10 * x) / 10;

/** `list/-` appends only to a list; one that is missing or none is begun. */
function withList(document: unknown, list: "/parts" | "/guides"): unknown {
  return Array.isArray(valueAt(document, list)) ? document : withValueAt(document, list, []);
}

/** Free radius inside the copper, its outer reach and height, and the top of everything. */
function roomOf(document: unknown) {
  const { copper, bodies } = sketch(document);
  const coil = boxAround(copper?.figures ?? []);
  const all = boxAround([...(copper?.figures ?? []), ...bodies.flatMap((b) => b.pieces)]);
  return {
    clear: coil?.left ?? 25,
    reach: coil?.right ?? 33,
    height: coil === null ? 60 : coil.high - coil.low,
    middle: coil === null ? 0 : tidy((coil.low + coil.high) / 2),
    top: all?.high ?? 30,
  };
}

/** "part 2" beside one other, or the next number not taken. */
function newName(document: unknown, list: string, word: string): string {
  const taken = listAt(document, `/${list}`).map((_, i) => valueAt(document, `/${list}/${i}/name`) ?? word);
  const numbers = Array.from({ length: taken.length + 1 }, (_, i) => taken.length + 1 + i);
  return numbers.map((n) => `${word} ${n}`).find((name) => !taken.includes(name)) ?? word;
}
