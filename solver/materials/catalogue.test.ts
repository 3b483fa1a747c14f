import { describe, expect, test } from "vitest";
import { materialAt, materialIdsFor, materials } from "./catalogue.ts";
import { type Cited, type MaterialRecord, tableAt } from "./laws.ts";

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

/** Every cited number of a record, however deep. */
function citedIn(value: unknown): Cited[] {
  if (typeof value !== "object" || value === null) return [];
  const own = "value" in value && "source" in value ? [value as Cited] : [];
  return [...own, ...Object.values(value).flatMap(citedIn)];
}

const all: readonly [string, MaterialRecord][] = [...materials];

describe.each(all)("%s", (id, record) => {
  const { fromKelvin, toKelvin } = record.range;
  const at = (kelvin: number) => materialAt(id, kelvin);

  test("names a source for every number, and a spread exactly for those from memory", () => {
    const cited = citedIn(record);
    expect(cited.length).toBeGreaterThan(3);
    for (const { source, spread, value } of cited) {
      expect(source).not.toBe("");
      expect(Number.isFinite(value)).toBe(true);
      expect(source.includes("; from memory, ±")).toBe(spread !== undefined);
    }
    expect(record.range.why).not.toBe("");
  });

  test("is known over its range and no further", () => {
    for (const kelvin of [fromKelvin, (fromKelvin + toKelvin) / 2, toKelvin]) {
      const { resistivity, relativePermeability } = at(kelvin);
      if (resistivity !== null) expect(resistivity).toBeGreaterThan(1e-9);
      expect(relativePermeability).toBeGreaterThanOrEqual(1);
    }
    for (const kelvin of [fromKelvin - 0.1, toKelvin + 0.1]) expect(() => at(kelvin)).toThrow(RangeError);
  });

  test("has rows of rising temperature that reach both ends of its range", () => {
    if (record.resistivity?.law !== "table") return;
    const kelvins = record.resistivity.rows.map((row) => row.kelvin);
    expect(kelvins).toEqual([...new Set(kelvins)].sort((a, b) => a - b));
    expect(kelvins[0]).toBeLessThanOrEqual(fromKelvin);
    expect(kelvins.at(-1)).toBeGreaterThanOrEqual(toKelvin);
  });

  test("is continuous in resistivity, permeability and saturation", () => {
    const step = 0.01;
    for (let kelvin = fromKelvin; kelvin + step <= toKelvin; kelvin += 1.37) {
      const [a, b] = [at(kelvin), at(kelvin + step)];
      if (a.resistivity !== null) expect(Math.abs(b.resistivity! / a.resistivity - 1)).toBeLessThan(1e-4);
      // Steepest next to the Curie point: the cube root of the distance to it.
      const near = 0.06 * record.relativePermeability.value;
      expect(Math.abs(b.relativePermeability - a.relativePermeability)).toBeLessThan(near);
      expect(Math.abs((b.saturation ?? 0) - (a.saturation ?? 0))).toBeLessThan(0.1);
    }
  });
});

describe.each(all.filter(([, m]) => m.magnetism !== undefined))("the magnetism of %s", (id, record) => {
  const { curie, saturation } = record.magnetism!;
  const { fromKelvin, toKelvin } = record.range;

  test("has at 20 °C the permeability and saturation recorded", () => {
    const state = materialAt(id, 293.15);
    expect(state.relativePermeability).toBeCloseTo(record.relativePermeability.value, 9);
    expect(state.saturation).toBeCloseTo(saturation.value, 9);
  });

  test("saturates lower the hotter it is", () => {
    const top = Math.min(toKelvin, curie.value - 1e-3);
    const saturations = Array.from({ length: 50 }, (_, k) => fromKelvin + ((top - fromKelvin) * k) / 49).map(
      (kelvin) => materialAt(id, kelvin).saturation!,
    );
    expect(saturations).toEqual([...saturations].sort((a, b) => b - a));
    expect(saturations.at(-1)).toBeLessThan(saturation.value);
  });

  test("is gone from the Curie point up", () => {
    if (curie.value > toKelvin) return;
    for (const kelvin of [curie.value, curie.value + 1, toKelvin]) {
      expect(materialAt(id, kelvin)).toMatchObject({
        relativePermeability: 1,
        saturation: null,
        lossTangent: 0,
      });
    }
    const below = materialAt(id, curie.value - 1e-6);
    expect(below.relativePermeability).toBeGreaterThan(1);
    expect(below.relativePermeability - 1).toBeLessThan(0.005 * record.relativePermeability.value);
  });
});

test("a table is straight between its rows and stays at its ends", () => {
  const row = (kelvin: number, value: number) => ({ kelvin, value, source: "made up" });
  const table = { law: "table", rows: [row(300, 1), row(400, 3), row(500, 4)] } as const;
  expect([299, 300, 350, 400, 450, 500, 501].map((t) => tableAt(table, t))).toEqual([1, 1, 2, 3, 3.5, 4, 4]);
});

test("a conductor is a solid metal that is not magnetic, a guide a core, a part anything", () => {
  expect(materialIdsFor("conductor")).toEqual(expect.arrayContaining(["copper", "brass", "stainless-steel"]));
  for (const id of ["mild-steel", "molten-copper", "graphite", "ferrite"]) {
    expect(materialIdsFor("conductor")).not.toContain(id);
  }
  expect(materialIdsFor("guide")).toEqual(["ferrite", "iron-powder", "laminated-iron"]);
  expect(materialIdsFor("part")).toEqual([...materials.keys()]);
  for (const id of materialIdsFor("guide")) expect(materialAt(id, 293.15).resistivity).toBeNull();
});
