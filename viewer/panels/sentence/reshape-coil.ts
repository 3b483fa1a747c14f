/** Another section or metal for the conductor, leads and strands put on and taken off. */
import { sketch } from "../../../meshes/sketch.ts";
import { valueAt, withValueAt } from "../../pointer.ts";
import { bestOf, type Keyed, numberOf, objectAt, roundly, without } from "./document.ts";
import { turnAbout } from "./reshape-winding.ts";

export const sections = ["roundTube", "roundBar", "rectTube", "rectBar"] as const;
export type SectionName = (typeof sections)[number];

const sectionKeys = ["section", "outsideDiameterMm", "radialWidthMm", "axialHeightMm", "wallMm"];

/** The document with another section: the same box where it can be, the wall kept as long as it leaves a bore. */
export function reshapeSection(document: unknown, section: SectionName): unknown {
  const conductor = objectAt(document, "/coil/conductor");
  const others = without(conductor, sectionKeys);
  return bestOf(
    sizesOf(conductor, section).map(({ sizes, side }) =>
      withValueAt(document, "/coil/conductor", {
        section,
        ...sizes,
        ...(section.endsWith("Tube") ? { wallMm: wallFor(conductor["wallMm"], side) } : {}),
        ...others,
      }),
    ),
  );
}

/** Sizes to try: the same box, then what fits inside the former section. */
function sizesOf(conductor: Keyed, section: SectionName): { sizes: Keyed; side: number }[] {
  const outside = numberOf(conductor, "outsideDiameterMm", 8);
  const width = numberOf(conductor, "radialWidthMm", outside);
  const height = numberOf(conductor, "axialHeightMm", outside);
  const wasRound = String(conductor["section"]).startsWith("round");
  if (section.startsWith("round")) {
    const side = wasRound ? outside : Math.min(width, height);
    return [{ sizes: { outsideDiameterMm: side }, side }];
  }
  const rect = (w: number, h: number) => ({
    sizes: { radialWidthMm: w, axialHeightMm: h },
    side: Math.min(w, h),
  });
  if (!wasRound) return [rect(width, height)];
  const inner = Number((0.7 * outside).toPrecision(4));
  return [rect(outside, outside), rect(inner, inner)];
}

function wallFor(wall: unknown, side: number): unknown {
  if (typeof wall === "string") return wall;
  return typeof wall === "number" && wall < 0.45 * side ? wall : roundly(side / 8);
}

/** Resistivity of copper at 20 °C (IEC 60028), to start another metal from. */
const COPPER_OHM_M = 1.7241e-8;

/** The document with library or own material at `at`; what both know is carried over. `kind`: a library id, "conducting" or "other". */
export function reshapeMaterial(document: unknown, at: string, kind: string): unknown {
  if (kind !== "conducting" && kind !== "other") return withValueAt(document, at, kind);
  const before = valueAt(document, at);
  const { resistivityOhmM, ...own } = objectAt(document, at);
  const start = at.startsWith("/guides") ? { relativePermeability: 40, lossTangent: 0.01 } : {};
  const others = typeof before === "string" ? start : own;
  if (kind === "other") return withValueAt(document, at, others);
  const known = typeof before === "string" ? COPPER_OHM_M : 2.5e-7;
  return withValueAt(document, at, { resistivityOhmM: resistivityOhmM ?? known, ...others });
}

/** The document with a pair of leads, or without. */
export function reshapeLeads(document: unknown, leads: boolean): unknown {
  const side = sketch(document).copper?.section.axialMm ?? 8;
  const pair = { lengthMm: 150, spacingMm: roundly(2.5 * side) };
  return withValueAt(document, "/coil/leads", leads ? pair : undefined);
}

/** The document with its turns in two strands, turn about, or all in series. */
export function reshapeStrands(document: unknown, parallel: boolean): unknown {
  const turns = sketch(document).copper?.turns.length ?? 2;
  return withValueAt(document, "/coil/strands", parallel ? turnAbout(turns, Math.min(2, turns)) : undefined);
}

/** Values to start from when the drive is fixed another way: nothing of the former number carries over. */
const starts = { currentA: 400, partPowerW: 4000, coilVoltageV: 60 } as const;
export type DriveKey = keyof typeof starts;
export const driveKeys = Object.keys(starts) as DriveKey[];

/** The document driven by that quantity alone; a number already there stays. */
export function reshapeDrive(document: unknown, key: DriveKey): unknown {
  const drive = objectAt(document, "/drive");
  return withValueAt(document, "/drive", { ...without(drive, driveKeys), [key]: drive[key] ?? starts[key] });
}
