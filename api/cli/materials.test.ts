import { afterEach, beforeEach, describe, expect, it, vi } from "vitest";
import { MaterialListSchema } from "../contract/materials.ts";
import { materialList } from "../format/materials.ts";
import { lineWidth } from "./layout.ts";
import { materialsCommand, renderMaterials } from "./materials.ts";

let printed = "";
beforeEach(() => {
  printed = "";
  vi.spyOn(process.stdout, "write").mockImplementation((text) => {
    printed += String(text);
    return true;
  });
});
afterEach(() => {
  vi.restoreAllMocks();
});

const lineOf = (id: string): string[] =>
  renderMaterials(materialList())
    .split("\n")
    .find((line) => line.startsWith(`  ${id} `))!
    .trim()
    .split(/\s{2,}/);

describe("emberturn materials", () => {
  it("prints every material once in the table and once in words, 80 wide", () => {
    materialsCommand({});
    const lines = printed.split("\n");
    for (const { id, description } of materialList().materials) {
      expect(lines.filter((line) => line.startsWith(`  ${id} `))).toHaveLength(1);
      expect(lines.some((line) => line.startsWith(`  ${id}: ${description.slice(0, 20)}`))).toBe(true);
    }
    expect(Math.max(...lines.map((line) => line.length))).toBeLessThanOrEqual(lineWidth);
  });

  it("marks what is from memory, and nothing else", () => {
    // IEC 60028: 1/58 µΩ·m at 20 °C; a factor 1 + 0.00393 · 230 at 250 °C.
    expect(lineOf("copper")).toEqual(["copper", "-50 to 250", "0.01724", "0.03283", "1"]);
    expect(lineOf("mild-steel")).toEqual([
      "mild-steel",
      "20 to 1200",
      "0.169*",
      "1.219*",
      "124",
      "2.16",
      "768*",
    ]);
    expect(lineOf("aluminium").slice(2, 4)).toEqual(["0.0265", "0.1008*"]);
  });

  it("says – where there is no figure", () => {
    expect(lineOf("molten-iron")[2]).toBe("–");
    expect(lineOf("ferrite").slice(2, 4)).toEqual(["–", "–"]);
  });

  it("with --json prints the list of the service", () => {
    materialsCommand({ json: true });
    const list = JSON.parse(printed);
    expect(MaterialListSchema.parse(list)).toEqual(list);
    expect(list).toEqual(materialList());
  });
});

describe("the list", () => {
  const get = (id: string) => materialList().materials.find((m) => m.id === id)!;

  it("tells temperatures in °C and roles", () => {
    const steel = get("mild-steel");
    expect(steel.magnetism!.curieC.value).toBe(768);
    expect(steel.roles).toEqual(["part"]);
    expect(steel.resistivity).toMatchObject({ law: "table" });
    expect(steel.resistivity).toHaveProperty("rowsOhmM.0.atC", 20);
    expect(get("copper").roles).toEqual(["conductor", "part"]);
    expect(get("ferrite").magnetism!.falls).toHaveProperty("rowsSaturationT.0.atC", 20);
  });
});
