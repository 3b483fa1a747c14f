/** Drawing the flat map on a 2-D canvas: cells, outlines, the axis, and scales in mm. */
import { plain } from "../../../api/format/figures.ts";
import { roundStep } from "../../../api/format/heat-scale.ts";
import type { Outline } from "../../../meshes/heatmap.ts";
import { metresFromMm, mmFromMetres } from "../../../meshes/units.ts";
import type { Heat } from "../../heat.ts";
import { type FlatView, type Size, screenAt, windowOf } from "../../scene/flat-view.ts";
import { type Paint, packed, paintPixels } from "../../scene/paint.ts";
import type { Inks } from "./tokens.ts";

/** Room for the scales beside the plot, px. */
export const room = { left: 58, right: 10, top: 26, bottom: 44 };

/** What is kept between drawings: pixels are made anew only when the size changes. */
export interface Buffers {
  image: ImageData | null;
}

export interface Sheet {
  readonly view: FlatView;
  /** Of the plot, px. */
  readonly size: Size;
  /** Device pixels a px. */
  readonly ratio: number;
  readonly inks: Inks;
}

/** The plot's size in a picture of so many px. */
export function plotSize(width: number, height: number): Size {
  return {
    width: Math.max(1, width - room.left - room.right),
    height: Math.max(1, height - room.top - room.bottom),
  };
}

export function drawFlat(
  context: CanvasRenderingContext2D,
  heat: Heat,
  paint: Paint,
  sheet: Sheet,
  buffers: Buffers,
): void {
  const { size, ratio, inks } = sheet;
  const { width, height } = context.canvas;
  context.setTransform(1, 0, 0, 1, 0, 0);
  context.fillStyle = inks.paper;
  context.fillRect(0, 0, width, height);
  drawCells(context, heat, paint, sheet, buffers);
  context.setTransform(ratio, 0, 0, ratio, room.left * ratio, room.top * ratio);
  context.save();
  context.beginPath();
  context.rect(0, 0, size.width, size.height);
  context.clip();
  drawAxis(context, sheet);
  drawOutlines(context, heat.outlines, sheet);
  context.restore();
  drawScales(context, sheet);
}

function drawCells(
  context: CanvasRenderingContext2D,
  heat: Heat,
  paint: Paint,
  { view, size, ratio, inks }: Sheet,
  buffers: Buffers,
): void {
  const window = windowOf(view, size, ratio);
  const { width, height } = window;
  if (buffers.image?.width !== width || buffers.image.height !== height) {
    buffers.image = new ImageData(width, height);
  }
  const pixels = new Uint32Array(buffers.image.data.buffer);
  paintPixels(heat.corners, window, paint, pixels, { ground: packed(inks.paperRgb), ratio });
  context.putImageData(buffers.image, Math.round(room.left * ratio), Math.round(room.top * ratio));
}

/** The line both halves mirror in, long and short dashes as on a drawing. */
function drawAxis(context: CanvasRenderingContext2D, { view, size, inks }: Sheet): void {
  const [x] = screenAt(view, size, 0, 0);
  context.strokeStyle = inks.faint;
  context.lineWidth = 1;
  context.setLineDash([14, 4, 3, 4]);
  context.beginPath();
  context.moveTo(x, 0);
  context.lineTo(x, size.height);
  context.stroke();
  context.setLineDash([]);
}

function drawOutlines(
  context: CanvasRenderingContext2D,
  outlines: readonly Outline[],
  { view, size, inks }: Sheet,
): void {
  context.strokeStyle = inks.ink;
  context.lineWidth = 1;
  context.lineJoin = "round";
  context.beginPath();
  for (const { points } of outlines) {
    for (const side of [1, -1]) {
      points.forEach(([r, z], k) => {
        const [x, y] = screenAt(view, size, side * r, z);
        if (k === 0) context.moveTo(x, y);
        else context.lineTo(x, y);
      });
      context.closePath();
    }
  }
  context.stroke();
}

/** px between marks at least, along and up. */
const apart = { r: 56, z: 34 };

/** Round positions in m between two, so many px apart at least, with their words in mm. */
function marksBetween(from: number, to: number, most: number): { at: number; words: string }[] {
  const step = roundStep(mmFromMetres(to - from), Math.max(1, most));
  const first = Math.ceil(mmFromMetres(from) / step);
  const count = Math.max(0, Math.floor(mmFromMetres(to) / step) - first + 1);
  return Array.from({ length: count }, (_, k) => {
    const mm = (first + k) * step;
    return { at: metresFromMm(mm), words: plain(mm, 6).replace("-", "−") };
  });
}

function drawScales(context: CanvasRenderingContext2D, { view, size, inks }: Sheet): void {
  const [halfR, halfZ] = [(size.width / 2) * view.step, (size.height / 2) * view.step];
  context.strokeStyle = inks.line;
  context.lineWidth = 1;
  context.strokeRect(0.5, 0.5, size.width - 1, size.height - 1);
  context.fillStyle = inks.faint;
  context.font = `12px ${inks.font}`;
  context.beginPath();
  context.textAlign = "center";
  context.textBaseline = "top";
  for (const { at, words } of marksBetween(view.r - halfR, view.r + halfR, size.width / apart.r)) {
    const [x] = screenAt(view, size, at, 0);
    context.moveTo(x, size.height);
    context.lineTo(x, size.height + 5);
    // Left of the axis lies the mirror image: a radius has no sign.
    context.fillText(words.replace("−", ""), x, size.height + 8);
  }
  context.textAlign = "right";
  context.textBaseline = "middle";
  for (const { at, words } of marksBetween(view.z - halfZ, view.z + halfZ, size.height / apart.z)) {
    const [, y] = screenAt(view, size, 0, at);
    context.moveTo(-5, y);
    context.lineTo(0, y);
    context.fillText(words, -8, y);
  }
  context.stroke();
  context.textBaseline = "alphabetic";
  context.textAlign = "center";
  context.fillText("radius r, mm", size.width / 2, size.height + 38);
  context.textAlign = "left";
  context.fillText("height z, mm", 8 - room.left, -10);
}
