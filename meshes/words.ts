/** The one place where the schema library's findings become words a coil winder understands. */
import type * as z from "zod";
import { materials } from "../solver/index.ts";
import { type Fault, pointerTo } from "./refusal.ts";

type Issue = z.core.$ZodIssue;
type Path = readonly PropertyKey[];

/** More faults than this in one document are counted, not listed. */
const MOST_FAULTS = 100;

/**
 * Error map to parse with: carries the keys an object does know into the issue about those it does not, so that a hint can be
 * given. All other words are made here afterwards.
 */
export function carryKnownKeys(issue: z.core.$ZodRawIssue): string | undefined {
  if (issue.code !== "unrecognized_keys") return undefined;
  const definition = issue.inst?._zod.def as { readonly shape?: object } | undefined;
  return Object.keys(definition?.shape ?? {}).join(",");
}

/** Faults, one an entry, from the schema's issues about the document `root`. */
export function faultsFromIssues(issues: readonly Issue[], root: unknown): Fault[] {
  const faults: Fault[] = [];
  const pointers = new Set<string>();
  for (const issue of issues) {
    // The schema library also compares whole numbers with what a double can count to; our own limit says it better.
    if (issue.code === "too_big" && issue.maximum === Number.MAX_SAFE_INTEGER) continue;
    for (const found of fromIssue(issue, root, [])) {
      // A value can fail two rules at once (not whole, too large); one sentence is enough.
      if (pointers.has(found.pointer)) continue;
      pointers.add(found.pointer);
      faults.push(found);
    }
  }
  return faults;
}

/** Cuts an endless list of faults short, saying so. */
export function bounded(faults: readonly Fault[]): readonly Fault[] {
  if (faults.length <= MOST_FAULTS) return faults;
  const rest = faults.length - MOST_FAULTS;
  return [
    ...faults.slice(0, MOST_FAULTS),
    { pointer: "", detail: `and ${rest} more faults of the same document` },
  ];
}

/** A number as a winder writes it: four significant digits, no trailing zeros. */
export function figure(x: number): string {
  return String(Number(x.toPrecision(4)));
}

function fromIssue(issue: Issue, root: unknown, base: Path): Fault[] {
  const path = [...base, ...issue.path];
  const value = valueAt(root, path);
  const one = (detail: string, accepted?: string): Fault[] => [make(path, detail, accepted)];
  switch (issue.code) {
    case "unrecognized_keys":
      return unknownKeys(path, issue.keys, issue.message.split(","));
    case "invalid_union":
      return fromUnion(issue, root, path);
    case "invalid_type":
      return value === undefined
        ? one(`${label(path)} is missing`, wanted(issue.expected, path))
        : one(
            `${label(path)} is ${shown(value, path)}${whole(issue.expected, value)}`,
            wanted(issue.expected, path),
          );
    case "invalid_value":
      return one(...choice(path, value, issue.values));
    case "too_small":
      return one(...bound(path, value, issue.origin, Number(issue.minimum), "at least"));
    case "too_big":
      return one(...bound(path, value, issue.origin, Number(issue.maximum), "at most"));
    case "custom": {
      const { accepted } = issue.params ?? {};
      return one(issue.message, typeof accepted === "string" ? accepted : undefined);
    }
    default:
      return one(`${label(path)} is not as it should be`);
  }
}

/** Points at the branch the writer had in mind: the one that takes this kind of value. */
function fromUnion(issue: z.core.$ZodIssueInvalidUnion, root: unknown, path: Path): Fault[] {
  const value = valueAt(root, path);
  const { discriminator, options } = issue as { discriminator?: string; options?: readonly unknown[] };
  if (discriminator !== undefined) return [make(path, ...choice(path, value, options ?? []))];
  const meant = issue.errors.find(
    (branch) => !branch.some((i) => i.path.length === 0 && wrongKind.has(i.code)),
  );
  if (meant !== undefined) return meant.flatMap((i) => fromIssue(i, root, path));
  const library = issue.errors.flat().find((i) => i.code === "invalid_value" && i.path.length === 0);
  if (library?.code === "invalid_value") return [make(path, ...libraryWords(path, value, library.values))];
  const detail =
    value === undefined ? `${label(path)} is missing` : `${label(path)} is ${shown(value, path)}`;
  return [make(path, detail, `${wanted("number", path)}, or a list of such numbers`)];
}

