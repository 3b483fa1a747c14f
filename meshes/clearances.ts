/** What stands in whose way: copper keeps clear of everything, parts and guides may touch along edges but share no room. */
import { measureFaults } from "./bodies.ts";
import { copperFaults } from "./copper.ts";
import { limits } from "./design.ts";
import { beside, clearOfCopper } from "./hints.ts";
import { boxAround, type Copper, type Layout, type Placed, type Scale, scaleOf } from "./layout.ts";
import { type Box, boxDistance, type Separation } from "./planar.ts";
import type { Fault } from "./refusal.ts";
import { type Figure, figureBox, separation } from "./shapes.ts";
import { SHARPEST, sharpestWedge } from "./wedges.ts";
import { figure } from "./words.ts";

/** Every geometric fault of a layout, one entry each. */
export function clearanceFaults(layout: Layout): Fault[] {
  const vast = vastFaults(layout);
  if (vast.length > 0) return vast;
  const scale = scaleOf(layout);
  const { copper, bodies } = layout;
  const against = bodies.flatMap((body, k) => [
    ...(copper === null ? [] : copperAgainst(copper, body, scale)),
    ...bodies.slice(0, k).flatMap((earlier) => bodyAgainst(earlier, body, scale)),
  ]);
  return [
    ...(copper === null ? [] : copperFaults(copper, scale)),
    ...bodies.flatMap((b) => measureFaults(b.body, b.pointer, scale)),
    ...against,
  ];
}

/** Each length is bounded by the schema, but their sums are not. */
function vastFaults({ copper, bodies }: Layout): Fault[] {
  const all: [string, readonly Figure[]][] = bodies.map((b) => [b.pointer, b.pieces]);
  if (copper !== null) all.unshift(["/coil/winding", copper.figures]);
  return all.flatMap(([pointer, figures]) => {
    const box = boxAround(figures);
    if (box === null) return [];
    const reach = Math.max(box.right, box.high, -box.low);
    if (reach <= 2 * limits.largestMm) return [];
    const detail = `it reaches ${figure(reach)} mm from the middle; at most ${2 * limits.largestMm} mm are solved`;
    return [{ pointer, detail }];
  });
}

/** One fault a body, naming the turn it is deepest in. */
function copperAgainst(copper: Copper, placed: Placed, scale: Scale): Fault[] {
  const found = nearestTurn(copper, placed, scale);
  if (found === null) return [];
  const { turn, others, overlap, gap } = found;
  const more = others === 0 ? "" : `; ${others} more ${others === 1 ? "turn is" : "turns are"} in the way`;
  const note = `(turns counted from 0${more})`;
  const detail =
    overlap > 0
      ? `${placed.label} overlaps turn ${turn} by ${figure(overlap)} mm ${note}`
      : gap > 0
        ? `${placed.label} leaves only ${figure(gap)} mm to turn ${turn}, too fine to resolve ${note}`
        : `${placed.label} touches turn ${turn}, but copper has to keep clear of everything ${note}`;
  const accepted = clearOfCopper(copper, placed) ?? `at least ${figure(scale.finest)} mm clear of the copper`;
  return [{ pointer: placed.pointer, detail, accepted }];
}

interface Nearest {
  readonly turn: number;
  readonly others: number;
  readonly overlap: number;
  readonly gap: number;
}

/** The turn deepest inside a body or closest to it, among those without clearance; null when all stand clear. */
function nearestTurn(copper: Copper, placed: Placed, scale: Scale): Nearest | null {
  const pieces = placed.pieces.map((piece) => ({ piece, box: figureBox(piece) }));
  let nearest: Nearest | null = null;
  let count = 0;
  copper.figures.forEach((turnFigure, turn) => {
    const worst = worstOf(turnFigure, figureBox(turnFigure), pieces, scale.touch, scale.finest);
    if (worst === null || worst.gap >= scale.finest) return;
    count += 1;
    const deeper =
      nearest === null || worst.overlap - worst.gap > nearest.overlap - nearest.gap + scale.touch;
    if (deeper) nearest = { turn, others: 0, overlap: worst.overlap, gap: worst.gap };
  });
  return nearest === null ? null : { ...(nearest as Nearest), others: count - 1 };
}

