import { describe, expect, test } from "vitest";
import { kelvinFromCelsius } from "../meshes/units.ts";
import { MU0, materialAt, materials } from "../solver/index.ts";
import { caseIds, checkValue } from "./tables/read.ts";

// The library of materials against the rows of tables/materials.json, which names the source of each.

const resistivity = (id: string, celsius: number): number =>
  materialAt(id, kelvinFromCelsius(celsius)).resistivity ?? Number.NaN;

test("no row from memory is among the checks", () => {
  const provenances = caseIds("materials", "mat-").map((id) => checkValue("materials", id).provenance);
  expect(provenances.length).toBe(7);
  expect(provenances).not.toContain("memory");
});

describe("resistivity", () => {
  const iacs = checkValue("materials", "mat-copper-iacs");
  // IEC 60028 prints 1.7241e-8 for 1/58 µΩ·m: 2.2e-5 apart.
  test.each([0, 1, 2])("of copper on the line of IEC 60028 (row %d)", (row) => {
    expect(resistivity("copper", iacs.input("T", row)) / iacs.expected("rho", row)).toBeCloseTo(1, 4);
  });

  // engineeringtoolbox.com, Resistivity and conductivity table.
  test.each([
    ["brass", "mat-brass"],
    ["aluminium", "mat-aluminium-20"],
    ["graphite", "mat-graphite-20"],
  ])("of %s at 20 °C as read in its table", (id, row) => {
    const check = checkValue("materials", row);
    expect(resistivity(id, check.input("T")) / check.expected("rho")).toBeCloseTo(1, 9);
  });

  test("of brass rises by the coefficient read with it", () => {
    const rise = resistivity("brass", 120) / resistivity("brass", 20) - 1;
    expect(rise / 100).toBeCloseTo(checkValue("materials", "mat-brass").expected("alpha20"), 9);
  });
});

describe("mild steel", () => {
  // T. Nakata, N. Takahashi, K. Fujiwara: magnetisation curve of the steel of TEAM problems 10 and 13.
  test("has the permeability of the curve's foot", () => {
    const foot = checkValue("materials", "mat-team13-foot");
    const { relativePermeability } = materialAt("mild-steel", kelvinFromCelsius(20));
    const slope = foot.expected("B") / (MU0 * foot.input("H"));
    expect(relativePermeability / slope).toBeCloseTo(1, 9);
  });

  test.each([0, 1])("has the polarisation of the curve's end (row %d)", (row) => {
    const end = checkValue("materials", "mat-team13-sat");
    const polarisation = end.expected("B", row) - MU0 * end.input("H", row);
    expect(materialAt("mild-steel", kelvinFromCelsius(20)).saturation).toBeCloseTo(polarisation, 5);
  });

  // EN 1993-1-2, 3.4.1.2: the formula's figures. One row stands a hair below the step at 600 °C and is left to the formula.
  test("has the specific heat of EN 1993-1-2 where both are tabulated", () => {
    const code = checkValue("materials", "mat-ec3-c");
    const heat = materials.get("mild-steel")?.thermal.specificHeat;
    const rows = heat !== undefined && "rows" in heat ? heat.rows : [];
    const compared = rows.flatMap((row) => {
      const at = Array.from({ length: 13 }, (_, k) => k).find(
        (k) => Math.abs(kelvinFromCelsius(code.input("T", k)) - row.kelvin) < 1e-9,
      );
      return at === undefined ? [] : [row.value / code.expected("c", at)];
    });
    // The formula's upper branch ends in 650.4 at 900 °C, where the last one, 650, begins.
    expect(compared.length).toBe(11);
    for (const ratio of compared) expect(Math.abs(ratio - 1)).toBeLessThan(1e-6);
  });
});
