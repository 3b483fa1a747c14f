/**
 * How much of a ring with a polygon for its section lies in each cell of a grid of lines: exact, by Green's theorem. For a section with the
 * edge ∂P, counter-clockwise, and the cells between r_i and r_{i+1} of one row,
 *
 *   V_i = ∫∫ 2πr dr dz = π ∮_∂P [min(max(r, r_i), r_{i+1})² − r_i²] dz:
 *
 * each edge, cut at the lines it crosses, adds to the cell it runs through and to those on its left.
 */

/** Overlaps below this part of the ring are rounding. */
const NOTHING = 1e-12;

/** Hears of every cell (at place i·(nz − 1) + k) a ring overlaps, and the share of the ring's volume in it; shares add up to 1. */
type HearShare = (cell: number, share: number) => void;

/** Cells i0 … i1 by k0 … k1, and what has been added up for each: V/π at place (k − k0)·(i1 − i0 + 1) + i − i0. */
interface Frame {
  readonly rLines: Float64Array;
  readonly zLines: Float64Array;
  i0: number;
  i1: number;
  k0: number;
  k1: number;
  volume: Float64Array;
}

/**
 * Splits rings among the cells between ascending lines (m). Corners [r0, z0, r1, z1, …] of a section run counter-clockwise, its edges do not cross;
 * it lies within the lines up to rounding.
 */
export function ringSplitter(
  rLines: Float64Array,
  zLines: Float64Array,
): (corners: Float64Array, hear: HearShare) => void {
  const rows = zLines.length - 1;
  const frame: Frame = { rLines, zLines, i0: 0, i1: 0, k0: 0, k1: 0, volume: new Float64Array(64) };
  return (corners, hear) => {
    const cells = setFrame(frame, corners);
    const { i0, i1, k0, volume } = frame;
    const width = i1 - i0 + 1;
    const sum = cells === 1 ? 0 : addSection(frame, corners, cells);
    if (!(sum > 0)) {
      hear(i0 * rows + k0, 1);
      return;
    }
    for (let c = 0; c < cells; c++) {
      const v = volume[c] ?? 0;
      if (v > 0) hear((i0 + (c % width)) * rows + k0 + Math.floor(c / width), v / sum);
    }
  };
}

/** Cells the section's box touches; their number. */
function setFrame(frame: Frame, corners: Float64Array): number {
  let [rLow, rHigh, zLow, zHigh] = [Infinity, -Infinity, Infinity, -Infinity];
  for (let c = 0; c < corners.length; c += 2) {
    const r = corners[c] ?? 0;
    const z = corners[c + 1] ?? 0;
    if (r < rLow) rLow = r;
    if (r > rHigh) rHigh = r;
    if (z < zLow) zLow = z;
    if (z > zHigh) zHigh = z;
  }
  frame.i0 = cellFrom(frame.rLines, rLow);
  frame.i1 = Math.max(frame.i0, cellUpTo(frame.rLines, rHigh));
  frame.k0 = cellFrom(frame.zLines, zLow);
  frame.k1 = Math.max(frame.k0, cellUpTo(frame.zLines, zHigh));
  const cells = (frame.i1 - frame.i0 + 1) * (frame.k1 - frame.k0 + 1);
  if (frame.volume.length < cells) frame.volume = new Float64Array(2 * cells);
  frame.volume.fill(0, 0, cells);
  return cells;
}

/** Fills the frame's volumes, those of rounding cleared; their sum. */
function addSection(frame: Frame, corners: Float64Array, cells: number): number {
  for (let c = 0; c < corners.length; c += 2) {
    const d = c + 2 < corners.length ? c + 2 : 0;
    const ra = corners[c] ?? 0;
    const za = corners[c + 1] ?? 0;
    const rb = corners[d] ?? 0;
    const zb = corners[d + 1] ?? 0;
    if (za < zb) addEdge(frame, ra, za, rb, zb, 1);
    else if (zb < za) addEdge(frame, rb, zb, ra, za, -1);
  }
  const { volume } = frame;
  let total = 0;
  for (let c = 0; c < cells; c++) total += volume[c] ?? 0;
  let sum = 0;
  for (let c = 0; c < cells; c++) {
    const v = volume[c] ?? 0;
    if (v > NOTHING * total) sum += v;
    else volume[c] = 0;
  }
  return sum;
}

/** An edge that rises from (ra, za) to (rb, zb), times `sign`, row by row. */
function addEdge(frame: Frame, ra: number, za: number, rb: number, zb: number, sign: number): void {
  const { zLines, k0, k1 } = frame;
  const slope = (rb - ra) / (zb - za);
  let r = ra;
  let z = za;
  for (let k = Math.max(k0, cellFrom(zLines, za)); z < zb; k++) {
    const top = k >= k1 ? zb : Math.min(zb, zLines[k + 1] ?? zb);
    const rTop = top === zb ? rb : ra + slope * (top - za);
    addInRow(frame, Math.min(k, k1), r, z, rTop, top, sign);
    r = rTop;
    z = top;
  }
}

/** The same within row k, column by column. Long because it is the loop all the rest runs for. */
function addInRow(
  { rLines, i0, i1, k0, volume }: Frame,
  k: number,
  ra: number,
  za: number,
  rb: number,
  zb: number,
  sign: number,
): void {
  const outwards = rb >= ra;
  const last = outwards ? Math.min(i1, cellUpTo(rLines, rb)) : Math.max(i0, cellFrom(rLines, rb));
  const row = (k - k0) * (i1 - i0 + 1) - i0;
  let r = ra;
  let z = za;
  let i = outwards ? Math.min(i1, cellFrom(rLines, ra)) : Math.max(i0, cellUpTo(rLines, ra));
  for (;;) {
    const ends = outwards ? i >= last : i <= last;
    const rNext = ends ? rb : (rLines[outwards ? i + 1 : i] ?? rb);
    const zNext = ends ? zb : za + ((rNext - ra) * (zb - za)) / (rb - ra);
    const dz = sign * (zNext - z);
    const left = rLines[i] ?? 0;
    volume[row + i] = (volume[row + i] ?? 0) + dz * ((r * r + r * rNext + rNext * rNext) / 3 - left * left);
    for (let j = i0; j < i; j++) {
      const a = rLines[j] ?? 0;
      const b = rLines[j + 1] ?? 0;
      volume[row + j] = (volume[row + j] ?? 0) + dz * (b - a) * (b + a);
    }
    if (ends) return;
    r = rNext;
    z = zNext;
    i += outwards ? 1 : -1;
  }
}

/** Cell that begins at or below x: the greatest i with lines[i] ≤ x. */
function cellFrom(lines: Float64Array, x: number): number {
  let low = 0;
  let high = lines.length - 1;
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if ((lines[middle] ?? 0) <= x) low = middle;
    else high = middle;
  }
  return low;
}

/** Cell that reaches up to x: the greatest i with lines[i] < x. */
function cellUpTo(lines: Float64Array, x: number): number {
  let low = 0;
  let high = lines.length - 1;
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if ((lines[middle] ?? 0) < x) low = middle;
    else high = middle;
  }
  return low;
}
