/** The coil in words: "Wind 7 turns of round tube 8 mm, wall 1 mm, of copper, as a helix on a bore of 50 mm at a pitch of 10.5 mm." */
import { quantities as q } from "../../entry.ts";
import { valueAt } from "../../pointer.ts";
import { numberOf, objectAt } from "./document.ts";
import { materialMore, materialPhrases } from "./material-phrases.ts";
import {
  type Choice,
  type Line,
  numberBlank,
  type Phrase,
  pitchBlank,
  ringsBlank,
  strandsBlank,
} from "./phrases.ts";
import { reshapeLeads, reshapeSection, reshapeStrands, type SectionName } from "./reshape-coil.ts";
import { reshapeWinding, type WindingForm } from "./reshape-winding.ts";

const CONDUCTOR = "/coil/conductor";
const WINDING = "/coil/winding";

export function coilLine(document: unknown): Line {
  const also = [
    ...(valueAt(document, `${WINDING}/form`) === "rings" ? [] : centrePhrases(document)),
    ...temperaturePhrases,
    ...materialMore(document, `${CONDUCTOR}/material`, "the conductor"),
    ...leadPhrases(document),
    ...strandPhrases(document),
  ];
  return {
    at: "/coil",
    label: "Coil",
    phrases: windingPhrases(document),
    also,
    told:
      numberOf(objectAt(document, CONDUCTOR), "temperatureC", 20) !== 20 ||
      numberOf(objectAt(document, WINDING), "centreZMm", 0) !== 0 ||
      numberOf(objectAt(document, WINDING), "zMm", 0) !== 0 ||
      valueAt(document, "/coil/leads") !== undefined ||
      valueAt(document, "/coil/strands") !== undefined,
  };
}

const forms: Choice["options"] = [
  ["helix", "helix"],
  ["spiral", "flat spiral"],
  ["layers", "coil in layers"],
  ["cone", "cone"],
  ["rings", "set of single rings"],
];

function windingPhrases(document: unknown): Phrase[] {
  const winding = objectAt(document, WINDING);
  const form: Choice = {
    kind: "choice",
    at: `${WINDING}/form`,
    label: "Form of the winding",
    options: forms,
    value: String(winding["form"] ?? ""),
    pick: (draft, value) => reshapeWinding(draft, value as WindingForm),
  };
  const turns = numberBlank(`${WINDING}/turns`, "Turns", q.count);
  const word = winding["turns"] === 1 ? "turn of" : "turns of";
  const conductor = conductorPhrases(document);
  switch (winding["form"]) {
    case "helix":
      return [
        "Wind",
        turns,
        word,
        ...conductor,
        ", as a",
        form,
        "on a bore of",
        bore(),
        ...pitch(winding, "turns"),
        ".",
      ];
    case "spiral":
      return [
        "Wind",
        turns,
        word,
        ...conductor,
        ", as a",
        form,
        "around a clear",
        innerDiameter(),
        ...pitch(winding, "turns"),
        ".",
      ];
    case "cone":
      return [
        "Wind",
        turns,
        word,
        ...conductor,
        ", as a",
        form,
        "with a bore of",
        bore("Bore at the bottom"),
        "at the bottom and",
        topBore(),
        "at the top",
        ...pitch(winding, "turns"),
        ".",
      ];
    case "layers":
      return [
        "Wind",
        numberBlank(`${WINDING}/layers`, "Layers", q.count),
        winding["layers"] === 1 ? "layer of" : "layers of",
        numberBlank(`${WINDING}/turnsPerLayer`, "Turns per layer", q.count),
        winding["turnsPerLayer"] === 1 ? "turn of" : "turns of",
        ...conductor,
        ", as a",
        form,
        "on a bore of",
        bore(),
        ...pitch(winding, "turnsPerLayer"),
        ", layer to layer",
        numberBlank(`${WINDING}/layerPitchMm`, "Pitch from layer to layer", q.pitch),
        ".",
      ];
    case "rings":
      return ["Bend", ...conductor, "to a", form, "with their centres at", ringsBlank(WINDING)];
    default:
      return ["Wind", ...conductor, "as a", form, "."];
  }
}

