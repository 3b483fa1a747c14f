/**
 * The heat file: what a viewer draws, as it goes over the wire. Cells share their corners; lengths in m, densities in W/m³ (rms drive), single precision.
 */
import type { HeatMap, Outline } from "../../meshes/heatmap.ts";
import { pack, unpack } from "./container.ts";

const KIND = "heat";
/** Corners are rounded to this part of the greatest coordinate, about single precision, so that neighbours' corners meet. */
const GRAIN = 2 ** 24;
/** Coordinates in grains stay below half of this either way: two of them fit into one safe integer. */
const SPAN = 2 ** 26;
const MOST_SHORT = 2 ** 16;

/** A heat file, read. Typed arrays are views into it. */
export interface HeatFile {
  /** [r, z] a corner, m. */
  readonly points: Float32Array;
  /** Four corners a cell, counter-clockwise: places in `points`, counted in pairs. */
  readonly cells: Uint16Array | Uint32Array;
  /** Power density a cell, W/m³; 0 where no heat arises. */
  readonly density: Float32Array;
  /** One number a cell: the index in `outlines` of (one of) its body's outlines. */
  readonly outline: Uint16Array | Uint32Array;
  readonly outlines: readonly Outline[];
}

type Index = "Uint16Array" | "Uint32Array";

/** What the header says beside the arrays. */
interface Meta {
  readonly cells: Index;
  readonly outline: Index;
  readonly outlines: readonly Pick<Outline, "role" | "name">[];
}

/** The file of a heat map. */
export function encodeHeat(heat: HeatMap): Uint8Array<ArrayBuffer> {
  const { points, cells } = shareCorners(heat.corners);
  const index = indices(cells, points.length / 2);
  const outline = indices(heat.outline, heat.outlines.length);
  const meta: Meta = {
    cells: index instanceof Uint16Array ? "Uint16Array" : "Uint32Array",
    outline: outline instanceof Uint16Array ? "Uint16Array" : "Uint32Array",
    outlines: heat.outlines.map(({ role, name }) => ({ role, name })),
  };
  return pack(KIND, meta, {
    points,
    density: Float32Array.from(heat.density),
    outlinePoints: Float32Array.from(heat.outlines.flatMap((o) => o.points.flat())),
    outlineLengths: Uint32Array.from(heat.outlines, (o) => o.points.length),
    cells: index,
    outline,
  });
}

/** A heat file's content. @throws ContainerError when it is none, or not whole */
export function decodeHeat(bytes: ArrayBuffer | Uint8Array): HeatFile {
  const { meta, array } = unpack(bytes, KIND);
  const { cells, outline, outlines } = meta as Meta;
  const lengths = array("outlineLengths", "Uint32Array");
  const flat = array("outlinePoints", "Float32Array");
  let from = 0;
  return {
    points: array("points", "Float32Array"),
    cells: array("cells", cells),
    density: array("density", "Float32Array"),
    outline: array("outline", outline),
    outlines: outlines.map((o, k) => {
      const first = from;
      from += 2 * (lengths[k] ?? 0);
      const points = Array.from({ length: lengths[k] ?? 0 }, (_, i): [number, number] => [
        flat[first + 2 * i] ?? 0,
        flat[first + 2 * i + 1] ?? 0,
      ]);
      return { ...o, points };
    }),
  };
}

const indices = (values: ArrayLike<number>, count: number): Uint16Array | Uint32Array =>
  count <= MOST_SHORT ? Uint16Array.from(values) : Uint32Array.from(values);

/** Each place once. `corners`: [r, z] after [r, z]. */
function shareCorners(corners: Float64Array): { points: Float32Array; cells: Uint32Array } {
  const largest = corners.reduce((most, x) => Math.max(most, Math.abs(x)), 0);
  const grain = largest > 0 ? largest / GRAIN : 1;
  const ids = new Map<number, number>();
  const cells = new Uint32Array(corners.length / 2);
  const points: number[] = [];
  for (let k = 0; k < cells.length; k++) {
    const r = Math.round((corners[2 * k] ?? 0) / grain);
    const z = Math.round((corners[2 * k + 1] ?? 0) / grain);
    const key = r * SPAN + z;
    let id = ids.get(key);
    if (id === undefined) {
      id = points.length / 2;
      ids.set(key, id);
      points.push(r * grain, z * grain);
    }
    cells[k] = id;
  }
  return { points: Float32Array.from(points), cells };
}