interface Boxed {
  readonly piece: Figure;
  readonly box: Box;
}

/** The closest separation of a figure from pieces within reach; null when none is. */
function worstOf(
  f: Figure,
  box: Box,
  pieces: readonly Boxed[],
  touch: number,
  reach: number,
): Separation | null {
  let worst: Separation | null = null;
  for (const { piece, box: other } of pieces) {
    if (boxDistance(box, other) <= reach) worst = worse(worst, separation(f, piece, touch));
  }
  return worst;
}

/** The deeper of two separations, with the nearest miss of both. */
function worse(a: Separation | null, b: Separation): Separation {
  if (a === null) return b;
  const nearMiss = Math.min(a.nearMiss, b.nearMiss);
  return { ...(b.overlap - b.gap > a.overlap - a.gap ? b : a), nearMiss };
}

/** At most one fault a pair, at the later of the two. */
function bodyAgainst(earlier: Placed, later: Placed, scale: Scale): Fault[] {
  const pieces = earlier.pieces.map((piece) => ({ piece, box: figureBox(piece) }));
  const reach = boxAround(earlier.pieces);
  let worst: Separation | null = null;
  for (const piece of later.pieces) {
    const box = figureBox(piece);
    if (reach === null || boxDistance(box, reach) > scale.finest) continue;
    const found = worstOf(piece, box, pieces, scale.touch, scale.finest);
    if (found !== null) worst = worse(worst, found);
  }
  if (worst === null) return [];
  const pair = `${later.label} ${worst.overlap > 0 ? "overlaps" : "touches"} ${earlier.label}`;
  const fault = (detail: string, accepted: string): Fault[] => [{ pointer: later.pointer, detail, accepted }];
  if (worst.overlap > 0) {
    return fault(
      `${pair} by ${figure(worst.overlap)} mm`,
      beside(later, earlier) ?? "a place beside it; edges may touch",
    );
  }
  const round = [...earlier.pieces, ...later.pieces].some((p) => p.kind === "disc");
  if (round && worst.gap === 0) {
    return fault(
      `${pair} in a single point or line of a round surface, and what passes there nobody knows`,
      `a gap of at least ${figure(Math.max(scale.finest, thousandth(earlier, later)))} mm`,
    );
  }
  if (worst.nearMiss < scale.finest) {
    const detail = `between ${later.label} and ${earlier.label} ${figure(worst.nearMiss)} mm are left, too fine to resolve`;
    return fault(detail, `edges and corners that touch exactly, or stay ${figure(scale.finest)} mm apart`);
  }
  const wedge = worst.gap === 0 ? wedgeBetween(earlier, later, scale.touch) : 1;
  if (wedge < SHARPEST) {
    const degrees = figure((Math.asin(wedge) * 180) / Math.PI);
    return fault(
      `${pair} and leaves a wedge of ${degrees} degrees there, too sharp to resolve`,
      "faces that lie on each other, or wedges of at least 0.5 degrees",
    );
  }
  return [];
}

/** Sine of the sharpest wedge left between the outlines of two bodies that touch. */
function wedgeBetween(a: Placed, b: Placed, touch: number): number {
  const outlines = (body: Placed) => body.pieces.flatMap((p) => (p.kind === "polygon" ? [p.points] : []));
  return Math.min(1, ...outlines(a).flatMap((p) => outlines(b).map((q) => sharpestWedge(p, q, touch))));
}

/** A thousandth of the smaller sphere of two bodies, mm. */
function thousandth(a: Placed, b: Placed): number {
  const discs = [...a.pieces, ...b.pieces].flatMap((p) => (p.kind === "disc" ? [p.radius] : []));
  return (2 * Math.min(...discs)) / 1000;
}