const bore = (label = "Bore of the coil") => numberBlank(`${WINDING}/boreDiameterMm`, label, q.size);
const topBore = () => numberBlank(`${WINDING}/topBoreDiameterMm`, "Bore at the top", q.size);
const innerDiameter = () =>
  numberBlank(`${WINDING}/innerDiameterMm`, "Clear inner diameter of the coil", q.size);

function pitch(winding: Readonly<Record<string, unknown>>, turns: string): Phrase[] {
  const blank = pitchBlank(
    `${WINDING}/pitchMm`,
    "Pitch, centre to centre",
    q.pitch,
    numberOf(winding, turns, 2) - 1,
  );
  return ["at a pitch of", blank];
}

const sectionWords: Choice["options"] = [
  ["roundTube", "round tube"],
  ["roundBar", "round bar"],
  ["rectTube", "rectangular tube"],
  ["rectBar", "rectangular bar"],
];

function conductorPhrases(document: unknown): Phrase[] {
  const section = String(objectAt(document, CONDUCTOR)["section"] ?? "");
  const choice: Choice = {
    kind: "choice",
    at: `${CONDUCTOR}/section`,
    label: "Section of the conductor",
    options: sectionWords,
    value: section,
    pick: (draft, value) => reshapeSection(draft, value as SectionName),
  };
  const blank = (key: string, label: string) => numberBlank(`${CONDUCTOR}/${key}`, label, q.size);
  const wall = [", wall", numberBlank(`${CONDUCTOR}/wallMm`, "Wall of the tube", q.wall)];
  const sizes = section.startsWith("round")
    ? [blank("outsideDiameterMm", "Outside diameter of the conductor")]
    : section.startsWith("rect")
      ? [
          blank("radialWidthMm", "Radial width of the conductor"),
          "wide and",
          blank("axialHeightMm", "Axial height of the conductor"),
          "high",
        ]
      : [];
  return [
    choice,
    ...sizes,
    ...(section.endsWith("Tube") ? wall : []),
    ", of",
    ...materialPhrases(document, `${CONDUCTOR}/material`, "conductor", "the conductor"),
  ];
}

const temperaturePhrases: readonly Phrase[] = [
  "The conductor is at",
  numberBlank(`${CONDUCTOR}/temperatureC`, "Temperature of the conductor", q.temperature, { usual: 20 }),
  ".",
];

function centrePhrases(document: unknown): Phrase[] {
  const key = valueAt(document, `${WINDING}/form`) === "spiral" ? "zMm" : "centreZMm";
  return [
    "The coil's middle lies at z =",
    numberBlank(`${WINDING}/${key}`, "Height z of the coil's middle", q.position, { usual: 0 }),
    ".",
  ];
}

function leadPhrases(document: unknown): Phrase[] {
  const leads = valueAt(document, "/coil/leads");
  const choice: Choice = {
    kind: "choice",
    at: "/coil/leads",
    label: "Leads",
    options: [
      ["none", "no leads"],
      ["pair", "a parallel pair of leads"],
    ],
    value: leads === undefined ? "none" : "pair",
    pick: (draft, value) => reshapeLeads(draft, value === "pair"),
  };
  if (leads === undefined) return ["It has", choice, "."];
  const blank = (key: string, label: string) => numberBlank(`/coil/leads/${key}`, label, q.size);
  return [
    "It has",
    choice,
    ", each",
    blank("lengthMm", "Length of each lead"),
    "long,",
    blank("spacingMm", "Spacing of the leads, centre to centre"),
    "apart, centre to centre.",
  ];
}

function strandPhrases(document: unknown): Phrase[] {
  const strands = valueAt(document, "/coil/strands");
  const choice: Choice = {
    kind: "choice",
    at: "/coil/strands",
    label: "Connection of the turns",
    options: [
      ["series", "all in series"],
      ["parallel", "in parallel strands"],
    ],
    value: strands === undefined ? "series" : "parallel",
    pick: (draft, value) => reshapeStrands(draft, value === "parallel"),
  };
  if (strands === undefined) return ["The turns are", choice, "."];
  return ["The turns are", choice, ":", strandsBlank("/coil/strands"), "(counted from 0)."];
}
