/** Design documents for tests: a plain one, and variations of it, right and wrong. */
import { expect, test } from "vitest";
import { checkDesign } from "./check.ts";
import { type Fault, Refusal } from "./refusal.ts";

/** A document under variation; any key may be set to anything. */
// biome-ignore lint/suspicious/noExplicitAny: tests write wrong documents on purpose
export type Draft = any;

/** Seven turns of tube about a billet, nothing optional given. */
export function plainDesign(): Draft {
  return {
    coil: {
      conductor: { section: "roundTube", outsideDiameterMm: 8, wallMm: 1, material: "copper" },
      winding: { form: "helix", boreDiameterMm: 50, turns: 7, pitchMm: 10.5 },
    },
    parts: [
      {
        name: "pin",
        shape: "cylinder",
        diameterMm: 30,
        lengthMm: 90,
        material: { resistivityOhmM: 2.5e-7, relativePermeability: 60 },
      },
    ],
    drive: { frequencyHz: 10_000, currentA: 400 },
  };
}

/** The plain design after `change`. */
export function varied(change: (design: Draft) => void): Draft {
  const design = plainDesign();
  change(design);
  return design;
}

/** A part named `name` with this outline. */
export function outline(name: string, pointsMm: readonly (readonly [number, number])[]): Draft {
  return { name, shape: "outline", pointsMm, material: { resistivityOhmM: 1e-6 } };
}

/** A rectangular outline part named `name`, r from a to b, z from c to d. */
export function block(name: string, a: number, b: number, c: number, d: number): Draft {
  return outline(name, [
    [a, c],
    [b, c],
    [b, d],
    [a, d],
  ]);
}

/** The faults of the plain design after `change`; empty when it is accepted. */
export function faultsOf(change: (design: Draft) => void): readonly Fault[] {
  return faultsOfDocument(varied(change));
}

/** The faults of a document; empty when it is accepted. */
export function faultsOfDocument(document: unknown): readonly Fault[] {
  try {
    checkDesign(document);
    return [];
  } catch (error) {
    if (error instanceof Refusal && error.status === "refused") return error.faults;
    throw error;
  }
}

/** A wrong document: its name, the change that makes it, and the fault's pointer, detail and accepted value. */
export type WrongCase = [
  name: string,
  change: (d: Draft) => void,
  pointer: string,
  words: RegExp,
  accepted?: RegExp,
];

/** Tests that each change raises exactly the one fault it names; the plain design raises none. */
export function refuses(cases: readonly WrongCase[]): void {
  test.each(cases)("%s", (_name, change, pointer, words, accepted) => {
    const faults = faultsOf(change);
    expect(faults.map((f) => f.pointer)).toEqual([pointer]);
    expect(faults[0]?.detail).toMatch(words);
    if (accepted !== undefined) expect(faults[0]?.accepted).toMatch(accepted);
    // Nobody outside should have to know the schema library's language.
    expect(faults[0]?.detail).not.toMatch(/invalid|expected|received|undefined|zod/i);
  });
}
