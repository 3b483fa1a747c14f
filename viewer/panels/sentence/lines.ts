/** The whole design as lines of text with blanks, in the winder's order: coil, parts, guides, drive. */
import { quantities as q } from "../../entry.ts";
import { valueAt } from "../../pointer.ts";
import { additions, bodyCount, bodyLine } from "./body-line.ts";
import { coilLine } from "./coil-line.ts";
import { listAt, numberOf, objectAt } from "./document.ts";
import { type Choice, type Line, numberBlank, type Phrase, rowsBlank, textBlank } from "./phrases.ts";
import { type DriveKey, driveKeys, reshapeDrive } from "./reshape-coil.ts";

/** More parts or guides than the schema takes are not all written out. */
const MOST_BODIES = 100;

export function linesOf(document: unknown): Line[] {
  const bodies = (role: "part" | "guide") =>
    Array.from({ length: Math.min(MOST_BODIES, bodyCount(document, `${role}s`)) }, (_, i) =>
      bodyLine(document, role, i),
    );
  return [
    nameLine,
    coilLine(document),
    ...bodies("part"),
    ...bodies("guide"),
    addLine(document),
    driveLine(document),
  ];
}

const nameLine: Line = {
  at: "/name",
  label: "Name",
  phrases: [textBlank("/name", "Name of the design", "unnamed design", "title")],
  also: [],
  told: false,
};

function addLine(document: unknown): Line {
  const none = bodyCount(document, "parts") + bodyCount(document, "guides") === 0;
  const [part, guide] = additions(document);
  const phrases: Phrase[] = [...(none ? ["The coil is empty."] : []), part!, "·", guide!];
  return { at: "/parts", owns: ["/guides"], label: "Add parts and guides", phrases, also: [], told: false };
}

const driveWords: Record<DriveKey, string> = {
  currentA: "A of current",
  partPowerW: "W of heat in the parts to be heated",
  coilVoltageV: "V across the coil",
};
const driveBlanks = {
  currentA: ["Current", q.current],
  partPowerW: ["Heat in the parts to be heated", q.power],
  coilVoltageV: ["Voltage across the coil", q.voltage],
} as const;

function driveLine(document: unknown): Line {
  const drive = objectAt(document, "/drive");
  const given = driveKeys.filter((key) => drive[key] !== undefined);
  const shown: DriveKey[] = given.length === 0 ? ["currentA"] : given;
  const choice: Choice = {
    kind: "choice",
    at: "/drive",
    label: "What the drive fixes",
    options: driveKeys.map((key) => [key, driveWords[key]] as const),
    value: shown[0]!,
    pick: (draft, key) => reshapeDrive(draft, key as DriveKey),
  };
  const blanks = shown.flatMap((key, i): Phrase[] => {
    const [label, quantity] = driveBlanks[key];
    const blank = numberBlank(`/drive/${key}`, label, quantity, { unit: i === 0 ? "" : quantity.unit });
    return i === 0 ? [blank, choice] : ["and", blank];
  });
  return {
    at: "/drive",
    label: "Drive",
    phrases: [
      "Drive it with",
      ...blanks,
      "at",
      numberBlank("/drive/frequencyHz", "Frequency", q.frequency),
      ".",
    ],
    also: [
      "Solve until resistance, inductance and powers are good to",
      numberBlank("/accuracyPercent", "Accuracy", q.percent, { usual: 0.2 }),
      ". Tell the stray field at",
      rowsBlank("/strayPointsMm", "Points of stray field, mm", "r, z in mm, one point a line", "gone"),
    ],
    told:
      numberOf(objectAt(document, ""), "accuracyPercent", 0.2) !== 0.2 ||
      listAt(document, "/strayPointsMm").length > 0 ||
      typeof valueAt(document, "/strayPointsMm") === "string",
  };
}
