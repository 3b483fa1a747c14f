/** `emberturn materials`: the library as a table for people, or as the list that `/v1/materials` gives. */
import { kelvinFromCelsius } from "../../meshes/units.ts";
import { materialAt, materials } from "../../solver/index.ts";
import type { MaterialList } from "../contract/materials.ts";
import { plain } from "../format/figures.ts";
import { materialList } from "../format/materials.ts";
import { columns, wrap } from "./layout.ts";

export interface MaterialsOptions {
  readonly json?: boolean;
}

type Listed = MaterialList["materials"][number];

/** Prints the library. */
export function materialsCommand({ json }: MaterialsOptions): void {
  const list = materialList();
  process.stdout.write(json ? `${JSON.stringify(list, null, 2)}\n` : renderMaterials(list));
}

/** The table, 80 wide, and what each material is; ends with a line break. */
export function renderMaterials(list: MaterialList): string {
  const head = ["id", "°C", "20 °C µΩ·m", "at end", "µr", "Bs T", "Curie"];
  const rows = list.materials.map(row);
  const lines = [
    "LIBRARY OF MATERIALS (µr at low field, µr and Bs at 20 °C, Curie point in °C)",
    ...columns(rows, ["left", "right", "decimal", "decimal", "decimal", "decimal", "decimal"], head),
    "",
    ...wrap(
      "* from memory, or between values from memory: fit for a first answer. --json lists every number with its source, or the spread to expect.",
    ),
    "",
    "WHAT THEY ARE, AND WHAT THEY MAY BE IN A DESIGN",
    ...list.materials.flatMap(({ id, description, roles }) =>
      wrap(`${id}: ${description} (${roles.join(", ")})`, "  ", "    "),
    ),
  ];
  return `${lines.join("\n")}\n`;
}

function row(m: Listed): string[] {
  const { fromC, toC } = m.range;
  const magnetic = m.magnetism;
  return [
    m.id,
    `${rounded(fromC)} to ${rounded(toC)}`,
    resistivity(m, 20),
    resistivity(m, toC),
    marked(plain(m.relativePermeability.value, 3), m.relativePermeability),
    magnetic === undefined ? "" : marked(plain(magnetic.saturationT.value, 3), magnetic.saturationT),
    magnetic === undefined ? "" : marked(rounded(magnetic.curieC.value), magnetic.curieC),
  ];
}

/** ρ in µΩ·m at °C, marked; "–" where it is not known or does not conduct. */
function resistivity(m: Listed, atC: number): string {
  const record = materials.get(m.id);
  if (m.resistivity === null || record === undefined || atC < m.range.fromC || atC > m.range.toC) return "–";
  const value = materialAt(m.id, kelvinFromCelsius(atC)).resistivity ?? Number.NaN;
  return marked(plain(1e6 * value, 4), ...behind(m.resistivity, atC));
}

/** The numbers a resistivity at °C is made of. */
function behind(law: NonNullable<Listed["resistivity"]>, atC: number): Recalled[] {
  if (law.law === "linear") return [law.atReferenceOhmM, law.referenceC, law.perKelvin];
  const rows = law.rowsOhmM;
  const at = rows.find((r) => Math.abs(r.atC - atC) < 1e-3);
  if (at !== undefined) return [at];
  const above = rows.findIndex((r) => r.atC > atC);
  return rows.slice(Math.max(above - 1, 0), above < 0 ? undefined : above + 1);
}

type Recalled = { readonly spread?: number | undefined };

const marked = (text: string, ...made: readonly Recalled[]): string =>
  made.some(({ spread }) => spread !== undefined) ? `${text}*` : text;

const rounded = (celsius: number): string => String(Math.round(celsius));
