/**
 * The field quantities of a job as downloads: one array, said as JSON, as CSV, or as NumPy's .npy. Pure and browser-safe.
 */
import ndarray, { type NdArray } from "ndarray";
import type { FieldGrid, Fields, StateFields } from "../../meshes/fields.ts";
import { encodeNpy } from "./npy.ts";

/** Names under /fields/. */
export const fieldQuantities = [
  "grid",
  "vectorPotential",
  "fluxDensity",
  "powerDensity",
  "currentDensity",
] as const;
export type FieldQuantity = (typeof fieldQuantities)[number];

/** States under ?state=. */
export const fieldStates = ["loaded", "empty"] as const;
export type FieldStateName = (typeof fieldStates)[number];

const RESAMPLED =
  "Resampled: the solver's own grid is made of curved patches; this is a grid of lines in r and z laid over it.";
const NODE_VALUES =
  "Values at nodes are those of the solution at that place; on a surface that a line follows, those just inside it.";
const CELL_VALUES =
  "Each value is a mean over the cell's ring-shaped volume, shared out by exact overlap, so that nothing is lost.";

interface Facts {
  readonly unit: string;
  readonly at: "nodes" | "cells";
  readonly description: string;
  /** Names of the columns that carry it, without _re and _im. */
  readonly columns: readonly string[];
}

const facts: Record<FieldQuantity, Facts> = {
  grid: {
    unit: "m",
    at: "nodes",
    description: "Positions of the nodes: r, then z.",
    columns: [],
  },
  vectorPotential: {
    unit: "Wb/m",
    at: "nodes",
    description: `Magnetic vector potential along phi, rms phasor, time factor exp(+jwt), coil current real. ${NODE_VALUES}`,
    columns: ["vectorPotential_Wb_per_m"],
  },
  fluxDensity: {
    unit: "T",
    at: "nodes",
    description: `Flux density along r, then along z, rms phasor, time factor exp(+jwt), coil current real. ${NODE_VALUES}`,
    columns: ["fluxDensityR_T", "fluxDensityZ_T"],
  },
  powerDensity: {
    unit: "W/m3",
    at: "cells",
    description: `Heat per volume. ${CELL_VALUES} Times the cells' volumes pi (r1^2 - r0^2) (z1 - z0) it adds up to the power before leads.`,
    columns: ["powerDensity_W_per_m3"],
  },
  currentDensity: {
    unit: "A/m2",
    at: "cells",
    description: `Root of the mean of |J|^2, rms magnitude. ${CELL_VALUES}`,
    columns: ["currentDensity_A_per_m2"],
  },
};

/** One quantity of one state, ready to be written in any form. */
export interface FieldArray {
  readonly quantity: FieldQuantity;
  readonly state: FieldStateName;
  /** [nr, nz] at nodes, [nr−1, nz−1] in cells, [2, nr, nz] for vectors and the grid. */
  readonly shape: readonly number[];
  readonly re: Float64Array;
  /** null for real quantities. */
  readonly im: Float64Array | null;
  readonly grid: FieldGrid;
}

/** The array of a quantity; null for the loaded state of a design without parts. The grid is the same in both states, and there in any case. */
export function fieldArray(
  fields: Fields,
  quantity: FieldQuantity,
  state: FieldStateName,
): FieldArray | null {
  const values = quantity === "grid" ? fields.empty : fields[state];
  if (values === null) return null;
  return { quantity, state, grid: fields.grid, ...valuesOf(fields.grid, values, quantity) };
}

function valuesOf(
  { nr, nz, r, z }: FieldGrid,
  values: StateFields,
  quantity: FieldQuantity,
): Pick<FieldArray, "shape" | "re" | "im"> {
  switch (quantity) {
    case "grid": {
      const both = new Float64Array(2 * nr * nz);
      both.set(r);
      both.set(z, nr * nz);
      return { shape: [2, nr, nz], re: both, im: null };
    }
    case "vectorPotential":
      return { shape: [nr, nz], ...values.vectorPotential };
    case "fluxDensity":
      return { shape: [2, nr, nz], ...values.fluxDensity };
    default:
      return { shape: [nr - 1, nz - 1], re: values[quantity], im: null };
  }
}

