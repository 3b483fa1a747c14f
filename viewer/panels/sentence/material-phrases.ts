/** What something is made of, in words: of the library, or a material of one's own by its numbers. */
import { libraryChoices } from "../../../meshes/materials.ts";
import { quantities as q } from "../../entry.ts";
import { valueAt } from "../../pointer.ts";
import { objectAt } from "./document.ts";
import { type Choice, numberBlank, type Phrase, rowsBlank } from "./phrases.ts";
import { reshapeMaterial } from "./reshape-coil.ts";

export type Role = "conductor" | "part" | "guide";

const ownWords: Record<Role, Choice["options"]> = {
  conductor: [["conducting", "another metal"]],
  part: [
    ["conducting", "a conducting material"],
    ["other", "a non-conducting material"],
  ],
  guide: [
    ["other", "a non-conducting material"],
    ["conducting", "a conducting material"],
  ],
};

/** "copper", or "a conducting material of 0.25 µΩ·m and relative permeability 60". */
export function materialPhrases(document: unknown, at: string, role: Role, whose: string): Phrase[] {
  const value = valueAt(document, at);
  const own = objectAt(document, at);
  const conducts = role === "conductor" || (own["resistivityOhmM"] ?? null) !== null;
  const choice: Choice = {
    kind: "choice",
    at,
    label: `Material of ${whose}`,
    options: [...libraryChoices(role), ...ownWords[role]],
    value: typeof value === "string" ? value : value === undefined ? "" : conducts ? "conducting" : "other",
    pick: (draft, kind) => reshapeMaterial(draft, at, kind),
  };
  if (typeof value !== "object") return [choice];
  const resistivity = numberBlank(`${at}/resistivityOhmM`, `Resistivity of ${whose}`, q.resistivity, {
    stays: true,
  });
  const permeability = numberBlank(
    `${at}/relativePermeability`,
    `Relative permeability of ${whose}`,
    q.permeability,
    { usual: 1 },
  );
  const loss = numberBlank(`${at}/lossTangent`, `Loss tangent of ${whose}`, q.lossTangent, { usual: 0 });
  return [
    choice,
    ...(conducts
      ? ["with resistivity", resistivity, "and relative permeability", permeability]
      : ["with relative permeability", permeability]),
    ...(role === "guide" || own["lossTangent"] !== undefined ? ["and loss tangent", loss] : []),
  ];
}

/** How a material of one's own saturates: rare, so it waits behind "and also". */
export function materialMore(document: unknown, at: string, whose: string): Phrase[] {
  if (typeof valueAt(document, at) !== "object") return [];
  const own = objectAt(document, at);
  const curve = rowsBlank(
    `${at}/curve`,
    `Magnetisation curve of ${whose}`,
    "H in A/m, B in T, one point a line",
    "gone",
  );
  const saturation = numberBlank(`${at}/saturationT`, `Saturation polarisation of ${whose}`, q.polarisation);
  const saturates: Phrase[] = ["It saturates at a polarisation of", { ...saturation, empty: "none" }, "."];
  const curved: Phrase[] = ["Its magnetisation curve runs through", curve];
  const both = own["curve"] !== undefined && own["saturationT"] !== undefined;
  if (both) return [...saturates, ...curved];
  return own["curve"] === undefined ? saturates : curved;
}

/** Whether a material says more than resistivity, permeability and loss. */
export function saturates(document: unknown, at: string): boolean {
  const own = objectAt(document, at);
  return own["saturationT"] !== undefined || own["curve"] !== undefined;
}
