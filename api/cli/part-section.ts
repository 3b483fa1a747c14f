/** One part's lines in the people's table: its power, its surface, and where its heat sits. */
import type { DepthShare, PartResult } from "../../meshes/result.ts";
import { decimalsFor, figure, homelyUnit, percent, plain } from "../format/figures.ts";
import { columns, wrap } from "./layout.ts";

/** Lines of one part, two blanks in. */
export function partSection(part: PartResult): string[] {
  if (part.powerW.value === 0) return ["  takes no heat"];
  return [...keyFigures(part), ...whereItSits(part), ...slices(part.sliceShares)];
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

/** "Its heat: 63 % within 0.16 mm, … of the surface; most of it around mid-height." */
function whereItSits(part: PartResult): string[] {
  const sentences = [
    depths(part.depthShares, "the surface"),
    // A solid cylinder's side tells little beyond its nearest surface; with a bore the two sides are worth telling apart.
    part.boreDepthShares === null ? "" : depths(part.sideDepthShares, "the outer side"),
    depths(part.boreDepthShares, "the bore"),
    height(part.sliceShares),
  ];
  return wrap(`Its heat: ${sentences.filter((sentence) => sentence !== "").join("; ")}.`, "  ");
}

function depths(shares: readonly DepthShare[] | null, from: string): string {
  if (shares === null || shares.length === 0) return "";
  if (shares.every(({ share }) => share < 5e-4)) return `next to none at ${from}`;
  if (shares.every(({ share }) => share > 0.9995))
    return `all within ${plain(shares[0]!.depthMm, 3)} mm of ${from}`;
  const list = shares.map(({ depthMm, share }) => `${percent(share)} within ${plain(depthMm, 3)} mm`);
  return `${list.join(", ")} of ${from}`;
}

/** Where along the height most of it lies, in words. */
function height(shares: readonly number[]): string {
  const sum = (from: number, to: number): number => shares.slice(from, to).reduce((a, b) => a + b, 0);
  if (Math.max(...shares) < 1.5 * Math.min(...shares)) return "spread evenly along its height";
  const upper = sum(4, 8);
  const middle = sum(2, 6);
  if (upper > 0.6) return `${percent(upper)} in the upper half`;
  if (upper < 0.4) return `${percent(1 - upper)} in the lower half`;
  if (middle > 0.6) return "most of it around mid-height";
  if (middle < 0.4) return "most of it towards both ends";
  return upper >= 0.5 ? `${percent(upper)} in the upper half` : `${percent(1 - upper)} in the lower half`;
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