/** Numbers nested as the shape says. */
export type Nested = readonly number[] | readonly Nested[];

/** The JSON form. Real quantities carry `values`; complex ones `re` and `im`, nested alike. */
export interface FieldDocument {
  readonly quantity: FieldQuantity;
  readonly state: FieldStateName;
  readonly unit: string;
  readonly at: "nodes" | "cells";
  readonly shape: readonly number[];
  readonly resampled: true;
  readonly description: string;
  readonly values?: Nested;
  readonly re?: Nested;
  readonly im?: Nested;
}

export function fieldDocument({ quantity, state, shape, re, im }: FieldArray): FieldDocument {
  const { unit, at, description } = facts[quantity];
  const about = {
    quantity,
    state,
    unit,
    at,
    shape,
    resampled: true,
    description: `${description} ${RESAMPLED}`,
  };
  const nested = (values: Float64Array): Nested => nest(ndarray(values, [...shape]));
  const numbers = im === null ? { values: nested(re) } : { re: nested(re), im: nested(im) };
  return { ...about, resampled: true, ...numbers };
}

function nest(view: NdArray<Float64Array>): Nested {
  const each = { length: view.shape[0] ?? 0 };
  if (view.dimension === 1) return Array.from(each, (_, i) => view.get(i));
  return Array.from(each, (_, i) => nest(view.pick(i)));
}

/** The .npy form: float64 or complex128 in C order. */
export function fieldNpy({ shape, re, im }: FieldArray): Uint8Array<ArrayBuffer> {
  return encodeNpy(shape, re, im);
}

const LINE_END = "\r\n";

/** The CSV form (RFC 4180): a row a node (i, k, r_m, z_m) or a cell (i, k, its bounds), in the array's order, k fastest. */
export function fieldCsv(array: FieldArray): string {
  const { quantity, grid, re, im } = array;
  const { at, columns } = facts[quantity];
  const nz = at === "nodes" ? grid.nz : grid.nz - 1;
  const rows = at === "nodes" ? grid.nr * grid.nz : (grid.nr - 1) * nz;
  const place = at === "nodes" ? nodePlace : cellPlace;
  const names = im === null ? columns : columns.flatMap((c) => [reName(c), imName(c)]);
  const lines = [["i", "k", ...place.names, ...names].join(",")];
  for (let row = 0; row < rows; row++) {
    const [i, k] = [Math.floor(row / nz), row % nz];
    const fields = [i, k, ...place.of(grid, i, k)];
    for (let c = 0; c < columns.length; c++) {
      fields.push(re[c * rows + row] ?? 0);
      if (im !== null) fields.push(im[c * rows + row] ?? 0);
    }
    lines.push(fields.join(","));
  }
  return lines.join(LINE_END) + LINE_END;
}

/** x_T → x_re_T: the unit stays at the end. */
const reName = (column: string): string => column.replace("_", "_re_");
const imName = (column: string): string => column.replace("_", "_im_");

interface PlaceColumns {
  readonly names: readonly string[];
  readonly of: (grid: FieldGrid, i: number, k: number) => number[];
}

const nodePlace: PlaceColumns = {
  names: ["r_m", "z_m"],
  of: ({ nz, r, z }, i, k) => [r[i * nz + k] ?? 0, z[i * nz + k] ?? 0],
};

const cellPlace: PlaceColumns = {
  names: ["r0_m", "r1_m", "z0_m", "z1_m"],
  of: ({ nz, r, z }, i, k) => {
    const [from, to] = [i * nz + k, (i + 1) * nz + k + 1];
    return [r[from] ?? 0, r[to] ?? 0, z[from] ?? 0, z[to] ?? 0];
  },
};
