/** The design in a winder's sentence, for the head of the table and the picture. */
import { plain, plainFigure } from "./figures.ts";

type Json = unknown;

/** The value at a path of keys, undefined where there is none. */
function at(document: Json, ...keys: string[]): Json {
  return keys.reduce<Json>(
    (value, key) =>
      typeof value === "object" && value !== null ? (value as Record<string, Json>)[key] : undefined,
    document,
  );
}

function mm(document: Json, ...keys: string[]): string {
  const value = at(document, ...keys);
  return `${typeof value === "number" ? plain(value, 6) : "?"} mm`;
}

/** Two lengths as "8 × 10 mm". */
function across(document: Json, first: string, second: string): string {
  return `${mm(document, first).replace(" mm", "")} × ${mm(document, second)}`;
}

function conductor(design: Json): string {
  const c = at(design, "coil", "conductor");
  const section = at(c, "section");
  const round = section === "roundTube" || section === "roundBar";
  const size = round ? mm(c, "outsideDiameterMm") : across(c, "radialWidthMm", "axialHeightMm");
  const tube = section === "roundTube" || section === "rectTube";
  const material = at(c, "material");
  const name = typeof material === "string" ? ` ${material}` : "";
  return `${round ? "round" : "rectangular"}${name} ${tube ? "tube" : "bar"} ${size}${tube ? `, wall ${mm(c, "wallMm")}` : ""}`;
}

function pitch(winding: Json, key = "pitchMm"): string {
  if (Array.isArray(at(winding, key))) return "an uneven pitch";
  return at(winding, key) === undefined ? "" : `a pitch of ${mm(winding, key)}`;
}

function count(n: Json, one: string): string {
  return `${String(n)} ${one}${n === 1 ? "" : "s"}`;
}

/** "7 turns of round copper tube 8 mm, wall 1 mm, on a bore of 50 mm at a pitch of 10.5 mm". */
export function coilSentence(design: Json): string {
  const w = at(design, "coil", "winding");
  const copper = conductor(design);
  const turns = `${count(at(w, "turns"), "turn")} of ${copper}`;
  const step = pitch(w);
  const atPitch = step === "" || at(w, "turns") === 1 ? "" : ` at ${step}`;
  switch (at(w, "form")) {
    case "helix":
      return `${turns}, on a bore of ${mm(w, "boreDiameterMm")}${atPitch}`;
    case "spiral":
      return `${turns}, flat, around a clear ${mm(w, "innerDiameterMm")}${atPitch}`;
    case "cone":
      return `${turns}, on a cone of ${mm(w, "boreDiameterMm")} bore below and ${mm(w, "topBoreDiameterMm")} above${atPitch}`;
    case "layers":
      return `${count(at(w, "layers"), "layer")} of ${count(at(w, "turnsPerLayer"), "turn")} of ${copper}, on a bore of ${mm(w, "boreDiameterMm")}${atPitch}`;
    default: {
      const centres = at(w, "centresMm");
      return `${count(Array.isArray(centres) ? centres.length : "?", "ring")} of ${copper}`;
    }
  }
}

/** "400 A at 10 kHz". */
export function driveSentence(design: Json): string {
  const drive = at(design, "drive");
  const number = (key: string): number | null => {
    const value = at(drive, key);
    return typeof value === "number" ? value : null;
  };
  const current = number("currentA");
  const power = number("partPowerW");
  const voltage = number("coilVoltageV");
  const what =
    current !== null
      ? plainFigure(current, "A", 6)
      : power !== null
        ? `${plainFigure(power, "W", 6)} into the parts`
        : `${plainFigure(voltage ?? 0, "V", 6)} across the coil`;
  return `${what} at ${plainFigure(number("frequencyHz") ?? 0, "Hz", 6)}`;
}

/** The design's name, or a plain stand-in. */
export function designName(design: Json): string {
  const name = at(design, "name");
  return typeof name === "string" && name.trim() !== "" ? name : "Unnamed design";
}

/** The accuracy that was asked for, per cent. */
export function askedPercent(design: Json): number {
  const asked = at(design, "accuracyPercent");
  return typeof asked === "number" ? asked : 0.2;
}
