/** The heat map of a solved state: every cell of copper, parts and guides with its mean power density, and the outlines. */
import type { Answer } from "./answer.ts";
import type { HeatMap, Outline } from "./heatmap.ts";
import type { Piece, Point, Scene, Section } from "./scene.ts";

/** Straight pieces an outlined circle is drawn with. */
const CIRCLE = 48;
const CORNERS = [0, 2, 8, 6] as const;

/** Heat at `current` A through the coil; the loaded state, or the empty one where there is no part. */
export function heatMap(scene: Scene, answer: Answer, current: number): HeatMap {
  const { solution, losses } = answer.loaded ?? answer.empty;
  const { grid } = solution.prepared;
  const { outlines, outlineOfRegion } = outlinesOf(scene);
  const cells = Array.from(grid.cellRegion.keys()).filter((c) => (grid.cellRegion[c] ?? 0) > 0);
  const corners = new Float64Array(8 * cells.length);
  const density = new Float64Array(cells.length);
  const outline = new Int32Array(cells.length);
  cells.forEach((c, i) => {
    const ids = CORNERS.map((k) => grid.cellNodes[9 * c + k] ?? 0);
    ids.forEach((id, k) => {
      corners[8 * i + 2 * k] = grid.r[id] ?? 0;
      corners[8 * i + 2 * k + 1] = grid.z[id] ?? 0;
    });
    density[i] =
      (current ** 2 * (losses.cellPower[c] ?? 0)) /
      volumeOf(ids.map((id) => [grid.r[id] ?? 0, grid.z[id] ?? 0]));
    outline[i] = outlineOfRegion[grid.cellRegion[c] ?? 0] ?? 0;
  });
  return { corners, density, outline, outlines };
}

/** Volume of revolution of a polygon: 2π times its first moment about the axis, m³. */
function volumeOf(points: readonly Point[]): number {
  return points.reduce((sum, [r, z], i) => {
    const [r2, z2] = points[(i + 1) % points.length] ?? [0, 0];
    return sum + (Math.PI * (r * z2 - r2 * z) * (r + r2)) / 3;
  }, 0);
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
