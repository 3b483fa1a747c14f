import { describe, expect, test } from "vitest";
import { materialAt, materialIds, materials } from "./catalogue.ts";

describe("copper", () => {
  // IEC 60028: 1/58 µΩ·m at 20 °C; printed there as 1.7241e-8 Ω·m.
  test("is 1/58 µΩ·m at 20 °C", () => {
    expect(materialAt("copper", 293.15).resistivity).toBeCloseTo(1.724137931034483e-8, 20);
  });

  // R. A. Matula, J. Phys. Chem. Ref. Data 8, 1147 (1979): pure copper 2.402e-8 at 400 K, 3.090e-8 at 500 K and 1.678e-8 at
  // 293 K (from memory). Annealed standard copper carries some residual resistivity more, hence ratios rather than values.
  test.each([
    [400, 2.402 / 1.678],
    [500, 3.09 / 1.678],
  ])("follows measured copper at %d K within 2 %%", (kelvin, ratio) => {
    const line =
      (materialAt("copper", kelvin).resistivity ?? 0) / (materialAt("copper", 293.15).resistivity ?? 0);
    expect(Math.abs(line / ratio - 1)).toBeLessThan(0.02);
  });

  // IACS line at 60 and 100 °C: 1.7241e-8 · [1 + 0.00393 (T − 20)].
  test.each([
    [333.15, 1.9951285e-8],
    [373.15, 2.266157e-8],
  ])("rises 0.393 %% a kelvin up to %d K", (kelvin, expected) => {
    expect((materialAt("copper", kelvin).resistivity ?? 0) / expected).toBeCloseTo(1, 4);
  });

  test.each([223.0, 523.3, Number.NaN])("is not known at %d K", (kelvin) => {
    expect(() => materialAt("copper", kelvin)).toThrow(RangeError);
  });
});

test("an unknown id is an error", () => {
  expect(() => materialAt("unobtainium", 293.15)).toThrow("no library material");
});

test("every number of the catalogue names its source", () => {
  expect(materialIds.length).toBeGreaterThan(0);
  for (const m of materials.values()) {
    expect(m.relativePermeability.source).not.toBe("");
    expect(m.range.why).not.toBe("");
    if (m.resistivity === null) continue;
    for (const cited of [m.resistivity.atReference, m.resistivity.reference, m.resistivity.perKelvin]) {
      expect(cited.source).not.toBe("");
    }
  }
});
