/** A part or guide in words: "Heat pin, a cylinder of … , 30 mm across and 90 mm long, its middle at z = 0 mm." */
import { blankId } from "../../blank-id.ts";
import { quantities as q } from "../../entry.ts";
import { valueAt, withValueAt } from "../../pointer.ts";
import { numberOf, objectAt } from "./document.ts";
import { materialMore, materialPhrases, saturates } from "./material-phrases.ts";
import {
  type Action,
  type Choice,
  type Line,
  numberBlank,
  type Phrase,
  rowsBlank,
  textBlank,
} from "./phrases.ts";
import { type BodyShape, bodyShapes, reshapeBody, solidShapes, withGuide, withPart } from "./reshape-body.ts";

const shapeWords: Record<BodyShape, string> = {
  cylinder: "cylinder",
  sphere: "sphere",
  outline: "turned outline",
  stack: "stack",
};

export function bodyLine(document: unknown, role: "part" | "guide", index: number): Line {
  const at = `/${role}s/${index}`;
  const whose = `${role} ${index + 1}`;
  const body = objectAt(document, at);
  const shape = shapeChoice(document, at, `Shape of ${whose}`, bodyShapes);
  const material = materialPhrases(document, `${at}/material`, role, whose);
  return {
    at,
    label: `${role === "part" ? "Part" : "Guide"} ${index + 1}`,
    phrases: [
      ...(role === "part" ? [heatedChoice(body, at, whose)] : ["Steer the flux with"]),
      textBlank(`${at}/name`, `Name of ${whose}`, role),
      ", a",
      shape,
      ...sizePhrases(document, at, whose),
      ", of",
      ...material,
      ...outlinePhrases(document, at, whose),
      removal(at, whose),
    ],
    also: [
      "It is at",
      numberBlank(`${at}/temperatureC`, `Temperature of ${whose}`, q.temperature, { usual: 20 }),
      ".",
      ...materialMore(document, `${at}/material`, whose),
    ],
    told: numberOf(body, "temperatureC", 20) !== 20 || saturates(document, `${at}/material`),
  };
}

function heatedChoice(body: Readonly<Record<string, unknown>>, at: string, whose: string): Choice {
  const heated = body["heated"];
  return {
    kind: "choice",
    at: `${at}/heated`,
    label: `Is ${whose} to be heated`,
    options: [
      ["true", "Heat"],
      ["false", "Do not heat"],
    ],
    value: String(heated ?? true),
    pick: (draft, value) => withValueAt(draft, `${at}/heated`, value === "true" ? undefined : false),
  };
}

function shapeChoice(document: unknown, at: string, label: string, shapes: readonly BodyShape[]): Choice {
  return {
    kind: "choice",
    at: `${at}/shape`,
    label,
    options: shapes.map((s) => [s, shapeWords[s]] as const),
    value: String(objectAt(document, at)["shape"] ?? ""),
    pick: (draft, value) => reshapeBody(draft, at, value as BodyShape),
  };
}

function sizePhrases(document: unknown, at: string, whose: string): Phrase[] {
  const blank = (key: string, label: string, usual?: number) =>
    numberBlank(`${at}/${key}`, `${label} of ${whose}`, q.size, usual === undefined ? {} : { usual });
  const middle = [
    ", its middle at z =",
    numberBlank(`${at}/centreZMm`, `Height z of the middle of ${whose}`, q.position, { usual: 0 }),
  ];
  switch (objectAt(document, at)["shape"]) {
    case "cylinder":
      return [
        blank("diameterMm", "Diameter"),
        "across and",
        blank("lengthMm", "Length"),
        "long, bore",
        blank("boreDiameterMm", "Bore", 0),
        ...middle,
      ];
    case "sphere":
      return [blank("diameterMm", "Diameter"), "across", ...middle];
    case "stack":
      return [
        "of",
        numberBlank(`${at}/count`, `Pieces in ${whose}`, q.count),
        "pieces,",
        numberBlank(`${at}/gapMm`, `Gap between the pieces of ${whose}`, q.gap),
        "clear between them, each a",
        shapeChoice(document, `${at}/of`, `Shape of the pieces of ${whose}`, solidShapes),
        ...sizePhrases(document, `${at}/of`, `each piece of ${whose}`),
      ];
    default:
      return [];
  }
}

/** Corners of an outline come last in their line: they are a table of their own. */
function outlinePhrases(document: unknown, at: string, whose: string): Phrase[] {
  const body = objectAt(document, at);
  if (body["shape"] === "stack") return outlinePhrases(document, `${at}/of`, `each piece of ${whose}`);
  if (body["shape"] !== "outline") return ["."];
  return [
    ", through the corners",
    rowsBlank(`${at}/pointsMm`, `Outline of ${whose}, mm`, "r, z in mm, one corner a line"),
  ];
}

function removal(at: string, whose: string): Action {
  return {
    kind: "action",
    words: "take away",
    label: `${whose[0]!.toUpperCase()}${whose.slice(1)}: take away`,
    act: (document) => withValueAt(document, at, undefined),
    focus: () => blankId("Add a flux guide"),
  };
}

export function additions(document: unknown): Action[] {
  const none = bodyCount(document, "parts") === 0;
  return [
    {
      kind: "action",
      words: none ? "Add a part" : "Add another part",
      label: none ? "Add a part" : "Add another part",
      act: withPart,
      focus: (after) => blankId(`/parts/${bodyCount(after, "parts") - 1}/diameterMm`),
    },
    {
      kind: "action",
      words: "Add a flux guide",
      label: "Add a flux guide",
      act: withGuide,
      focus: (after) => blankId(`/guides/${bodyCount(after, "guides") - 1}/diameterMm`),
    },
  ];
}

export function bodyCount(document: unknown, list: "parts" | "guides"): number {
  const value = valueAt(document, `/${list}`);
  return Array.isArray(value) ? value.length : 0;
}
