/** The heat map of a solved state: the cells of copper, parts and guides cut into pieces with their power density, and the outlines. */
import { type CellSamples, heatSampler } from "../solver/index.ts";
import type { Answer } from "./answer.ts";
import type { HeatMap, Outline } from "./heatmap.ts";
import type { Piece, Point, Scene, Section } from "./scene.ts";

/** Straight pieces an outlined circle is drawn with. */
const CIRCLE = 48;
/** A picture wants about so many pieces; each cell is cut alike, into at most so many along. */
const PIECES = 60_000;
const MOST_ALONG = 4;

/** Heat at `current` A through the coil; the loaded state, or the empty one where there is no part. */
export function heatMap(scene: Scene, answer: Answer, current: number): HeatMap {
  const { solution } = answer.loaded ?? answer.empty;
  const { grid } = solution.prepared;
  const square = current ** 2;
  const { outlines, outlineOfRegion } = outlinesOf(scene);
  const cells = Array.from(grid.cellRegion.keys()).filter((c) => (grid.cellRegion[c] ?? 0) > 0);
  const m = Math.min(MOST_ALONG, Math.max(1, Math.floor(Math.sqrt(PIECES / cells.length))));
  const read = heatSampler(solution, m, "middles");
  const corners = new Float64Array(8 * m * m * cells.length);
  const density = new Float64Array(m * m * cells.length);
  const outline = new Int32Array(m * m * cells.length);
  cells.forEach((c, i) => {
    const samples = read(c);
    const first = m * m * i;
    outline.fill(outlineOfRegion[grid.cellRegion[c] ?? 0] ?? 0, first, first + m * m);
    for (let p = 0; p < m * m; p++) density[first + p] = (samples.density[p] ?? 0) * square;
    putCorners(samples, m, corners, 8 * first);
  });
  return { corners, density, outline, outlines };
}

/** Steps along ξ and η from a piece's first corner. */
const CORNER_R = [0, 1, 1, 0];
const CORNER_Z = [0, 0, 1, 1];

/** Four corners a piece, counter-clockwise, from the lattice of (m + 1)² corners. */
function putCorners({ cornerR, cornerZ }: CellSamples, m: number, out: Float64Array, first: number): void {
  for (let piece = 0; piece < m * m; piece++) {
    const low = piece + Math.floor(piece / m);
    for (let k = 0; k < 4; k++) {
      const corner = low + (CORNER_R[k] ?? 0) + (CORNER_Z[k] ?? 0) * (m + 1);
      out[first + 8 * piece + 2 * k] = cornerR[corner] ?? 0;
      out[first + 8 * piece + 2 * k + 1] = cornerZ[corner] ?? 0;
    }
  }
}

function outlinesOf(scene: Scene): { outlines: Outline[]; outlineOfRegion: number[] } {
  const outlines: Outline[] = [];
  const outlineOfRegion = [0];
  scene.turns.forEach((t, k) => {
    outlineOfRegion.push(outlines.length);
    for (const points of sectionOutlines(scene.section, t.r, t.z)) {
      outlines.push({ role: "copper", name: `turn ${k}`, points });
    }
  });
  for (const body of scene.bodies) {
    outlineOfRegion.push(outlines.length);
    for (const piece of body.pieces) {
      outlines.push({ role: body.role, name: body.name, points: pieceOutline(piece) });
    }
  }
  return { outlines, outlineOfRegion };
}

function sectionOutlines(section: Section, r: number, z: number): Point[][] {
  const insets = section.wall > 0 ? [0, section.wall] : [0];
  return insets.map((inset) => {
    if (section.kind === "round") return arc(r, z, section.radius - inset, 0, 2 * Math.PI).slice(0, -1);
    const [w, h] = [section.width / 2 - inset, section.height / 2 - inset];
    return [
      [r - w, z - h],
      [r + w, z - h],
      [r + w, z + h],
      [r - w, z + h],
    ];
  });
}

function pieceOutline(piece: Piece): readonly Point[] {
  if (piece.kind === "polygon") return piece.points;
  return arc(0, piece.centreZ, piece.radius, -Math.PI / 2, Math.PI / 2).map(([r, z]) => [Math.max(0, r), z]);
}

function arc(r: number, z: number, radius: number, from: number, to: number): Point[] {
  return Array.from({ length: CIRCLE + 1 }, (_, k) => {
    const angle = from + ((to - from) * k) / CIRCLE;
    return [r + radius * Math.cos(angle), z + radius * Math.sin(angle)];
  });
}
