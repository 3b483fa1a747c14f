/** Mirror-symmetric designs are solved by half; the same equations on the whole grid, solved without that knowledge, are the witness. */
import { describe, expect, it } from "vitest";
import { cutGrid, lossesOf, powerBalance, prepare, prepareFolded, solveState } from "../solver/index.ts";
import { build } from "./build.ts";
import { checkDesign } from "./check.ts";
import type { Scene } from "./scene.ts";

type Changes = { coil?: object; winding?: object; parts?: object[]; guides?: object[]; frequencyHz?: number };

function scene({ coil = {}, winding = {}, parts, guides = [], frequencyHz = 9000 }: Changes): Scene {
  const bolt = {
    name: "bolt",
    shape: "cylinder",
    diameterMm: 20,
    lengthMm: 44,
    material: { resistivityOhmM: 3e-7, relativePermeability: 15 },
  };
  return checkDesign({
    coil: {
      conductor: { section: "roundTube", outsideDiameterMm: 6, wallMm: 1, material: "copper" },
      winding: { form: "helix", boreDiameterMm: 34, turns: 3, pitchMm: 9, ...winding },
      ...coil,
    },
    parts: parts ?? [bolt],
    guides,
    drive: { frequencyHz, currentA: 100 },
  }).scene;
}

const sleeve = (centreZMm: number, resistivityOhmM: number, relativePermeability: number): object => ({
  name: `sleeve ${centreZMm}`,
  shape: "cylinder",
  diameterMm: 22,
  lengthMm: 12,
  centreZMm,
  material: { resistivityOhmM, relativePermeability },
});

function both(s: Scene, level = 1) {
  const built = build(s);
  const grid = cutGrid(built.mesh, level);
  const states = (["empty", "loaded"] as const).map((state) => built.materials(state));
  const turns = states[0]?.map((m) => m.turn) ?? [];
  const whole = prepare(grid, turns);
  const half = prepareFolded(grid, states, s.circuit);
  const solve = (ready: typeof whole | typeof half) =>
    states.map((materials) => solveState(ready, { materials, omega: 2 * Math.PI * s.frequency }, s.circuit));
  return { whole, half, solve };
}

/** Largest difference over the largest modulus. */
function apart(a: Float64Array, b: Float64Array): number {
  let most = 0;
  let size = 0;
  a.forEach((x, i) => {
    most = Math.max(most, Math.abs(x - (b[i] ?? Number.NaN)));
    size = Math.max(size, Math.abs(x));
  });
  return most / size;
}

describe("a mirror-symmetric design", () => {
  it.each<[string, Changes, number]>([
    ["with a turn on the plane", {}, 1],
    ["with turns beside the plane only", { winding: { turns: 4 } }, 1],
    ["off the middle of heights", { winding: { centreZMm: 40 }, parts: [sleeve(40, 4e-7, 1)] }, 1],
    ["of two like parts", { parts: [sleeve(8, 3e-7, 15), sleeve(-8, 3e-7, 15)] }, 1],
    ["on a finer grid", {}, 2],
    ["of strands that are each symmetric", { coil: { strands: [[0, 2], [1]] } }, 1],
  ])("%s is solved by half, as on the whole", (_, changes, level) => {
    const { whole, half, solve } = both(scene(changes), level);
    expect(half).toHaveProperty("half");
    if (!("half" in half)) return;
    expect(half.half.system.unknowns).toBeLessThan(0.55 * whole.system.unknowns);
    expect(half.system.unknowns).toBe(whole.system.unknowns);
    for (const key of ["stiffness", "mass", "exteriorStiffness", "leastJacobian"] as const)
      expect(apart(whole.integrals[key], half.integrals[key])).toBeLessThan(1e-9);
    expect(half.integrals.kind).toEqual(whole.integrals.kind);
    expect(half.integrals.touch).toEqual(whole.integrals.touch);
    const [expected, found] = [solve(whole), solve(half)];
    expected.forEach((e, k) => {
      const f = found[k];
      if (f === undefined) throw new Error("no state");
      expect(apart(e.psi.re, f.psi.re)).toBeLessThan(1e-9);
      expect(apart(e.psi.im, f.psi.im)).toBeLessThan(1e-9);
      expect(apart(e.u.re, f.u.re)).toBeLessThan(1e-9);
      expect(apart(e.u.im, f.u.im)).toBeLessThan(1e-9);
      expect(Math.abs(f.impedance.re / e.impedance.re - 1)).toBeLessThan(1e-9);
      expect(Math.abs(f.impedance.im / e.impedance.im - 1)).toBeLessThan(1e-9);
      expect(apart(e.pathImpedances.im, f.pathImpedances.im)).toBeLessThan(1e-9);
      const { active, reactive } = powerBalance(f, lossesOf(f));
      expect(active).toBeLessThan(1e-9);
      expect(reactive).toBeLessThan(1e-9);
    });
  });
});

describe("what is only nearly symmetric is solved whole", () => {
  it.each<[string, Changes]>([
    [
      "turns wound against each other",
      {
        coil: {
          winding: {
            form: "rings",
            centresMm: [
              [20, -9],
              [20, 9],
            ],
            sense: [1, -1],
          },
        },
      },
    ],
    [
      "strands on one side each",
      {
        winding: { turns: 4 },
        coil: {
          strands: [
            [0, 1],
            [2, 3],
          ],
        },
      },
    ],
    ["a part moved by a tenth of a micrometre", { parts: [sleeve(1e-4, 4e-7, 1)] }],
    ["parts of equal skin depth but other µr", { parts: [sleeve(8, 4e-7, 10), sleeve(-8, 2e-7, 5)] }],
  ])("%s", (_, changes) => {
    const { half } = both(scene(changes));
    expect(half).not.toHaveProperty("half");
  });
});
