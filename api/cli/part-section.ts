/** One part's lines in the people's table: its power, its surface, and where its heat sits. */
import type { DepthShare, PartResult } from "../../meshes/result.ts";
import { figure, percent, plain } from "./figures.ts";
import { columns, wrap } from "./layout.ts";

/** Lines of one part, two blanks in. */
export function partSection(part: PartResult): string[] {
  if (part.powerW.value === 0) return ["  takes no heat"];
  return [...keyFigures(part), ...whereItSits(part), ...slices(part.sliceShares)];
}

function keyFigures(part: PartResult): string[] {
  const rows = [
    ["power", figure(part.powerW, "W")],
    ["over its whole surface", figure(part.surfaceWPerM2, perArea)],
    ["surface field H", figure(part.surfaceHAPerM, "A/m")],
    ["hottest spot", `${figure(part.peakWPerM3, perVolume)}${spot(part.hotSpotMm)}`],
  ];
  if (part.skinDepthMm !== null) rows.push(["skin depth", `${plain(part.skinDepthMm, 3)} mm`]);
  return columns(rows, ["left", "left"]);
}

/** Powers per area and volume are told as heat treaters note them, never in prefixes. */
const perArea = { factor: 1e4, symbol: "W/cm²" };
const perVolume = { factor: 1e6, symbol: "W/cm³" };

function spot(at: readonly number[] | null): string {
  if (at === null) return "";
  const [r, z] = at.map((mm) => String(Number(mm.toFixed(2))));
  return ` at r ${r}, z ${z} mm`;
}

/** "63 % within 0.16 mm of the surface, …, hottest at mid-height." */
function whereItSits(part: PartResult): string[] {
  const sentences = [
    depths(part.depthShares, "the surface"),
    // A solid cylinder's side tells little beyond its nearest surface; with a bore the two sides are worth telling apart.
    part.boreDepthShares === null ? "" : depths(part.sideDepthShares, "the outer side"),
    depths(part.boreDepthShares, "the bore"),
  ].filter((sentence) => sentence !== "");
  const text = sentences.length === 0 ? "" : `Its heat: ${sentences.join("; ")}; `;
  return wrap(`${text}${text === "" ? "Most" : "most"} of it ${height(part.sliceShares)}.`, "  ");
}

function depths(shares: readonly DepthShare[] | null, from: string): string {
  if (shares === null) return "";
  if (shares.every(({ share }) => share < 5e-4)) return `next to none at ${from}`;
  const list = shares.map(({ depthMm, share }) => `${percent(share)} within ${plain(depthMm, 3)} mm`);
  return `${list.join(", ")} of ${from}`;
}

/** Where along the height the warmest neighbourhood lies, in words. */
function height(shares: readonly number[]): string {
  const centre = shares.reduce((sum, share, k) => sum + share * (k + 0.5), 0) / 8;
  const middle = shares.slice(2, 6).reduce((sum, share) => sum + share, 0);
  const ends = 1 - middle;
  if (centre > 0.6) return "towards the top";
  if (centre < 0.4) return "towards the bottom";
  if (middle > 0.6) return "around mid-height";
  if (ends > 0.6) return "towards both ends";
  return "spread evenly along its height";
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
