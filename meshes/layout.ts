/** A design's copper and bodies in their places, mm: what the geometric checks look at. Holds whatever of a document is sound. */
import type { Guide, Part, Winding } from "./design.ts";
import { type Box, boxOf, type Xy } from "./planar.ts";
import { type Figure, figureBox, piecesOf } from "./shapes.ts";
import { type SectionMm, type TurnMm, turnsOf } from "./windings.ts";

/** A part or guide in its place. */
export interface Placed {
  readonly pointer: string;
  /** What it is called in words: its name, with its place in the list where names repeat. */
  readonly label: string;
  readonly body: Part | Guide;
  readonly pieces: readonly Figure[];
}

export interface Copper {
  readonly section: SectionMm;
  readonly winding: Winding;
  readonly turns: readonly TurnMm[];
  readonly figures: readonly Figure[];
}

export interface Layout {
  /** null where the document's conductor or winding is at fault already. */
  readonly copper: Copper | null;
  readonly bodies: readonly Placed[];
}

/** A turn's section as a figure. */
function turnFigure(turn: { readonly r: number; readonly z: number }, section: SectionMm): Figure {
  if (section.kind === "round") return { kind: "disc", r: turn.r, z: turn.z, radius: section.radialMm / 2 };
  const [w, h] = [section.radialMm / 2, section.axialMm / 2];
  const { r, z } = turn;
  const points: Xy[] = [
    [r - w, z - h],
    [r + w, z - h],
    [r + w, z + h],
    [r - w, z + h],
  ];
  return { kind: "polygon", points };
}

export function placeCopper(section: SectionMm, winding: Winding): Copper {
  const turns = turnsOf(winding, section);
  return { section, winding, turns, figures: turns.map((turn) => turnFigure(turn, section)) };
}

/** Bodies with their pointers, parts before guides. */
export function placeBodies(
  found: readonly { readonly pointer: string; readonly body: Part | Guide }[],
): Placed[] {
  const names = found.map(({ body }) => body.name);
  return found.map(({ pointer, body }) => {
    const unique = body.name !== "" && names.indexOf(body.name) === names.lastIndexOf(body.name);
    const [list, index] = pointer.slice(1).split("/");
    const place = `${list === "parts" ? "part" : "guide"} ${index}`;
    const plain = body.name === "" || body.name === "part" || body.name === "guide";
    const label = plain ? place : unique ? body.name : `${body.name} (${place})`;
    return { pointer, label, body, pieces: piecesOf(body) };
  });
}

/** Box around figures; null for none. */
export function boxAround(figures: readonly Figure[]): Box | null {
  if (figures.length === 0) return null;
  const corners = figures.map(figureBox).flatMap((b): Xy[] => [
    [b.left, b.low],
    [b.right, b.high],
  ]);
  return boxOf(corners);
}

/** What lengths count as in a layout, mm. */
export interface Scale {
  /** Its radius or its height, whichever is larger. */
  readonly size: number;
  /** Below this, figures touch. */
  readonly touch: number;
  /** The finest gap, edge or wall that is resolved. */
  readonly finest: number;
}

export function scaleOf(layout: Layout): Scale {
  const box = boxAround([...(layout.copper?.figures ?? []), ...layout.bodies.flatMap((b) => b.pieces)]);
  const size = box === null ? 0 : Math.max(box.right, box.high - box.low);
  return { size, touch: 1e-9 * size, finest: 1e-5 * size };
}
