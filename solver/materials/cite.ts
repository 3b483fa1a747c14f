/** How records cite: a number read in its source, a number from memory, rows of a table, and what many materials share. */
import type { Cited, Magnetism, Row, Table } from "./laws.ts";

/** 20 °C, where most handbooks stand. */
export const ROOM = 293.15;

/** A number seen in its source, or that follows from a definition there. */
export const read = (value: number, source: string): Cited => ({ value, source });

/** A number from memory, good to ± `spread` (relative): fit for a first answer, never to support a claim. */
export const recalled = (value: number, spread: number, where = "handbook value"): Cited => ({
  value,
  spread,
  source: `${where}; from memory, ± ${Number((100 * spread).toPrecision(3))} %`,
});

type Pairs = readonly (readonly [kelvin: number, value: number])[];

/** Rows from memory. */
export const recalledRows = (spread: number, where: string, pairs: Pairs): Row[] =>
  pairs.map(([kelvin, value]) => ({ kelvin, ...recalled(value, spread, where) }));

/** Rows that all stand in one source. */
export const readRows = (source: string, pairs: Pairs): Row[] =>
  pairs.map(([kelvin, value]) => ({ kelvin, ...read(value, source) }));

export const table = (...rows: readonly Row[]): Table => ({ law: "table", rows });

/** µr of what is not magnetic. */
export const nonMagnetic = (
  why = "the susceptibility of such metals is below 3e-4 (handbook value, from memory)",
): Cited => ({
  value: 1,
  source: `taken as 1: ${why}`,
});

/** Fall towards the Curie point as iron's magnetisation does. */
export const fallsAsIron: Magnetism["falls"] = {
  law: "magnetisation",
  reference: ROOM,
  s: recalled(0.35, 0.1, "M. D. Kuz'min, Phys. Rev. Lett. 94, 107204 (2005), s of iron"),
  p: recalled(4, 0.1, "M. D. Kuz'min, Phys. Rev. Lett. 94, 107204 (2005), p of iron"),
};

export const HANDBOOK = "handbook tables of pure metals, no single source recalled";
export const TOOLBOX = "engineeringtoolbox.com, Resistivity and conductivity table (read)";
export const MATULA = "R. A. Matula, J. Phys. Chem. Ref. Data 8, 1147 (1979)";
export const BISRA =
  "British Iron and Steel Research Association, Physical constants of some commercial steels at elevated temperatures (1953)";
