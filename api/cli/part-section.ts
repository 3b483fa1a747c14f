/** One part's lines in the people's table: its power, its surface, and where its heat sits. */
import type { Part } from "../../meshes/design.ts";
import type { PartResult } from "../../meshes/result.ts";
import { decimalsFor, figure, homelyUnit, percent, plain } from "../format/figures.ts";
import { heatWords } from "../format/heat-words.ts";
import { columns, wrap } from "./layout.ts";

/** Lines of one part, two blanks in; `shape` is the part as designed. */
export function partSection(part: PartResult, shape: Part | undefined): string[] {
  if (part.powerW.value === 0) return ["  takes no heat"];
  return [...keyFigures(part), ...whereItSits(part, shape), ...slices(part.sliceShares)];
}

function keyFigures(part: PartResult): string[] {
  const rows = [
    ["power", figure(part.powerW, "W")],
    ["over its whole surface", figure(part.surfaceWPerM2, homelyUnit(perArea, [part.surfaceWPerM2.value]))],
    ["surface field H", figure(part.surfaceHAPerM, "A/m")],
    [
      "hottest spot",
      `${figure(part.peakWPerM3, homelyUnit(perVolume, [part.peakWPerM3.value]))}${spot(part.hotSpotMm)}`,
    ],
  ];
  if (part.skinDepthMm !== null) rows.push(["skin depth", `${plain(part.skinDepthMm, 3)} mm`]);
  return columns(rows, ["left", "left"]);
}

/** Powers per area and volume are told as heat treaters note them, prefixes only where those do not reach. */
const perArea = { factor: 1e4, symbol: "W/cm²" };
const perVolume = { factor: 1e6, symbol: "W/cm³" };

function spot(at: readonly number[] | null): string {
  if (at === null) return "";
  const decimals = decimalsFor(at, 4);
  const [r, z] = at.map((mm) => String(Number(mm.toFixed(decimals))));
  return ` at r ${r}, z ${z} mm`;
}

/** "Its heat: 63 % within 0.26 mm of the side, hottest at mid-length. 63.2 % within …; …." */
function whereItSits(part: PartResult, shape: Part | undefined): string[] {
  const { short, more } = heatWords(part, shape);
  const said = [short, more.join("; ")].filter((words) => words !== "");
  return said.length === 0 ? [] : wrap(`Its heat: ${said.join(". ")}.`, "  ");
}

const barLength = 30;

/** Eight bars, top slice first, as the part stands. */
function slices(shares: readonly number[]): string[] {
  const largest = Math.max(...shares);
  if (largest <= 0) return [];
  const rows = [...shares].reverse().map((share, k) => {
    const label = k === 0 ? "top slice" : k === 7 ? "bottom slice" : "";
    return [label, percent(share), "█".repeat(Math.max(0, Math.round((barLength * share) / largest)))];
  });
  return columns(rows, ["left", "right", "left"]);
}