const wrongKind: ReadonlySet<string> = new Set(["invalid_type", "invalid_value"]);

function libraryWords(path: Path, value: unknown, ids: readonly unknown[]): [string, string] {
  const accepted = `a library id (${ids.join(", ")}), or an object with resistivityOhmM and relativePermeability`;
  if (value === undefined) return [`${label(path)} is missing`, accepted];
  const library = typeof value === "string" ? libraryDetail(path, value) : undefined;
  return [library ?? `${label(path)} is ${shown(value, path)}`, accepted];
}

/** Why an id is refused: unknown, or known and of no use in this place. */
function libraryDetail([place]: Path, id: string): string {
  if (!materials.has(id)) return `the library has no material “${clipped(id)}”`;
  return place === "coil"
    ? `${id} is of the library, but nothing to wind a coil from: that takes a metal that is solid and not magnetic`
    : `${id} is of the library, but no material of a guide: that is magnetic and practically does not conduct`;
}

/** Keys that are known elsewhere, with the reason why not here. */
const elsewhere: ReadonlyMap<string, string> = new Map([
  ["lossTangent", "lossTangent is for guides only; what conducts has its losses by resistivityOhmM"],
  ["heated", "heated is for parts only; a guide's heat is never wanted"],
  ["strands", "strands belong to the coil, beside conductor and winding"],
  ["leads", "leads belong to the coil, beside conductor and winding"],
  ["wallMm", "a bar is solid and has no wall; roundTube and rectTube have one"],
]);

/** Hints are looked for as long as the faults are listed at all. */
function unknownKeys(path: Path, keys: readonly string[], known: readonly string[]): Fault[] {
  return keys.map((key, i) => unknownKey([...path, key], key, i < MOST_FAULTS ? known : []));
}

function unknownKey(path: Path, key: string, known: readonly string[]): Fault {
  const near = nearest(key, known);
  const why = near !== undefined ? `did you mean ${near}?` : elsewhere.get(key);
  const name = key.length > 40 ? `${key.slice(0, 40)}…` : key;
  return make(
    path,
    `${name} is not a key known here${why === undefined ? "" : `; ${why}`}`,
    `one of ${known.join(", ")}`,
  );
}

function choice(path: Path, value: unknown, values: readonly unknown[]): [string, string] {
  const accepted = values.length === 1 ? String(values[0]) : `one of ${values.join(", ")}`;
  if (value === undefined) return [`${label(path)} is missing`, accepted];
  const near = typeof value === "string" ? nearest(value, values.map(String)) : undefined;
  const hint = near === undefined ? "" : `; did you mean ${near}?`;
  return [`${label(path)} is ${shown(value, path)}, which is not known here${hint}`, accepted];
}

function bound(path: Path, value: unknown, origin: string, limit: number, word: string): [string, string] {
  if (origin === "array" && isPair(path)) {
    return [`${label(path)} holds ${(value as unknown[]).length}`, pairWords(path)];
  }
  if (origin === "array") {
    return [
      `${label(path)} lists ${(value as unknown[]).length} entries; ${word} ${limit} are taken`,
      `${word} ${limit} entries`,
    ];
  }
  if (origin === "string") return [`${label(path)} is too long`, `${word} ${limit} characters`];
  if (isRadius(path) && limit === 0) {
    return [
      `${label(path)} is ${shown(value, path)}: beyond the axis, and r is counted from the axis outwards`,
      "0 or above",
    ];
  }
  const unit = unitOf(path);
  return [
    `${label(path)} is ${shown(value, path)}; it has to be ${word} ${limit}${unit}`,
    `${word} ${limit}${unit}`,
  ];
}

const kinds: Readonly<Record<string, string>> = {
  int: "a whole number",
  string: "a text in quotes",
  boolean: "true or false",
  array: "a list [ … ]",
  object: "an object { … }",
};

