import { readFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { afterEach, beforeEach, describe, expect, it, vi } from "vitest";
import { checkDesign } from "../../meshes/check.ts";
import { readJson } from "../../meshes/json.ts";
import type { Prediction } from "../../meshes/predict.ts";
import { solveCommand } from "./solve.ts";

const path = fileURLToPath(new URL("../../meshes/examples/demo.json", import.meta.url));
const { design } = checkDesign(readJson(readFileSync(path, "utf8")));
const q = { value: 1, plusMinus: 0.1 };
const state = { resistanceOhm: q, inductanceH: q, reactanceOhm: q, q };

function prediction(accuracyMet: boolean, resistance = q): Prediction {
  return {
    result: {
      design,
      empty: { ...state, resistanceOhm: resistance },
      loaded: null,
      power: {
        totalW: q,
        coilW: q,
        heatedW: q,
        otherW: q,
        efficiency: q,
        currentA: q,
        coilVoltageV: q,
        reactiveVar: q,
        resonantCapacitanceF: q,
      },
      turns: [],
      parts: [],
      strayField: [],
      leads: null,
      copper: { lengthMm: 1, helixExtraOhm: 0, helixExtraH: 0 },
      numerics: {
        unknowns: 1,
        grids: 1,
        iterations: 1,
        seconds: 1,
        peakMemoryBytes: 1,
        powerBalance: 0,
        accuracyMet,
      },
      cautions: [],
    },
    heat: {
      corners: new Float64Array(),
      density: new Float64Array(),
      outline: new Int32Array(),
      outlines: [],
    },
  };
}

describe("the status of emberturn solve", () => {
  const said = { stdout: "", stderr: "" };

  beforeEach(() => {
    said.stdout = "";
    said.stderr = "";
    vi.spyOn(process.stdout, "write").mockImplementation((text) => {
      said.stdout += String(text);
      return true;
    });
    vi.spyOn(process.stderr, "write").mockImplementation((text) => {
      said.stderr += String(text);
      return true;
    });
    process.exitCode = undefined;
  });
  afterEach(() => {
    vi.restoreAllMocks();
    process.exitCode = undefined;
  });

  // What the solver says is given here: the statuses of the command are the matter, and no small design falls short.
  const solve = (given: Prediction, json: boolean): Promise<void> =>
    solveCommand(path, { json }, () => Promise.resolve(given));

  it("is 0 when the accuracy holds, with nothing on stderr", async () => {
    await solve(prediction(true), true);
    expect(process.exitCode).toBeUndefined();
    expect(JSON.parse(said.stdout)).toEqual(prediction(true).result);
    expect(said.stderr).toBe("");
  });

  it.each([true, false])(
    "is 3 when it falls short, the result printed all the same (json %s)",
    async (json) => {
      await solve(prediction(false), json);
      expect(process.exitCode).toBe(3);
      expect(said.stdout).toMatch(json ? /"accuracyMet": false/ : /NOT\s+reached/);
      expect(said.stderr).toBe("Solved, but short of the asked 0.2 %: go by the bars.\n");
    },
  );

  it("is a failure, with nothing printed, when a figure is no number", async () => {
    await expect(solve(prediction(true, { value: Number.NaN, plusMinus: 0 }), true)).rejects.toThrow(
      "no number at /empty/resistanceOhm/value",
    );
    expect(said.stdout).toBe("");
  });
});
