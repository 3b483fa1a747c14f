/** The designs whose time to accuracy is measured, with what they truly give. */
import type { Result } from "../../meshes/result.ts";
import { BATTERY } from "../battery/designs/index.ts";
import { readTruths } from "../battery/store.ts";
import reference from "../reference/open-cases.json";

/** Figures errors are told of: R, Ω, and L, H, of both states; the part's power, W. */
export interface Figures {
  readonly resistances: readonly number[];
  readonly inductances: readonly number[];
  readonly power: number;
}

export interface TimedCase {
  readonly name: string;
  readonly design: WrittenDesign;
  readonly truth: Figures;
}

/** What the bench changes of a design. */
interface WrittenDesign {
  readonly parts: readonly {
    readonly lengthMm: number;
    readonly material: { readonly resistivityOhmM: number };
  }[];
  readonly drive: { readonly frequencyHz: number };
}

const PIN = "pin-400k";

/** The open cases against our own finite-element figures, the 400 kHz pin against the battery's truth. */
export function timedCases(): TimedCase[] {
  const open = reference.cases.map(({ name, design, empty, loaded }) => ({
    name,
    design,
    truth: {
      resistances: [empty.resistanceOhm, loaded.resistanceOhm],
      inductances: [empty.inductanceH, loaded.inductanceH],
      power: loaded.partPowerW,
    },
  }));
  return [...open, pin()];
}

function pin(): TimedCase {
  const design = BATTERY.find(({ id }) => id === PIN)?.design as WrittenDesign | undefined;
  const barred = readTruths().get(PIN)?.barred;
  const value = (path: string): number => barred?.[path]?.[0] ?? Number.NaN;
  if (design === undefined) throw new RangeError(`the battery has no ${PIN}`);
  return {
    name: PIN,
    design,
    truth: {
      resistances: [value("empty.resistanceOhm"), value("loaded.resistanceOhm")],
      inductances: [value("empty.inductanceH"), value("loaded.inductanceH")],
      power: value("parts.0.powerW"),
    },
  };
}

/** Cases the project has set itself times for, at these accuracies in %: whole command and warm worker, s. */
export const TARGET_CASES: readonly string[] = ["open-2", PIN];
export const ACCURACIES: readonly number[] = [1, 0.2, 0.02];

/** The design at an accuracy. */
export const atAccuracy = <D extends object>(design: D, accuracyPercent: number) => ({
  ...design,
  accuracyPercent,
});

/** A design nobody has solved yet, and the same to seven digits: the part is longer by k parts in 10⁸. */
export function unseen(design: WrittenDesign, k: number): WrittenDesign {
  const parts = design.parts.map((part) => ({ ...part, lengthMm: part.lengthMm * (1 + 1e-8 * k) }));
  return { ...design, parts };
}

/** The one number that changes between two solves. */
const CHANGE = 1.05;

export function otherFrequency(design: WrittenDesign): WrittenDesign {
  return { ...design, drive: { ...design.drive, frequencyHz: CHANGE * design.drive.frequencyHz } };
}

export function otherMaterial(design: WrittenDesign): WrittenDesign {
  const parts = design.parts.map((part) => ({
    ...part,
    material: { ...part.material, resistivityOhmM: CHANGE * part.material.resistivityOhmM },
  }));
  return { ...design, parts };
}

/** Worst relative errors of a result. */
export interface Errors {
  readonly resistance: number;
  readonly inductance: number;
  readonly power: number;
}

export function errorsOf({ empty, loaded, parts }: Result, truth: Figures): Errors {
  const worst = (got: readonly (number | undefined)[], expected: readonly number[]): number =>
    Math.max(...expected.map((e, i) => Math.abs((got[i] ?? Number.NaN) - e) / e));
  return {
    resistance: worst([empty.resistanceOhm.value, loaded?.resistanceOhm.value], truth.resistances),
    inductance: worst([empty.inductanceH.value, loaded?.inductanceH.value], truth.inductances),
    power: worst([parts[0]?.powerW.value], [truth.power]),
  };
}