function wanted(expected: string, path: Path): string {
  if (isPair(path)) return pairWords(path);
  if (expected !== "number") return kinds[expected] ?? expected;
  const unit = unitOf(path).trim();
  return unit === "" ? "a number, without quotes" : `a number of ${unit}, without quotes`;
}

function whole(expected: string, value: unknown): string {
  return expected === "int" && typeof value === "number" ? ", not a whole number" : "";
}

/** Pairs in lists of points and curves. */
function isPair(path: Path): boolean {
  return (
    typeof path.at(-1) === "number" && /^(pointsMm|centresMm|strayPointsMm|curve)$/.test(String(path.at(-2)))
  );
}

function pairWords(path: Path): string {
  return path.at(-2) === "curve" ? "two numbers, [hAPerM, bT]" : "two numbers, [r, z] in mm";
}

function isRadius(path: Path): boolean {
  return path.at(-1) === 0 && isPair(path.slice(0, -1)) && path.at(-3) !== "curve";
}

/** What a value is called: its key, or its place in a list. */
function label(path: Path): string {
  const last = path.at(-1);
  if (last === undefined) return "the document";
  if (typeof last !== "number") return String(last);
  if (isPair(path)) return path.at(-2) === "centresMm" ? `ring ${last}` : `point ${last}`;
  if (isPair(path.slice(0, -1))) {
    const names = path.at(-3) === "curve" ? ["H", "B"] : ["r", "z"];
    return `${names[last] ?? "a third number"} of ${label(path.slice(0, -1))}`;
  }
  const list = path.findLastIndex((k) => typeof k === "string");
  return `${String(path[list] ?? "the list")} entry ${path.slice(list + 1).join(", ")}`;
}

const units: readonly (readonly [RegExp, string])[] = [
  [/OhmM$/, " Ω·m"],
  [/Mm$/, " mm"],
  [/Hz$/, " Hz"],
  [/Percent$/, " %"],
  [/C$/, " °C"],
  [/A$/, " A"],
  [/W$/, " W"],
  [/V$/, " V"],
  [/T$/, " T"],
];

function unitOf(path: Path): string {
  const key = path.findLast((k) => typeof k === "string") ?? "";
  return units.find(([ending]) => ending.test(key as string))?.[1] ?? "";
}

function shown(value: unknown, path: Path): string {
  if (typeof value === "number") {
    return Number.isFinite(value) ? `${value}${unitOf(path)}` : "not a number of any finite size";
  }
  if (typeof value === "string") return `the text “${clipped(value)}”`;
  if (Array.isArray(value)) return "a list";
  return value !== null && typeof value === "object" ? "an object" : String(value);
}

function clipped(text: string): string {
  return text.length > 40 ? `${text.slice(0, 40)}…` : text;
}

function make(path: Path, detail: string, accepted: string | undefined): Fault {
  const pointer = pointerTo("", ...path);
  return accepted === undefined ? { pointer, detail } : { pointer, detail, accepted };
}

function valueAt(root: unknown, path: Path): unknown {
  let value = root;
  for (const key of path) {
    if (value === null || typeof value !== "object" || !Object.hasOwn(value, key)) return undefined;
    value = (value as Record<PropertyKey, unknown>)[key];
  }
  return value;
}

/** The candidate fewest letters away, when that is a slip of the pen rather than another word. */
function nearest(word: string, candidates: readonly string[]): string | undefined {
  if (word.length > 40) return undefined;
  let best: string | undefined;
  let least = Math.max(2, Math.floor(word.length / 3)) + 1;
  for (const candidate of candidates) {
    const distance = lettersApart(word.toLowerCase(), candidate.toLowerCase());
    if (distance < least) {
      least = distance;
      best = candidate;
    }
  }
  return best;
}

/** Levenshtein's distance, row by row. */
function lettersApart(a: string, b: string): number {
  let row = Array.from({ length: b.length + 1 }, (_, j) => j);
  for (let i = 1; i <= a.length; i++) {
    const next = [i];
    for (let j = 1; j <= b.length; j++) {
      const swap = row[j - 1]! + (a[i - 1] === b[j - 1] ? 0 : 1);
      next.push(Math.min(swap, row[j]! + 1, next[j - 1]! + 1));
    }
    row = next;
  }
  return row[b.length]!;
}
