/** The design in a winder's sentence, for the head of the table and the picture. */
import type { Conductor, Design, Winding } from "../../meshes/design.ts";
import { plain, plainFigure } from "./figures.ts";

const mm = (value: number): string => `${plain(value, 6)} mm`;

const count = (n: number, one: string): string => `${n} ${one}${n === 1 ? "" : "s"}`;

/** A name as it may be printed: control characters, which a terminal would obey, become blanks. */
export function printable(name: string): string {
  return name.replace(/\p{C}+/gu, " ").trimEnd();
}

/** "round copper tube 8 mm, wall 1 mm". */
function conductorWords(c: Conductor): string {
  const size =
    "outsideDiameterMm" in c
      ? mm(c.outsideDiameterMm)
      : `${plain(c.radialWidthMm, 6)} × ${mm(c.axialHeightMm)}`;
  const shape = "outsideDiameterMm" in c ? "round" : "rectangular";
  const material = typeof c.material === "string" ? ` ${c.material}` : "";
  return `${shape}${material} ${"wallMm" in c ? "tube" : "bar"} ${size}${"wallMm" in c ? `, wall ${mm(c.wallMm)}` : ""}`;
}

/** " at a pitch of 10.5 mm", or nothing where there is no step. */
function pitchWords(pitch: number | readonly number[] | undefined, turns: number): string {
  if (pitch === undefined || turns === 1) return "";
  return typeof pitch === "number" ? ` at a pitch of ${mm(pitch)}` : " at an uneven pitch";
}

function windingWords(w: Winding, copper: string): string {
  switch (w.form) {
    case "helix":
      return `${count(w.turns, "turn")} of ${copper}, on a bore of ${mm(w.boreDiameterMm)}${pitchWords(w.pitchMm, w.turns)}`;
    case "spiral":
      return `${count(w.turns, "turn")} of ${copper}, flat, around a clear ${mm(w.innerDiameterMm)}${pitchWords(w.pitchMm, w.turns)}`;
    case "cone":
      return `${count(w.turns, "turn")} of ${copper}, on a cone of ${mm(w.boreDiameterMm)} bore below and ${mm(w.topBoreDiameterMm)} above${pitchWords(w.pitchMm, w.turns)}`;
    case "layers":
      return `${count(w.layers, "layer")} of ${count(w.turnsPerLayer, "turn")} of ${copper}, on a bore of ${mm(w.boreDiameterMm)}${pitchWords(w.pitchMm, w.turnsPerLayer)}`;
    case "rings":
      return `${count(w.centresMm.length, "ring")} of ${copper}`;
  }
}

/** "7 turns of round copper tube 8 mm, wall 1 mm, on a bore of 50 mm at a pitch of 10.5 mm". */
export function coilSentence({ conductor, winding, strands }: Design["coil"]): string {
  const parallel =
    strands === undefined || strands.length === 1 ? "" : `, ${strands.length} strands in parallel`;
  return windingWords(winding, conductorWords(conductor)) + parallel;
}

/** "400 A at 10 kHz". */
export function driveSentence({ currentA, partPowerW, coilVoltageV, frequencyHz }: Design["drive"]): string {
  const what =
    currentA !== undefined
      ? plainFigure(currentA, "A", 6)
      : partPowerW !== undefined
        ? `${plainFigure(partPowerW, "W", 6)} into the parts`
        : `${plainFigure(coilVoltageV ?? 0, "V", 6)} across the coil`;
  return `${what} at ${plainFigure(frequencyHz, "Hz", 6)}`;
}
