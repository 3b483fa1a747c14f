/** What the drawing measures, in mm: bore, pitch, gap, heights and lengths, each with the blank it leads to. */
import { boxAround, type Copper, type Layout, type Placed } from "../../../meshes/layout.ts";
import type { Xy } from "../../../meshes/planar.ts";
import type { TurnMm } from "../../../meshes/windings.ts";
import { type Gap, isAcross, narrowestGap } from "./gap.ts";

export type Side = "top" | "bottom" | "left" | "right";

/** A measure told in a lane beside the drawing. Along the lane: r for top and bottom (negative: the left half), z for left and right. */
export interface Dimension {
  readonly side: Side;
  readonly from: number;
  readonly to: number;
  /** Where its extension lines start, across the lane. */
  readonly fromAt: number;
  readonly toAt: number;
  /** What stands at it, and what it is in full. */
  readonly words: string;
  readonly label: string;
  readonly pointer: string;
  /** A measure drawn at its place instead, with one leader from its middle to the words. */
  readonly segment?: readonly [Xy, Xy];
}

const WINDING = "/coil/winding";

/** A length as a drawing writes it. */
export const mm = (x: number): string => String(Number(x.toPrecision(5)) + 0);

/** A length that follows from others, no finer than anyone measures. */
const about = (x: number): string => String(Number(x.toPrecision(4)) + 0);

/** More parts than this are not measured one by one. */
const MOST_PARTS = 3;

export function dimensionsOf({ copper, bodies }: Layout): Dimension[] {
  const parts = bodies.filter((b) => b.pointer.startsWith("/parts"));
  const measured = parts.slice(0, MOST_PARTS);
  const gap = copper === null ? null : narrowestGap(copper, parts);
  return [
    ...(copper === null ? [] : coilDimensions(copper)),
    ...measured.flatMap((part) => partDimensions(part, measured.length > 1)),
    ...(gap === null ? [] : [gapDimension(gap, bodies)]),
  ];
}

// Coil

function coilDimensions(copper: Copper): Dimension[] {
  const { winding } = copper;
  switch (winding.form) {
    case "helix":
      return [
        boreAt(copper, "boreDiameterMm", "bore", "bore of the coil"),
        ...pitches(copper, copper.turns, "right"),
        ...height(copper, "turns"),
      ];
    case "cone": {
      const top = copper.turns.at(-1)!;
      return [
        boreAt(copper, "topBoreDiameterMm", "top bore", "bore at the top", top),
        {
          ...boreAt(copper, "boreDiameterMm", "bottom bore", "bore at the bottom", copper.turns[0]!),
          side: "bottom",
        },
        ...pitches(copper, copper.turns, "right"),
        ...height(copper, "turns"),
      ];
    }
    case "layers": {
      const last = copper.turns.slice(-winding.turnsPerLayer);
      const firsts = copper.turns.filter((_, k) => k % winding.turnsPerLayer === winding.turnsPerLayer - 1);
      return [
        boreAt(copper, "boreDiameterMm", "bore", "bore of the coil"),
        ...pitches(copper, last, "right"),
        ...layerPitch(firsts),
        ...height(copper, "turnsPerLayer"),
      ];
    }
    case "spiral":
      return [
        boreAt(copper, "innerDiameterMm", "clear", "clear inner diameter of the coil"),
        ...pitches(copper, copper.turns, "top"),
        across(copper),
      ];
    case "rings":
      return [
        { ...boreAt(copper, "centresMm", "bore", "bore of the coil", innermost(copper.turns)) },
        ...height(copper, "centresMm"),
      ];
  }
}

const innermost = (turns: readonly TurnMm[]): TurnMm =>
  turns.reduce((least, t) => (t.r < least.r - 1e-9 || (t.r < least.r + 1e-9 && t.z > least.z) ? t : least));

/** Clear diameter inside a turn, the uppermost if not said otherwise; across both halves. */
function boreAt(
  copper: Copper,
  key: string,
  words: string,
  label: string,
  turn = innermost(copper.turns),
): Dimension {
  const r = turn.r - copper.section.radialMm / 2;
  return {
    side: "top",
    from: -r,
    to: r,
    fromAt: turn.z,
    toAt: turn.z,
    words: `${words} ${mm(2 * r)}`,
    label,
    pointer: `${WINDING}/${key}`,
  };
}

/** An even pitch once, amid the turns; uneven ones each, up to eight. */
function pitches(copper: Copper, turns: readonly TurnMm[], side: "right" | "top"): Dimension[] {
  const pitch = "pitchMm" in copper.winding ? copper.winding.pitchMm : undefined;
  const steps = turns.length - 1;
  if (steps < 1) return [];
  const pointer = `${WINDING}/pitchMm`;
  const at = (k: number, words: string): Dimension => {
    const [a, b] = [turns[k]!, turns[k + 1]!];
    const value = side === "right" ? b.z - a.z : b.r - a.r;
    const along =
      side === "right"
        ? { from: a.z, to: b.z, fromAt: a.r, toAt: b.r }
        : { from: a.r, to: b.r, fromAt: a.z, toAt: b.z };
    return {
      side,
      ...along,
      words: `${words}${mm(value)}`,
      label: "pitch, centre to centre",
      pointer,
    };
  };
  if (!Array.isArray(pitch) || steps > 8) return [at(Math.floor(steps / 2), "pitch ")];
  return Array.from({ length: steps }, (_, k) => at(k, ""));
}

