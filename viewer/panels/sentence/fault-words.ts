/** A refusal in the sentence's own words: keys of the document become what the blanks are called. */
import type { Fault } from "../../../meshes/refusal.ts";

const words: Readonly<Record<string, string>> = {
  outsideDiameterMm: "the outside diameter",
  radialWidthMm: "the radial width",
  axialHeightMm: "the axial height",
  wallMm: "the wall",
  boreDiameterMm: "the bore",
  topBoreDiameterMm: "the bore at the top",
  innerDiameterMm: "the inner diameter",
  pitchMm: "the pitch",
  layerPitchMm: "the pitch from layer to layer",
  centreZMm: "the height of the middle",
  zMm: "the height of the middle",
  centresMm: "the list of ring centres",
  turnsPerLayer: "the number of turns per layer",
  turns: "the number of turns",
  diameterMm: "the diameter",
  lengthMm: "the length",
  spacingMm: "the spacing",
  gapMm: "the gap",
  count: "the number of pieces",
  pointsMm: "the outline",
  strayPointsMm: "the list of points",
  temperatureC: "the temperature",
  resistivityOhmM: "the resistivity",
  relativePermeability: "the relative permeability",
  lossTangent: "the loss tangent",
  saturationT: "the saturation polarisation",
  frequencyHz: "the frequency",
  currentA: "the current",
  partPowerW: "the heat in the parts",
  coilVoltageV: "the coil voltage",
  accuracyPercent: "the accuracy",
  roundBar: "a round bar",
  rectBar: "a rectangular bar",
};

/** "turns" is as often the word as the key: the key stands at the start, before what is wrong with it. */
const key = new RegExp(
  `\\b(?:of/)?(${Object.keys(words)
    .filter((k) => k !== "turns" && k !== "count")
    .join("|")})\\b`,
  "g",
);
const atStart = /^(turns|count)(?= (is|has)\b)/;

const inWords = (text: string): string =>
  text
    .replace(atStart, (found) => words[found] ?? found)
    .replace(key, (_, found: string) => words[found] ?? found)
    .replaceAll(", without quotes", "")
    .replaceAll("is the text “”", "is empty")
    // In the units of the blanks.
    .replaceAll("a number of Hz", "a number of kHz")
    .replaceAll("a number of Ω·m", "a number of µΩ·m, or with its unit: 2.5e-7 Ω·m");

/** "… ; accepted: …" in one sentence. An unknown key is named as it stands in the document. */
export function faultWords({ detail, accepted }: Fault): string {
  if (detail.includes("is not a key known here")) return `${detail}.`;
  const told = inWords(detail);
  return accepted === undefined || detail.includes(accepted)
    ? `${told}.`
    : `${told}. Accepted: ${inWords(accepted)}.`;
}

/** Whether the fault is something no blank shows and that can only be taken away. */
export function isStray({ pointer, detail }: Fault): boolean {
  return detail.includes("is not a key known here") || pointer === "/format";
}
