/** Reading a draft that may hold anything, and choosing among ways to write it. */
import { checkDesign } from "../../../meshes/check.ts";
import { Refusal } from "../../../meshes/refusal.ts";
import { valueAt } from "../../pointer.ts";

export type Keyed = Readonly<Record<string, unknown>>;

/** The object at a pointer; an empty one where there is none. */
export function objectAt(document: unknown, pointer: string): Keyed {
  const value = valueAt(document, pointer);
  return value !== null && typeof value === "object" && !Array.isArray(value) ? (value as Keyed) : {};
}

/** The list at a pointer; an empty one where there is none. */
export function listAt(document: unknown, pointer: string): readonly unknown[] {
  const value = valueAt(document, pointer);
  return Array.isArray(value) ? value : [];
}

/** The number under a key; `otherwise` where there is none. */
export function numberOf(from: Keyed, key: string, otherwise: number): number {
  const value = from[key];
  return typeof value === "number" && Number.isFinite(value) ? value : otherwise;
}

/** The entries of an object whose keys are among (or not among) `keys`. */
export function only(from: Keyed, keys: readonly string[]): Keyed {
  return Object.fromEntries(Object.entries(from).filter(([key]) => keys.includes(key)));
}
export function without(from: Keyed, keys: readonly string[]): Keyed {
  return Object.fromEntries(Object.entries(from).filter(([key]) => !keys.includes(key)));
}

function faultCount(document: unknown): number {
  try {
    checkDesign(document);
    return 0;
  } catch (error) {
    if (error instanceof Refusal) return error.faults.length;
    throw error;
  }
}

/** The document with the fewest faults, the first of those: the natural one where it is accepted. */
export function bestOf(documents: readonly unknown[]): unknown {
  let best: unknown = documents[0];
  let least = Infinity;
  for (const document of documents) {
    const count = faultCount(document);
    if (count < least) [best, least] = [document, count];
    if (count === 0) break;
  }
  return best;
}

/** Two significant digits: a number to start from. */
export const roundly = (x: number): number => Number(x.toPrecision(2));

/** Coordinates as good as they are meant. */
export const tidy = (x: number): number => Number(x.toFixed(6)) + 0;