function layerPitch(uppermost: readonly TurnMm[]): Dimension[] {
  const [a, b] = uppermost.slice(-2);
  if (a === undefined || b === undefined) return [];
  return [
    {
      side: "top",
      from: a.r,
      to: b.r,
      fromAt: a.z,
      toAt: b.z,
      words: `layers ${mm(b.r - a.r)}`,
      label: "pitch from layer to layer",
      pointer: `${WINDING}/layerPitchMm`,
    },
  ];
}

function height(copper: Copper, key: string): Dimension[] {
  const box = boxAround(copper.figures);
  if (box === null || copper.turns.length < 2) return [];
  const value = mm(box.high - box.low);
  return [
    {
      side: "right",
      from: box.low,
      to: box.high,
      fromAt: box.right,
      toAt: box.right,
      words: `coil ${value} high`,
      label: "height of the coil over its copper",
      pointer: `${WINDING}/${key}`,
    },
  ];
}

function across(copper: Copper): Dimension {
  const outer = copper.turns.at(-1)!;
  const r = outer.r + copper.section.radialMm / 2;
  return {
    side: "top",
    from: -r,
    to: r,
    fromAt: outer.z,
    toAt: outer.z,
    words: `coil ${mm(2 * r)} across`,
    label: "diameter of the coil over its copper",
    pointer: `${WINDING}/turns`,
  };
}

// Parts

function partDimensions(part: Placed, named: boolean): Dimension[] {
  const box = boxAround(part.pieces);
  if (box === null) return [];
  const { body, pointer } = part;
  const stack = body.shape === "stack";
  const solid = stack ? body.of : body;
  const at = stack ? `${pointer}/of` : pointer;
  const key = (name: string) => (solid.shape === "outline" ? `${at}/pointsMm` : `${at}/${name}`);
  const who = named ? `${short(part.label)} ` : "";
  const diameter = (value: number, words: string, label: string, name: string): Dimension => ({
    side: "bottom",
    from: -value / 2,
    to: value / 2,
    fromAt: solid.shape === "sphere" ? (box.low + box.high) / 2 : box.low,
    toAt: solid.shape === "sphere" ? (box.low + box.high) / 2 : box.low,
    words: `${who}${words}`,
    label: `${label} of ${part.label}`,
    pointer: key(name),
  });
  const long = mm(box.high - box.low);
  const bore = solid.shape === "cylinder" ? solid.boreDiameterMm : 0;
  return [
    diameter(2 * box.right, `${mm(2 * box.right)} across`, "diameter", "diameterMm"),
    ...(bore > 0 ? [diameter(bore, `bored ${mm(bore)}`, "bore", "boreDiameterMm")] : []),
    ...(solid.shape === "sphere" && !stack
      ? []
      : [
          {
            side: "left",
            from: box.low,
            to: box.high,
            fromAt: -box.right,
            toAt: -box.right,
            words: `${who}${long} long`,
            label: `length of ${part.label}`,
            pointer: stack ? `${pointer}/count` : key("lengthMm"),
          } as const,
        ]),
  ];
}

const short = (name: string): string => (name.length > 14 ? `${name.slice(0, 13)}…` : name);

// Gap

function gapDimension(gap: Gap, bodies: readonly Placed[]): Dimension {
  const placed = bodies.find((b) => b.pointer === gap.pointer)!;
  const middle: Xy = [(gap.part[0] + gap.copper[0]) / 2, (gap.part[1] + gap.copper[1]) / 2];
  const level = isAcross(gap);
  const along = level ? middle[0] : middle[1];
  const start = level ? middle[1] : middle[0];
  return {
    side: level ? "top" : "right",
    from: along,
    to: along,
    fromAt: start,
    toAt: start,
    words: `gap ${about(gap.distance)}`,
    label: `gap between the coil and ${placed.label}`,
    pointer: gapPointer(gap, placed),
    segment: [gap.part, gap.copper],
  };
}

/** The blank that moves the part's face at the gap. */
function gapPointer(gap: Gap, { body, pointer }: Placed): string {
  const solid = body.shape === "stack" ? body.of : body;
  const at = body.shape === "stack" ? `${pointer}/of` : pointer;
  if (solid.shape === "outline") return `${at}/pointsMm`;
  if (!isAcross(gap)) return `${at}/centreZMm`;
  return solid.shape === "cylinder" && gap.part[0] > gap.copper[0]
    ? `${at}/boreDiameterMm`
    : `${at}/diameterMm`;
}
