/** The bench's own arithmetic, files and tables; no times, no Python. */
import { mkdtempSync, rmSync, truncateSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { Matrix, solve as solveDense } from "ml-matrix";
import { afterAll, describe, expect, it } from "vitest";
import { analyse, factorise, solve } from "../../solver/index.ts";
import { growthExponent, median, spreadOf } from "./arithmetic.ts";
import { errorsOf, otherFrequency, otherMaterial, timedCases, unseen } from "./cases.ts";
import { readArrays, writeArrays } from "./container.ts";
import { backwardError, columnsOf, readSystem, systemOf, writeColumns, writeSystem } from "./matrix.ts";
import { tableOf } from "./table.ts";

const folder = mkdtempSync(join(tmpdir(), "emberturn-bench-test-"));
afterAll(() => rmSync(folder, { recursive: true, force: true }));

describe("the arithmetic", () => {
  it("takes medians of odd and even counts, of nothing none", () => {
    expect(median([3, 1, 2])).toBe(2);
    expect(median([10, 2, 4, 1])).toBe(3);
    expect(median([])).toBeNaN();
    expect(spreadOf([5, 3, 4])).toEqual({ median: 4, min: 3, max: 5, count: 3 });
  });

  it("finds the exponent of a power law, and the best one of three points by hand", () => {
    const x = [1e4, 4e4, 1.6e5];
    expect(
      growthExponent(
        x,
        x.map((n) => 3e-7 * n ** 1.25),
      ),
    ).toBeCloseTo(1.25, 12);
    // u = 0, 1, 2 and v = 0, 1, 3 (base e): Σ(u − 1)(v − 4/3) / Σ(u − 1)² = 3/2.
    expect(growthExponent([1, Math.E, Math.E ** 2], [1, Math.E, Math.E ** 3])).toBeCloseTo(1.5, 12);
  });
});

describe("matrices of a design", () => {
  // The smallest design that has a turn, a part and a mirror plane: one ring over a pin, one grid.
  const system = systemOf(
    {
      coil: {
        conductor: { section: "roundBar", outsideDiameterMm: 6, material: "copper" },
        winding: { form: "helix", boreDiameterMm: 20, turns: 1 },
      },
      parts: [
        {
          name: "pin",
          shape: "cylinder",
          diameterMm: 12,
          lengthMm: 12,
          material: { resistivityOhmM: 1e-6 },
        },
      ],
      drive: { frequencyHz: 1000, currentA: 1 },
    },
    1,
  );
  const columns = columnsOf(system);
  const n = system.structure.unknowns;
  const x = solve(factorise(analyse(system.structure), system.values), system.rhs);

  it("are symmetric, their rows ascending", () => {
    const entries = new Map<number, number>();
    for (let j = 0; j < n; j++)
      for (let k = columns.start[j]!; k < columns.start[j + 1]!; k++) {
        if (k > columns.start[j]!) expect(columns.rows[k]).toBeGreaterThan(columns.rows[k - 1]!);
        entries.set(columns.rows[k]! * n + j, columns.re[k]! + 2 * columns.im[k]!);
      }
    for (const [at, value] of entries)
      expect(entries.get((at % n) * n + Math.floor(at / n))).toBeCloseTo(value, 9);
  });

  it("are solved as by ml-matrix's pivoted dense solution, assembled and by elements", () => {
    const dense = Matrix.zeros(2 * n, 2 * n);
    for (let j = 0; j < n; j++)
      for (let k = columns.start[j]!; k < columns.start[j + 1]!; k++) {
        const i = columns.rows[k]!;
        dense.set(i, j, columns.re[k]!);
        dense.set(n + i, n + j, columns.re[k]!);
        dense.set(i, n + j, -columns.im[k]!);
        dense.set(n + i, j, columns.im[k]!);
      }
    const y = solveDense(dense, Matrix.columnVector([...system.rhs.re, ...system.rhs.im])).to1DArray();
    const size = Math.max(...y.map(Math.abs));
    for (let i = 0; i < n; i++) {
      expect(Math.abs(x.re[i]! - y[i]!)).toBeLessThan(1e-9 * size);
      expect(Math.abs(x.im[i]! - y[n + i]!)).toBeLessThan(1e-9 * size);
    }
  });

  it("tell a right solution from one with a number off by 1e-9", () => {
    expect(backwardError(columns, x, system.rhs)).toBeLessThan(1e-14);
    const off = { re: x.re.map((v, i) => (i === n >> 1 ? v * (1 + 1e-9) : v)), im: x.im };
    expect(backwardError(columns, off, system.rhs)).toBeGreaterThan(1e-11);
  });

  it("come back from their files as they were", () => {
    writeSystem(join(folder, "elements"), system);
    expect(readSystem(join(folder, "elements"))).toEqual(system);
    writeColumns(join(folder, "columns"), columns, system.rhs);
    const { start, rows, re, im } = columns;
    const back = readArrays(join(folder, "columns"));
    expect(back).toEqual([start, rows, re, im, system.rhs.re, system.rhs.im]);
  });

  it("are refused from a file that was cut short", () => {
    const file = join(folder, "short");
    writeArrays(file, [Int32Array.of(1, 2, 3), Float64Array.of(0.5)]);
    expect(readArrays(file)).toEqual([Int32Array.of(1, 2, 3), Float64Array.of(0.5)]);
    truncateSync(file, 8 * 5 + 12);
    expect(() => readArrays(file)).toThrow(RangeError);
  });
});

describe("the cases", () => {
  const cases = timedCases();

  it("are the four open ones and the pin, each with its truth", () => {
    expect(cases.map((c) => c.name)).toEqual(["open-1", "open-2", "open-3", "open-4", "pin-400k"]);
    for (const { truth } of cases)
      expect([...truth.resistances, ...truth.inductances, truth.power].every((v) => v > 0)).toBe(true);
  });

  it("differ by what is said, and by nothing else", () => {
    for (const { design } of cases) {
      const [first, second] = [unseen(design, 1), unseen(design, 2)];
      expect(second.parts[0]!.lengthMm).not.toBe(first.parts[0]!.lengthMm);
      expect(second.parts[0]!.lengthMm / design.parts[0]!.lengthMm - 1).toBeCloseTo(2e-8, 12);
      expect({ ...second, parts: design.parts }).toEqual(design);
      expect({ ...otherFrequency(design), drive: design.drive }).toEqual(design);
      expect({ ...otherMaterial(design), parts: design.parts }).toEqual(design);
      expect(otherMaterial(design)).not.toEqual(design);
    }
  });

  it("tell the worst error of each kind", () => {
    const bar = (value: number) => ({ value, plusMinus: 0 });
    const state = (r: number, l: number) => ({ resistanceOhm: bar(r), inductanceH: bar(l) });
    const result = { empty: state(1.01, 2), loaded: state(3, 3.8), parts: [{ powerW: bar(5) }] };
    const errors = errorsOf(result as unknown as Parameters<typeof errorsOf>[0], {
      resistances: [1, 3],
      inductances: [2, 4],
      power: 4,
    });
    expect(errors.resistance).toBeCloseTo(0.01, 12);
    expect(errors.inductance).toBeCloseTo(0.05, 12);
    expect(errors.power).toBeCloseTo(0.25, 12);
  });
});

describe("the table", () => {
  const machine = {
    date: "2026-01-02",
    processor: "some processor",
    cores: 2,
    memoryGb: 4,
    node: "20.0.0",
    scipy: null,
    load: [0.1, 1.2],
  } as const;
  const run = (scale: number) => ({
    factor: [0.2 * scale, 0.1 * scale],
    solve: [0.02 * scale, 0.01 * scale],
    again: [0.08 * scale],
    peakBytes: 1e7 * scale,
    entries: 1e6 * scale,
  });
  const program = (scale: number) => ({
    warm: [run(scale)],
    lean: [run(scale)],
    cold: [run(2 * scale)],
    backwardError: 1e-15,
  });
  const text = (theirs: boolean): string =>
    tableOf({
      machine,
      cold: [],
      warm: [],
      rivalName: "a design",
      rival: [1, 2].map((k) => ({
        unknowns: 1000 * k,
        nonzeros: 9000 * k,
        ours: program(k),
        theirs: theirs ? program(4 * k) : null,
      })),
    });

  it("gives medians, spreads, ratios and growth", () => {
    const lines = text(true).split("\n");
    expect(lines).toContain(
      "| **factorisation + one solve**, ordering included, ms | 165 (110 – 220) | 660 (440 – 880) | 0.25 × |",
    );
    expect(lines).toContain("| the same, ordering known, ms | 90 | 360 | 0.25 × |");
    expect(lines).toContain("| **peak memory**, MB | 10 | 40 | 0.25 × |");
    expect(lines).toContain("| cold: peak memory, MB | 20 | 80 | 0.25 × |");
    expect(text(true)).toMatch(/factorisation \+ one solve 1\.00; 1\.00, peak memory 1\.00; 1\.00/);
  });

  it("says what to install where SciPy is missing, and goes on", () => {
    expect(text(false)).toContain("| **peak memory**, MB | 10 | not run: apt-get install python3-scipy |  |");
  });
});
