/** What the pointer reads off a heat picture, in words. */
import { decimalsFor, homelyUnit, plain } from "../../../api/format/figures.ts";
import { printable } from "../../../api/format/sentence.ts";
import { mmFromMetres } from "../../../meshes/units.ts";
import { boundsOf, depthBelow, type Heat } from "../../heat.ts";

/** A place on the section that is being read, m; r ≥ 0. */
export interface Seen {
  readonly r: number;
  readonly z: number;
  /** −1 in the open. */
  readonly cell: number;
  /** On the surface itself, however far the drawn cells' corners cut it. */
  readonly outside?: boolean;
}

export interface SeenWords {
  /** "3187 W/cm³", or what is there instead. */
  readonly value: string;
  /** "chisel shank". */
  readonly body: string;
  /** "r 14.00 mm, z −0.69 mm, 0.02 mm deep". */
  readonly place: string;
}

/** A density for people. */
export function densityWords(density: number): string {
  const unit = homelyUnit({ factor: 1e6, symbol: "W/cm³" }, [density]);
  return `${plain(density / unit.factor, 3)} ${unit.symbol}`;
}

/** Depths below this share of the whole picture's size are the surface itself. */
const skinOfPaint = 1e-5;

/** The words for what is seen; decimals by the size of the whole design. */
export function seenWords(heat: Heat, { r, z, cell, outside }: Seen): SeenWords {
  const { rMax, zMin, zMax } = boundsOf(heat.outlines);
  const size = Math.max(rMax, Math.abs(zMin), Math.abs(zMax));
  const decimals = decimalsFor([mmFromMetres(size)], 4);
  // Rounding to nothing would leave a minus before it.
  const mm = (x: number): string =>
    (Number(mmFromMetres(x).toFixed(decimals)) || 0).toFixed(decimals).replace("-", "−");
  const at = `r ${mm(r)} mm, z ${mm(z)} mm`;
  if (cell < 0) return { value: "open", body: "", place: at };
  const index = heat.outline[cell]!;
  const body = heat.outlines[index]!;
  const density = heat.density[cell]!;
  const deep = outside === true ? 0 : depthBelow(heat.outlines, index, r, z);
  const depth =
    deep < skinOfPaint * size ? "at its surface" : `${plain(mmFromMetres(deep), 2)} mm below its surface`;
  return {
    value: density > 0 ? densityWords(density) : "no heat",
    body: body.role === "guide" ? `${printable(body.name)} (guide)` : printable(body.name),
    place: `${at}, ${depth}`,
  };
}
