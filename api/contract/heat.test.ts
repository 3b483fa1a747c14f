import { describe, expect, it } from "vitest";
import type { HeatMap } from "../../meshes/heatmap.ts";
import { ContainerError } from "./container.ts";
import { decodeHeat, encodeHeat } from "./heat.ts";
import { encodeFields } from "./stored-fields.ts";

/** Rows of n cells side by side, 1 mm square, from r = 10 mm. */
function strip(n: number): HeatMap {
  const corners = new Float64Array(8 * n);
  for (let c = 0; c < n; c++) {
    const [r, z] = [0.01 + 0.001 * (c % 300), -0.02 + 0.001 * Math.floor(c / 300)];
    // Neighbours' corners differ by rounding, as those of a real map do.
    const e = 1e-17 * (c % 3);
    corners.set([r + e, z, r + 0.001, z + e, r + 0.001, z + 0.001, r, z + 0.001], 8 * c);
  }
  return {
    corners,
    density: Float64Array.from({ length: n }, (_, c) => 1e6 + c),
    outline: Int32Array.from({ length: n }, (_, c) => c % 2),
    outlines: [
      {
        role: "copper",
        name: "turn 0",
        points: [
          [0.01, -0.02],
          [0.02, -0.02],
          [0.02, 0.25],
        ],
      },
      {
        role: "part",
        name: "Bolzen ø 8",
        points: [
          [0, 0],
          [0.5, 0],
          [0.5, 0.25],
          [0, 0.25],
        ],
      },
    ],
  };
}

describe("the heat file", () => {
  it("brings back cells, densities and outlines in single precision, each corner once", () => {
    const heat = strip(600);
    const file = decodeHeat(encodeHeat(heat).buffer);
    expect(file.points.length / 2).toBe(301 * 3);
    expect(file.cells.length).toBe(4 * 600);
    for (let c = 0; c < 600; c++) {
      for (let k = 0; k < 4; k++) {
        const p = file.cells[4 * c + k] ?? 0;
        expect(Math.abs((file.points[2 * p] ?? 0) - (heat.corners[8 * c + 2 * k] ?? 0))).toBeLessThan(3e-8);
        expect(Math.abs((file.points[2 * p + 1] ?? 0) - (heat.corners[8 * c + 2 * k + 1] ?? 0))).toBeLessThan(
          3e-8,
        );
      }
      expect(file.density[c]).toBe(Math.fround(1e6 + c));
      expect(file.outline[c]).toBe(c % 2);
    }
    expect(file.outlines.map(({ role, name }) => [role, name])).toEqual([
      ["copper", "turn 0"],
      ["part", "Bolzen ø 8"],
    ]);
    expect(file.outlines[0]?.points).toEqual([
      [Math.fround(0.01), Math.fround(-0.02)],
      [Math.fround(0.02), Math.fround(-0.02)],
      [Math.fround(0.02), 0.25],
    ]);
    expect(file.outlines[1]?.points.length).toBe(4);
  });

  it("takes no two places for one, however far apart in z and near in r", () => {
    const grain = 2 ** -24;
    const cells = Array.from({ length: 26 }, (_, s) => [0, 1, grain, 1 - 2 ** s * grain, 1, 1, 0, 1]);
    const heat: HeatMap = {
      corners: Float64Array.from(cells.flat()),
      density: new Float64Array(26),
      outline: new Int32Array(26),
      outlines: [],
    };
    expect(decodeHeat(encodeHeat(heat).buffer).points.length / 2).toBe(2 + 26);
  });

  it("counts corners in 16 bits as long as that is enough", () => {
    expect(decodeHeat(encodeHeat(strip(600)).buffer).cells).toBeInstanceOf(Uint16Array);
    const large = decodeHeat(encodeHeat(strip(70_000)).buffer);
    expect(large.cells).toBeInstanceOf(Uint32Array);
    expect(large.points.length / 2).toBeGreaterThan(65_536);
    expect(large.cells.at(-2)).toBe(large.points.length / 2 - 1);
  });

  it("is an empty picture where no heat arises at all", () => {
    const none: HeatMap = {
      corners: new Float64Array(0),
      density: new Float64Array(0),
      outline: new Int32Array(0),
      outlines: [],
    };
    const file = decodeHeat(encodeHeat(none).buffer);
    expect([file.points.length, file.cells.length, file.outlines.length]).toEqual([0, 0, 0]);
  });

  it("is read in place", () => {
    const bytes = encodeHeat(strip(5));
    const file = decodeHeat(bytes.buffer);
    for (const array of [file.points, file.cells, file.density, file.outline]) {
      expect(array.buffer).toBe(bytes.buffer);
    }
  });
});

describe("a file that is none", () => {
  const bytes = encodeHeat(strip(5));
  const fault = (file: Uint8Array): string => {
    try {
      decodeHeat(file);
      return "read";
    } catch (error) {
      return error instanceof ContainerError ? error.code : String(error);
    }
  };
  const spoilt = (at: number, value: number): Uint8Array => {
    const copy = bytes.slice();
    copy[at] = value;
    return copy;
  };

  it("is refused by its magic, its version, its kind", () => {
    expect(fault(bytes)).toBe("read");
    expect(fault(spoilt(0, 0x45))).toBe("magic");
    expect(fault(new TextEncoder().encode("<!doctype html>"))).toBe("magic");
    expect(fault(new Uint8Array(0))).toBe("magic");
    expect(fault(spoilt(8, 2))).toBe("version");
    const other = encodeFields({
      grid: { nr: 0, nz: 0, r: new Float64Array(0), z: new Float64Array(0) },
      loaded: null,
      empty: {
        vectorPotential: { re: new Float64Array(0), im: new Float64Array(0) },
        fluxDensity: { re: new Float64Array(0), im: new Float64Array(0) },
        powerDensity: new Float64Array(0),
        currentDensity: new Float64Array(0),
      },
    });
    expect(fault(other)).toBe("kind");
  });

  it("is refused when cut anywhere, or longer than it should be", () => {
    for (let length = 8; length < bytes.length; length++) {
      expect(["length", "header"]).toContain(fault(bytes.slice(0, length)));
    }
    const longer = new Uint8Array(bytes.length + 8);
    longer.set(bytes);
    expect(fault(longer)).toBe("length");
  });

  it("is refused when its header is no list of arrays", () => {
    expect(fault(spoilt(16, 0x20))).toBe("header");
    const text = new TextDecoder().decode(bytes);
    const type = text.indexOf('"Float32Array"') + 1;
    expect(fault(spoilt(type, 0x47))).toBe("header");
  });
});
