/**
 * The design as a text in pieces: words, and blanks that read and write the draft. Made anew from every draft (lines.ts),
 * so that what the sentence says is always what the document says; pure, and so tested without a page.
 */
import { type Quantity, readEntry, readList, readRows, showEntry, showList, showRows } from "../../entry.ts";
import { valueAt, withValueAt } from "../../pointer.ts";

interface AtPlace {
  /** JSON Pointer of the value. */
  readonly at: string;
  /** What a screen reader calls it, and a test finds it by. */
  readonly label: string;
}

/** A blank filled by typing. */
export interface Blank extends AtPlace {
  readonly kind: "number" | "list" | "rows" | "text" | "title";
  /** Other pointers whose faults belong here. */
  readonly owns?: readonly string[];
  /** Words after the blank. */
  readonly unit: string;
  /** What an empty blank stands for, shown in it faintly. */
  readonly empty: string;
  readonly show: (document: unknown) => string;
  readonly put: (document: unknown, text: string) => unknown;
  /** Of numbers: what the arrow keys step. */
  readonly quantity?: Quantity;
  /** Of rows: what the columns are. */
  readonly hint?: string;
}

/** A word chosen among others, which may reword the sentence around it. */
export interface Choice extends AtPlace {
  readonly kind: "choice";
  readonly options: readonly (readonly [value: string, words: string])[];
  readonly value: string;
  readonly pick: (document: unknown, value: string) => unknown;
}

/** Something done to the document by a button. */
export interface Action {
  readonly kind: "action";
  readonly words: string;
  readonly label: string;
  readonly act: (document: unknown) => unknown;
  /** Element id that has the focus afterwards. */
  readonly focus: (document: unknown) => string;
}

export type Phrase = string | Blank | Choice | Action;

/** One line of the text; faults at `at`, under it or at `owns` that no blank takes are told under the line. */
export interface Line {
  readonly at: string;
  readonly owns?: readonly string[];
  readonly label: string;
  readonly phrases: readonly Phrase[];
  /** What waits behind "and also …"; `told` when it says something that is not usual. */
  readonly also: readonly Phrase[];
  readonly told: boolean;
}

export const isBlank = (phrase: Phrase): phrase is Blank =>
  typeof phrase !== "string" && phrase.kind !== "choice" && phrase.kind !== "action";

/** Every pointer whose faults a phrase takes. */
export function placesOf(phrase: Phrase): readonly string[] {
  if (typeof phrase === "string" || phrase.kind === "action") return [];
  return phrase.kind === "choice" ? [phrase.at] : [phrase.at, ...(phrase.owns ?? [])];
}

interface NumberOptions {
  /** What holds when it is left empty; a number that has to be given has none. */
  readonly usual?: number;
  readonly unit?: string;
  /** An emptied blank stays, as the text "" that is refused: taking the key away would say something else. */
  readonly stays?: true;
}

export function numberBlank(
  at: string,
  label: string,
  quantity: Quantity,
  options: NumberOptions = {},
): Blank {
  const unit = options.unit ?? quantity.unit;
  return {
    kind: "number",
    at,
    label: quantity.unit === "" ? label : `${label}, ${quantity.unit}`,
    unit,
    quantity,
    empty: options.usual === undefined ? "" : showEntry(options.usual, quantity),
    show: (document) => showEntry(valueAt(document, at), quantity),
    put: (document, text) => {
      const emptied = text.trim() === "" && options.stays === undefined;
      return withValueAt(document, at, emptied ? undefined : readEntry(text, quantity));
    },
  };
}

/** A name; as a title it may run over several lines. */
export function textBlank(at: string, label: string, empty: string, kind: "text" | "title" = "text"): Blank {
  return {
    kind,
    at,
    label,
    unit: "",
    empty,
    show: (document) => {
      const value = valueAt(document, at);
      return value === undefined || value === null ? "" : String(value);
    },
    put: (document, text) =>
      withValueAt(document, at, text === "" ? undefined : text.replaceAll(/\s*\n\s*/g, " ")),
  };
}

/** One number for all steps, or one for each. */
export function pitchBlank(at: string, label: string, quantity: Quantity, steps: number): Blank {
  return {
    ...numberBlank(at, label, quantity),
    kind: "list",
    show: (document) => {
      const value = valueAt(document, at);
      return Array.isArray(value) ? showList(value) : showEntry(value, quantity);
    },
    put: (document, text) => {
      if (text.trim() === "") return withValueAt(document, at, undefined);
      const one = readEntry(text, quantity);
      const list = typeof one === "number" ? [] : readList(text, steps);
      return withValueAt(document, at, list.length > 1 ? list : one);
    },
  };
}

/** Lists of turn numbers, strands apart by semicolons. */
export function strandsBlank(at: string): Blank {
  return {
    kind: "list",
    at,
    label: "Strands: turns counted from 0, strands separated by semicolons",
    unit: "",
    empty: "",
    show: (document) => {
      const value = valueAt(document, at);
      if (!Array.isArray(value)) return typeof value === "string" ? value : "";
      return value.map((strand) => (Array.isArray(strand) ? showList(strand) : String(strand))).join("; ");
    },
    put: (document, text) => {
      const strands = text.split(";").filter((s) => s.trim() !== "");
      return withValueAt(
        document,
        at,
        strands.length === 0 ? "" : strands.map((s) => readList(s.replaceAll(",", " "))),
      );
    },
  };
}

/** A table of numbers, a line a row. */
export function rowsBlank(at: string, label: string, hint: string, emptied: "[]" | "gone" = "[]"): Blank {
  return {
    kind: "rows",
    at,
    label,
    hint,
    unit: "",
    empty: "",
    show: (document) => showRows(valueAt(document, at)),
    put: (document, text) => {
      const rows = readRows(text, 2);
      return withValueAt(document, at, rows.length === 0 && emptied === "gone" ? undefined : rows);
    },
  };
}

/** Ring centres "r, z"; a third number −1 winds a ring against the rest. */
export function ringsBlank(winding: string): Blank {
  const at = `${winding}/centresMm`;
  const senseAt = `${winding}/sense`;
  return {
    ...rowsBlank(
      at,
      "Centres of the rings, mm",
      "r, z in mm, one ring a line; −1 after them: wound against the rest",
    ),
    owns: [senseAt],
    show: (document) => {
      const centres = valueAt(document, at);
      const sense = valueAt(document, senseAt);
      if (!Array.isArray(centres)) return showRows(centres);
      const senses: readonly unknown[] = Array.isArray(sense) ? sense : [];
      const told = (k: number): readonly unknown[] => (k in senses && senses[k] !== 1 ? [senses[k]] : []);
      return showRows(centres.map((c, k) => (Array.isArray(c) ? [...c, ...told(k)] : c)));
    },
    put: (document, text) => {
      const rows = readRows(text, 2);
      const centres = rows.map((row) => (Array.isArray(row) ? row.slice(0, 2) : row));
      const sense = rows.map((row) => (Array.isArray(row) && row.length > 2 ? row[2] : 1));
      const uneven = sense.some((s) => s !== 1);
      const written = withValueAt(document, at, centres);
      return withValueAt(written, senseAt, uneven ? sense : undefined);
    },
  };
}
