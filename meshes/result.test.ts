import { expect, test } from "vitest";
import { checkDesign } from "./check.ts";
import { plainDesign } from "./drafts.ts";
import { ResultSchema } from "./result.ts";

const u = { value: 1, plusMinus: 0.1 };
const terminal = { resistanceOhm: u, inductanceH: u, reactanceOhm: u, q: u };

function sample(): Record<string, unknown> {
  return {
    design: checkDesign(plainDesign()).design,
    empty: terminal,
    loaded: null,
    power: {
      totalW: u,
      coilW: u,
      heatedW: u,
      otherW: u,
      efficiency: u,
      currentA: u,
      coilVoltageV: u,
      reactiveVar: u,
      resonantCapacitanceF: u,
    },
    turns: [{ rMm: 29, zMm: -31.5, powerW: 12.3 }],
    parts: [],
    strayField: [{ rMm: 300, zMm: 0, fluxDensityT: u }],
    leads: null,
    copper: { lengthMm: 1275, helixExtraOhm: 0, helixExtraH: 0 },
    numerics: {
      unknowns: 1,
      grids: 3,
      iterations: 0,
      seconds: 1,
      peakMemoryBytes: 1,
      powerBalance: 0,
      accuracyMet: true,
    },
    cautions: [],
  };
}

test("a result without parts and leads has null in their place", () => {
  expect(ResultSchema.safeParse(sample()).success).toBe(true);
});

test.each([
  ["a bar that is no number", { empty: { ...terminal, q: { value: 1, plusMinus: Number.NaN } } }],
  ["a negative bar", { empty: { ...terminal, q: { value: 1, plusMinus: -1 } } }],
  ["a key too many", { extra: 1 }],
  ["a state left out", { loaded: undefined }],
  ["a design without its defaults' kinds", { design: { coil: 3 } }],
])("%s is no result", (_name, change) => {
  expect(ResultSchema.safeParse({ ...sample(), ...change }).success).toBe(false);
});
