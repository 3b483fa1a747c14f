/** Where a part's heat sits, in words a heat treater would use; one wording for the table and the page. */
import type { Part } from "../../meshes/design.ts";
import type { DepthShare, PartResult } from "../../meshes/result.ts";
import { percent, plain } from "./figures.ts";

export interface HeatWords {
  /** "63 % within 0.26 mm of the side, hottest at mid-length". */
  readonly short: string;
  /** The figures behind it: shares within depths of each surface, and of the halves where they differ. */
  readonly more: readonly string[];
}

/** The words for a part that takes heat; `shape` is the part as designed, which tells whether it is long or flat. */
export function heatWords(part: PartResult, shape?: Part): HeatWords {
  const short = [nearest(part), hottest(part.sliceShares, isLong(shape) ? "length" : "height")];
  const more = [
    depths(part.depthShares, "the surface"),
    // A solid cylinder's side tells little beyond its nearest surface; with a bore the two sides are worth telling apart.
    part.boreDepthShares === null ? "" : depths(part.sideDepthShares, "the outer side"),
    depths(part.boreDepthShares, "the bore"),
    halves(part.sliceShares),
  ];
  return { short: short.filter(isSaid).join(", "), more: more.filter(isSaid) };
}

const isSaid = (words: string): boolean => words !== "";

/** Longer than wide, so that people speak of its length. */
function isLong(shape: Part | undefined): boolean {
  return shape?.shape === "cylinder" && shape.lengthMm >= shape.diameterMm;
}

/** Shares of at least this much of the nearest surface's make one side its own home of the heat. */
const most = 0.7;

/** "63 % within 0.26 mm of the side": the share within half a skin depth of the surface where most of it lies. */
function nearest(part: PartResult): string {
  const any = part.depthShares?.[0];
  if (any === undefined) return "";
  if (any.share > all) return "heated right through";
  if (any.share < nothing) return "next to none at the surface";
  const side = part.boreDepthShares === null ? "the side" : "the outer side";
  const homes: readonly (readonly [DepthShare | undefined, string])[] = [
    [part.sideDepthShares?.[0], side],
    [part.boreDepthShares?.[0], "the bore"],
  ];
  const [home] = homes
    .filter(([share]) => (share?.share ?? 0) >= most * any.share)
    .sort(([a], [b]) => (b?.share ?? 0) - (a?.share ?? 0));
  const [share, name] = home ?? [any, "the surface"];
  return `${wholePercent((share ?? any).share)} within ${plain(any.depthMm, 2)} mm of ${name}`;
}

const all = 0.9995;
const nothing = 5e-4;

/** "63 %"; what is not quite all or nothing is not rounded to it. */
function wholePercent(share: number): string {
  if (share < 0.01) return "under 1 %";
  return share > 0.99 ? "over 99 %" : `${Math.round(100 * share)} %`;
}

function depths(shares: readonly DepthShare[] | null, from: string): string {
  if (shares === null || shares.length === 0) return "";
  if (shares.every(({ share }) => share < nothing)) return `next to none at ${from}`;
  if (shares.every(({ share }) => share > all))
    return `all within ${plain(shares[0]!.depthMm, 3)} mm of ${from}`;
  const list = shares.map(({ depthMm, share }) => `${percent(share)} within ${plain(depthMm, 3)} mm`);
  return `${list.join(", ")} of ${from}`;
}

/** Where between bottom and top, in words; each holds up to its bound, in lengths of the part. */
const places: readonly (readonly [upTo: number, words: string])[] = [
  [0.12, "at the bottom end"],
  [0.29, "about a quarter up"],
  [0.42, "about a third up"],
  [0.58, ""],
  [0.71, "about two thirds up"],
  [0.88, "about three quarters up"],
  [1, "at the top end"],
];

/** "hottest at mid-length": where along it most power per length arises, from eight equal slices, bottom first. */
function hottest(shares: readonly number[], along: "length" | "height"): string {
  const largest = Math.max(...shares);
  if (largest <= 0) return "";
  if (largest < 1.5 * Math.min(...shares)) return `even along its ${along}`;
  const warm = shares.flatMap((share, k) => (share >= 0.9 * largest ? [k] : []));
  const [first, last] = [warm[0]!, warm.at(-1)!];
  // A dip between the warmest slices means two warm places, which no middle can stand for.
  if (Math.min(...shares.slice(first, last + 1)) < 0.7 * largest) return "hottest towards both ends";
  const at = (first + last + 1) / 2 / shares.length;
  const words = places.find(([upTo]) => at <= upTo)?.[1] ?? "";
  return `hottest ${words === "" ? `at mid-${along}` : words}`;
}

/** "69.3 % in the upper half", where the halves differ by more than a tenth of the whole. */
function halves(shares: readonly number[]): string {
  const upper = shares.slice(shares.length / 2).reduce((a, b) => a + b, 0);
  if (upper > 0.55) return `${percent(upper)} in the upper half`;
  return upper < 0.45 && upper > 0 ? `${percent(1 - upper)} in the lower half` : "";
}
