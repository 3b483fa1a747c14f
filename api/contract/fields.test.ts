import { describe, expect, it } from "vitest";
import type { Fields, StateFields } from "../../meshes/fields.ts";
import { fieldArray, fieldCsv, fieldDocument, fieldNpy, fieldQuantities } from "./fields.ts";
import { decodeFields, encodeFields } from "./stored-fields.ts";

/** Lines r = 0, 1, 3 and z = −1, 0.5; every number tells its own place. */
function numbered(offset: number): StateFields {
  const run = (n: number, from: number): Float64Array => Float64Array.from({ length: n }, (_, i) => from + i);
  return {
    vectorPotential: { re: run(6, offset), im: run(6, offset + 0.5) },
    fluxDensity: { re: run(12, offset + 100), im: run(12, -offset - 100) },
    powerDensity: run(2, offset + 1000),
    currentDensity: run(2, offset + 2000.25),
  };
}
const fields: Fields = {
  grid: {
    nr: 3,
    nz: 2,
    r: Float64Array.of(0, 0, 1, 1, 3, 3),
    z: Float64Array.of(-1, 0.5, -1, 0.5, -1, 0.5),
  },
  loaded: numbered(10),
  empty: numbered(20),
};
const get = (quantity: (typeof fieldQuantities)[number], state: "loaded" | "empty" = "loaded") => {
  const array = fieldArray(fields, quantity, state);
  if (array === null) throw new Error("no such array");
  return array;
};

describe("a field as JSON", () => {
  it("nests numbers as the shape says, complex ones as re and im", () => {
    const a = fieldDocument(get("vectorPotential"));
    expect(a).toMatchObject({ quantity: "vectorPotential", state: "loaded", unit: "Wb/m", at: "nodes" });
    expect(a.shape).toEqual([3, 2]);
    expect(a.re).toEqual([
      [10, 11],
      [12, 13],
      [14, 15],
    ]);
    expect(a.im).toEqual([
      [10.5, 11.5],
      [12.5, 13.5],
      [14.5, 15.5],
    ]);
    expect(a.values).toBeUndefined();
    const b = fieldDocument(get("fluxDensity", "empty"));
    expect(b.shape).toEqual([2, 3, 2]);
    expect(b.re?.[1]).toEqual([
      [126, 127],
      [128, 129],
      [130, 131],
    ]);
  });

  it("gives real quantities as values, by cell, and says that it is resampled", () => {
    const p = fieldDocument(get("powerDensity"));
    expect(p).toMatchObject({ unit: "W/m3", at: "cells", shape: [2, 1], resampled: true });
    expect(p.values).toEqual([[1010], [1011]]);
    expect("re" in p).toBe(false);
    for (const q of fieldQuantities) expect(fieldDocument(get(q)).description).toContain("Resampled");
    expect(fieldDocument(get("currentDensity")).unit).toBe("A/m2");
  });

  it("gives the grid as r, then z", () => {
    const { values, shape } = fieldDocument(get("grid"));
    expect(shape).toEqual([2, 3, 2]);
    expect(values).toEqual([
      [
        [0, 0],
        [1, 1],
        [3, 3],
      ],
      [
        [-1, 0.5],
        [-1, 0.5],
        [-1, 0.5],
      ],
    ]);
  });
});

describe("a field as CSV", () => {
  const rows = (text: string): string[] => text.split("\r\n");

  it("has a row a node with its place, units in the names", () => {
    const a = rows(fieldCsv(get("vectorPotential")));
    expect(a[0]).toBe("i,k,r_m,z_m,vectorPotential_re_Wb_per_m,vectorPotential_im_Wb_per_m");
    expect(a[4]).toBe("1,1,1,0.5,13,13.5");
    expect(a.length).toBe(1 + 6 + 1);
    expect(a.at(-1)).toBe("");
    const b = rows(fieldCsv(get("fluxDensity")));
    expect(b[0]).toBe("i,k,r_m,z_m,fluxDensityR_re_T,fluxDensityR_im_T,fluxDensityZ_re_T,fluxDensityZ_im_T");
    expect(b[6]).toBe("2,1,3,0.5,115,-105,121,-99");
    expect(rows(fieldCsv(get("grid"))).slice(0, 2)).toEqual(["i,k,r_m,z_m", "0,0,0,-1"]);
  });

  it("has a row a cell with its bounds", () => {
    expect(rows(fieldCsv(get("currentDensity", "empty")))).toEqual([
      "i,k,r0_m,r1_m,z0_m,z1_m,currentDensity_A_per_m2",
      "0,0,0,1,-1,0.5,2020.25",
      "1,0,1,3,-1,0.5,2021.25",
      "",
    ]);
  });
});

describe("a field as .npy", () => {
  it("has the contract's types and shapes", () => {
    const header = (q: (typeof fieldQuantities)[number]): string =>
      new TextDecoder("latin1").decode(fieldNpy(get(q)).subarray(10, 128)).trimEnd();
    expect(header("grid")).toBe("{'descr': '<f8', 'fortran_order': False, 'shape': (2, 3, 2), }");
    expect(header("vectorPotential")).toBe("{'descr': '<c16', 'fortran_order': False, 'shape': (3, 2), }");
    expect(header("fluxDensity")).toBe("{'descr': '<c16', 'fortran_order': False, 'shape': (2, 3, 2), }");
    expect(header("powerDensity")).toBe("{'descr': '<f8', 'fortran_order': False, 'shape': (2, 1), }");
    const last = new DataView(fieldNpy(get("fluxDensity")).buffer, 128 + 16 * 11);
    expect([last.getFloat64(0, true), last.getFloat64(8, true)]).toEqual([121, -99]);
  });
});

describe("a design without parts", () => {
  it("has a grid and the empty state, and no loaded one", () => {
    const bare = { ...fields, loaded: null };
    expect(fieldArray(bare, "fluxDensity", "loaded")).toBeNull();
    expect(fieldArray(bare, "grid", "loaded")?.re.length).toBe(12);
    expect(fieldArray(bare, "fluxDensity", "empty")?.re[0]).toBe(120);
    expect(decodeFields(encodeFields(bare))).toEqual(bare);
  });
});

describe("stored fields", () => {
  it("come back whole, from a buffer that begins anywhere", () => {
    const bytes = encodeFields(fields);
    expect(decodeFields(bytes)).toEqual(fields);
    expect(decodeFields(bytes.buffer)).toEqual(fields);
    const shifted = new Uint8Array(bytes.length + 3);
    shifted.set(bytes, 3);
    expect(decodeFields(shifted.subarray(3))).toEqual(fields);
  });

  it("are read in place", () => {
    const bytes = encodeFields(fields);
    const { grid, empty } = decodeFields(bytes);
    expect(grid.r.buffer).toBe(bytes.buffer);
    expect(empty.powerDensity.buffer).toBe(bytes.buffer);
  });
});
