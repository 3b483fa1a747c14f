/**
 * Reads the tables of this folder. They are kept as first written down, amplitudes peak; here, and nowhere else, they turn rms:
 * fields and current densities are divided by √2, and their keys change from `_peak` to `_rms`; mean powers stay as they are
 * (a mean power belongs to its amplitude, whichever way that is expressed).
 */
import cylinder from "./cylinder.json";
import inductance from "./inductance.json";
import materials from "./materials.json";
import probeCoil from "./probe-coil.json";
import proximity from "./proximity.json";
import skinEffect from "./skin-effect.json";
import sphere from "./sphere.json";

/** A number with its unit, or a list of them. */
interface Quantity {
  readonly value: unknown;
  readonly unit: string;
}

interface RawCase {
  readonly id: string;
  readonly description: string;
  readonly inputs: Readonly<Record<string, Quantity>>;
  readonly expected: Readonly<Record<string, Quantity>>;
  readonly source: readonly string[];
  readonly provenance: string;
}

interface RawTable {
  readonly sources: readonly { id: string; author: string; title: string; year: number | null }[];
  readonly cases: readonly unknown[];
}

/** A check value: plain numbers in SI units, rms. */
export interface CheckValue {
  readonly id: string;
  readonly description: string;
  /** "computed", "read" or "memory"; see the table. */
  readonly provenance: string;
  /** Who published the formula or the value, and the figures' provenance, one line. */
  readonly source: string;
  /** One input by name; a list gives its `index`-th entry. */
  input(name: string, index?: number): number;
  /** One expected figure by name. */
  expected(name: string, index?: number): number;
}

const TABLES = {
  inductance,
  "skin-effect": skinEffect,
  proximity,
  cylinder,
  sphere,
  "probe-coil": probeCoil,
  materials,
};

/** Name of a table in this folder. */
export type TableName = keyof typeof TABLES;

/** Units whose quantities are amplitudes in these tables. */
const AMPLITUDE_UNITS: ReadonlySet<string> = new Set(["T", "A/m", "A/m^2"]);

/** The one conversion from peak to rms: key and value of a quantity as the rest of the project takes it. */
export function peakToRms(
  name: string,
  value: number,
  unit: string,
): { readonly name: string; readonly value: number } {
  const rms = AMPLITUDE_UNITS.has(unit) ? value / Math.SQRT2 : value;
  return { name: name.replace("_peak", "_rms"), value: rms };
}

/** The case `id` of a table. Throws when it does not exist. */
export function checkValue(table: TableName, id: string): CheckValue {
  const raw: RawTable = TABLES[table];
  const found = raw.cases.find((c): c is RawCase => (c as RawCase).id === id);
  if (found === undefined) throw new RangeError(`no case ${id} in table ${table}`);
  const sources = raw.sources.filter((s) => found.source.includes(s.id) && s.id !== "COMP");
  const named = sources.map((s) => `${s.author}, ${s.title}${s.year === null ? "" : ` (${s.year})`}`);
  return {
    id,
    description: found.description,
    provenance: found.provenance,
    source: `${named.length === 0 ? "computed independently of this solver" : named.join("; ")} [figures: ${found.provenance}]`,
    input: (name, index = 0) => pick(found.inputs, id, name, index),
    expected: (name, index = 0) => pick(found.expected, id, name, index),
  };
}

/** Ids of a table's cases that begin with `prefix`, in the table's order. */
export function caseIds(table: TableName, prefix: string): string[] {
  const raw: RawTable = TABLES[table];
  return raw.cases.map((c) => (c as RawCase).id).filter((id) => id.startsWith(prefix));
}

function pick(from: Readonly<Record<string, Quantity>>, id: string, name: string, index: number): number {
  for (const [key, quantity] of Object.entries(from)) {
    const value: unknown = Array.isArray(quantity.value) ? quantity.value[index] : quantity.value;
    const number = value === "inf" ? Number.POSITIVE_INFINITY : value;
    if (typeof number !== "number") continue;
    const rms = peakToRms(key, number, quantity.unit);
    if (rms.name === name) return rms.value;
  }
  throw new RangeError(`no quantity ${name} in case ${id}`);
}

/** Rows of one of the longer tables, as printed (dimensionless figures only, so nothing to convert). */
export function tableRows(table: TableName, id: string): readonly Readonly<Record<string, number>>[] {
  const raw = TABLES[table] as { tables?: readonly unknown[] };
  const found = raw.tables?.find((t) => (t as { id: string }).id === id) as
    | { rows?: readonly Record<string, number>[] }
    | undefined;
  if (found?.rows === undefined) throw new RangeError(`no rows ${id} in table ${table}`);
  return found.rows;
}
