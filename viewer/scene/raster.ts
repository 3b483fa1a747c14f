/**
 * Which cell lies under which pixel. A cell is filled row by row between its edges' crossings with the row of pixel
 * centres, so a pixel belongs to a cell that holds its centre; where neighbours share an edge either may take it, never none.
 */
import type { Heat } from "../heat.ts";

/** A window on the section: pixel (i, j) has its centre at r = left + (i + ½)·step, z = top − (j + ½)·step; left < 0 shows the mirrored half. */
export interface Window {
  /** m. */
  readonly left: number;
  readonly top: number;
  /** m a pixel. */
  readonly step: number;
  /** Pixels. */
  readonly width: number;
  readonly height: number;
}

/** No pixel's cell. */
export const none = -1;

/** How far a centre may lie outside and still count, px: the corners' own rounding, so that neighbours leave no gap. */
const slack = 1e-3;

/** The cell of every pixel, row by row from the top left, `none` where there is none. */
export function rasterCells(corners: Heat["corners"], window: Window): Int32Array {
  const ids = new Int32Array(window.width * window.height).fill(none);
  fill(corners, window, ids, null);
  return ids;
}

/** Every pixel's colour, `colours[cell]`; pixels without a cell stay as they are. */
export function rasterColours(
  corners: Heat["corners"],
  window: Window,
  colours: Uint32Array,
  pixels: Uint32Array,
): void {
  fill(corners, window, pixels, colours);
}

/** Both halves of the picture, as far as they are in the window; `values` null writes the cell's own number. */
function fill(
  corners: Heat["corners"],
  window: Window,
  out: Int32Array | Uint32Array,
  values: Uint32Array | null,
): void {
  const { left, top, step, width } = window;
  const inverse = 1 / step;
  const [x0, y0] = [-left * inverse - 0.5, top * inverse - 0.5];
  if (left + step * width > 0) fillHalf(corners, window, inverse, x0, y0, out, values);
  if (left < 0) fillHalf(corners, window, -inverse, x0, y0, out, values);
}

/** One half of the picture: x = r·scaleX + x0, y = y0 − z·|scaleX|, pixel centres at whole numbers. One long loop, for speed. */
function fillHalf(
  corners: Heat["corners"],
  { width, height }: Window,
  scaleX: number,
  x0: number,
  y0: number,
  out: Int32Array | Uint32Array,
  values: Uint32Array | null,
): void {
  const scaleY = Math.abs(scaleX);
  const x = new Float64Array(5);
  const y = new Float64Array(5);
  for (let at = 0, cell = 0; at < corners.length; at += 8, cell++) {
    let [xMin, xMax, yMin, yMax] = [Infinity, -Infinity, Infinity, -Infinity];
    for (let k = 0; k < 4; k++) {
      const px = corners[at + 2 * k]! * scaleX + x0;
      const py = y0 - corners[at + 2 * k + 1]! * scaleY;
      x[k] = px;
      y[k] = py;
      if (px < xMin) xMin = px;
      if (px > xMax) xMax = px;
      if (py < yMin) yMin = py;
      if (py > yMax) yMax = py;
    }
    if (xMax < -slack || yMax < -slack || xMin > width || yMin > height) continue;
    const value = values === null ? cell : values[cell]!;
    x[4] = x[0]!;
    y[4] = y[0]!;
    const last = Math.min(height - 1, Math.floor(yMax + slack));
    for (let row = Math.max(0, Math.ceil(yMin - slack)); row <= last; row++) {
      // Within the slack of its end a cell is read at that end.
      const level = Math.min(yMax, Math.max(yMin, row));
      let [from, to] = [Infinity, -Infinity];
      for (let k = 0; k < 4; k++) {
        const ya = y[k]!;
        const yb = y[k + 1]!;
        if ((ya < level && yb < level) || (ya > level && yb > level)) continue;
        const xa = x[k]!;
        const xb = x[k + 1]!;
        if (ya === yb) {
          from = Math.min(from, xa, xb);
          to = Math.max(to, xa, xb);
        } else {
          const crossing = xa + ((level - ya) / (yb - ya)) * (xb - xa);
          if (crossing < from) from = crossing;
          if (crossing > to) to = crossing;
        }
      }
      const start = Math.max(0, Math.ceil(from - slack));
      const end = Math.min(width - 1, Math.floor(to + slack));
      if (start <= end) out.fill(value, row * width + start, row * width + end + 1);
    }
  }
}
