import { describe, expect, it } from "vitest";
import { MU0 } from "../solver/index.ts";
import { type Answer, answerAt, type Solved } from "./answer.ts";
import { build } from "./build.ts";
import { checkDesign } from "./check.ts";
import type { FieldGrid, Fields, StateFields } from "./fields.ts";
import { resample } from "./resample.ts";
import type { Scene } from "./scene.ts";

const CURRENT = 250;

/** Two tubes round a magnetic bar; a ring that only lags, and one that conducts and lags, above and below. */
const scene = checkDesign({
  coil: {
    conductor: {
      section: "roundTube",
      outsideDiameterMm: 8,
      wallMm: 1.5,
      material: { resistivityOhmM: 1.75e-8 },
    },
    winding: { form: "helix", boreDiameterMm: 44, turns: 2, pitchMm: 12 },
  },
  parts: [
    {
      name: "bar",
      shape: "cylinder",
      diameterMm: 24,
      lengthMm: 30,
      centreZMm: 3,
      material: { resistivityOhmM: 2e-7, relativePermeability: 20 },
    },
  ],
  guides: [
    {
      name: "upper",
      shape: "cylinder",
      diameterMm: 56,
      boreDiameterMm: 46,
      lengthMm: 5,
      centreZMm: 20,
      material: { relativePermeability: 30, lossTangent: 0.02 },
    },
    {
      name: "lower",
      shape: "cylinder",
      diameterMm: 56,
      boreDiameterMm: 46,
      lengthMm: 5,
      centreZMm: -20,
      material: { relativePermeability: 30, lossTangent: 0.02, resistivityOhmM: 1e-4 },
    },
  ],
  drive: { frequencyHz: 4000, currentA: CURRENT },
}).scene;
const answer = answerAt(scene, build(scene), 2, () => {});
const fields = resample(scene, answer, CURRENT);

type Box = readonly [r0: number, r1: number, z0: number, z1: number];

/** Sum of a density times the volume of every cell inside a box of lines (mm). */
function total({ nr, nz, r, z }: FieldGrid, density: (cell: number) => number, box?: Box): number {
  const [r0, r1, z0, z1] = box ?? [-1, 1e6, -1e6, 1e6];
  let sum = 0;
  for (let i = 0; i + 1 < nr; i++) {
    for (let k = 0; k + 1 < nz; k++) {
      const [ra, rb] = [r[i * nz] ?? 0, r[(i + 1) * nz] ?? 0];
      const [za, zb] = [z[k] ?? 0, z[k + 1] ?? 0];
      const inside =
        1e3 * ra > r0 - 1e-6 && 1e3 * rb < r1 + 1e-6 && 1e3 * za > z0 - 1e-6 && 1e3 * zb < z1 + 1e-6;
      if (inside) sum += density(i * (nz - 1) + k) * Math.PI * (rb ** 2 - ra ** 2) * (zb - za);
    }
  }
  return sum;
}
const watts = (state: StateFields, box?: Box): number =>
  total(fields.grid, (c) => state.powerDensity[c] ?? 0, box);
const squares = (state: StateFields, box?: Box): number =>
  total(fields.grid, (c) => (state.currentDensity[c] ?? 0) ** 2, box);
const near = (a: number, b: number, relative: number): void => {
  expect(Math.abs(a - b)).toBeLessThanOrEqual(relative * Math.abs(b));
};

const loaded = fields.loaded as StateFields;
const states: [StateFields, Solved][] = [
  [loaded, answer.loaded as Solved],
  [fields.empty, answer.empty],
];
const turnBox = (k: number): Box => [22, 30, -6 + 12 * k - 4, -6 + 12 * k + 4];
const BAR: Box = [0, 12, -12, 18];
const UPPER: Box = [23, 28, 17.5, 22.5];
const LOWER: Box = [23, 28, -22.5, -17.5];

describe("power on the grid of lines", () => {
  it("adds up to the whole, to each turn's, to each body's", () => {
    for (const [state, { losses }] of states) {
      const power = (region: number): number => (losses.regionPower[region] ?? 0) * CURRENT ** 2;
      near(watts(state), losses.totalPower * CURRENT ** 2, 1e-12);
      // Positions are rounded to 2^−36 of the scene's size.
      near(watts(state, turnBox(0)), power(1), 1e-8);
      near(watts(state, turnBox(1)), power(2), 1e-8);
      near(watts(state, UPPER), power(4), 1e-8);
      near(watts(state, LOWER), power(5), 1e-8);
    }
    near(watts(loaded, BAR), (answer.loaded?.losses.regionPower[3] ?? 0) * CURRENT ** 2, 1e-8);
  });

  it("is nowhere negative, and nowhere but in copper and bodies", () => {
    for (const [state] of states) expect(state.powerDensity.every((p) => p >= 0)).toBe(true);
    const boxes = [turnBox(0), turnBox(1), BAR, UPPER, LOWER];
    near(
      boxes.reduce((sum, b) => sum + watts(loaded, b), 0),
      watts(loaded),
      1e-8,
    );
    expect(watts(fields.empty, BAR)).toBe(0);
    // The bore of the tube: a square inside its circle.
    expect(watts(loaded, [25, 27, -7, -5])).toBe(0);
  });
});

describe("current density on the grid of lines", () => {
  it("has |J|² add up to what the Joule heat of each conductor says: ∫|J|² dV = σP", () => {
    for (const [state, { losses }] of states) {
      near(squares(state, turnBox(0)), ((losses.turnPower[0] ?? 0) * CURRENT ** 2) / 1.75e-8, 1e-8);
    }
    near(squares(loaded, BAR), ((answer.loaded?.losses.regionPower[3] ?? 0) * CURRENT ** 2) / 2e-7, 1e-8);
  });

  it("leaves the lag of magnetic materials out", () => {
    expect(watts(loaded, UPPER)).toBeGreaterThan(0);
    expect(squares(loaded, UPPER)).toBe(0);
    const joule = squares(loaded, LOWER) * 1e-4;
    expect(joule).toBeGreaterThan(0);
    near(watts(loaded, LOWER) - joule, watts(loaded, UPPER), 0.3);
  });
});

describe("fields at the nodes", () => {
  /** A turn of thin wire: radius 50 mm, wire 0.5 mm. */
  const ring = checkDesign({
    coil: {
      conductor: { section: "roundBar", outsideDiameterMm: 0.5, material: { resistivityOhmM: 1.75e-8 } },
      winding: { form: "rings", centresMm: [[50, 0]] },
    },
    drive: { frequencyHz: 50, currentA: 10 },
  }).scene;

  /** Root mean square error of B and largest of A, against a circle of current, both in units of |B| (and 50 mm), 10 mm off the wire and further. */
  function errors(level: number): { a: number; b: number } {
    const { grid, empty } = resample(
      ring,
      answerAt(ring, build(ring), level, () => {}),
      10,
    );
    const count = grid.nr * grid.nz;
    let [a, squared, compared] = [0, 0, 0];
    for (let n = 0; n < count; n++) {
      const [rn, zn] = [grid.r[n] ?? 0, grid.z[n] ?? 0];
      if (Math.hypot(rn - 0.05, zn) < 0.01) continue;
      const exact = circle(rn, zn, 10);
      const scale = Math.hypot(exact.br, exact.bz);
      const { vectorPotential, fluxDensity } = empty;
      a = Math.max(a, Math.abs((vectorPotential.re[n] ?? 0) - exact.a) / (0.05 * scale));
      squared += ((fluxDensity.re[n] ?? 0) - exact.br) ** 2 / scale ** 2;
      squared += ((fluxDensity.re[count + n] ?? 0) - exact.bz) ** 2 / scale ** 2;
      compared++;
    }
    expect(compared).toBeGreaterThan(1000);
    return { a, b: Math.sqrt(squared / compared) };
  }

  it("are those of a circle of current (Biot–Savart, Jackson eq. 5.36, integrated here): A of third order, B of second", () => {
    const [first, second, fourth] = [errors(1), errors(2), errors(4)];
    expect(first.a).toBeLessThan(2e-3);
    expect(second.a).toBeLessThan(first.a / 4);
    expect(fourth.a).toBeLessThan(second.a / 6);
    expect(second.b).toBeLessThan(5e-3);
    expect(fourth.b).toBeLessThan(second.b / 3);
  });

  it("have A = 0 and B_r = 0 on the axis", () => {
    const { nz } = fields.grid;
    const { vectorPotential: a, fluxDensity: b } = loaded;
    for (let k = 0; k < nz; k++) {
      expect([a.re[k], a.im[k]]).toEqual([0, 0]);
      expect(Math.hypot(b.re[k] ?? 0, b.im[k] ?? 0)).toBeLessThan(1e-12);
    }
  });

  it("show on a magnetic part's side the flux inside it: µr times that of the air beside", () => {
    const { nr, nz, r, z } = fields.grid;
    const side =
      Array.from({ length: nr }, (_, i) => i).find((i) => Math.abs((r[i * nz] ?? 0) - 0.012) < 1e-9) ?? 0;
    const bz = (i: number, k: number): number =>
      Math.hypot(
        loaded.fluxDensity.re[nr * nz + i * nz + k] ?? 0,
        loaded.fluxDensity.im[nr * nz + i * nz + k] ?? 0,
      );
    for (let k = 0; k < nz; k++) {
      if (Math.abs((z[k] ?? 0) - 0.003) > 0.01) continue;
      const ratio = bz(side, k) / bz(side + 1, k);
      expect(ratio).toBeGreaterThan(17);
      expect(ratio).toBeLessThan(23);
    }
  });
});

describe("resampled states", () => {
  it("go with the current, and are the same on every run", () => {
    const twice = resample(scene, answer, 2 * CURRENT);
    const pick = ({ empty }: Fields): number[] => [
      empty.vectorPotential.im[500] ?? 0,
      empty.fluxDensity.re[500] ?? 0,
      empty.currentDensity.reduce((m, x) => Math.max(m, x)),
      Math.sqrt(empty.powerDensity.reduce((m, x) => Math.max(m, x))),
    ];
    pick(fields).forEach((x, i) => {
      near(pick(twice)[i] ?? 0, 2 * x, 1e-12);
    });
    expect(resample(scene, answer, CURRENT)).toEqual(fields);
  });

  it("are the empty one alone where there is no part", () => {
    const bare: Scene = { ...scene, bodies: [] };
    const alone: Answer = answerAt(bare, build(bare), 1, () => {});
    expect(resample(bare, alone, 1).loaded).toBeNull();
  });

  it("have the lengths their shapes say", () => {
    const { nr, nz, r, z } = fields.grid;
    expect([r.length, z.length]).toEqual([nr * nz, nr * nz]);
    for (const [s] of states) {
      expect(s.vectorPotential.re.length).toBe(nr * nz);
      expect(s.fluxDensity.im.length).toBe(2 * nr * nz);
      expect(s.powerDensity.length).toBe((nr - 1) * (nz - 1));
      expect(s.currentDensity.length).toBe((nr - 1) * (nz - 1));
    }
  });
});

/** A_φ and B of a current in a circle of 50 mm about the origin: µ0 I/4π ∮ dl/R and ∮ dl × R/R³ by the trapezoidal rule. */
function circle(r: number, z: number, current: number): { a: number; br: number; bz: number } {
  const [radius, points] = [0.05, 720];
  let [a, br, bz] = [0, 0, 0];
  for (let k = 0; k < points; k++) {
    const c = Math.cos((2 * Math.PI * k) / points);
    const distance = Math.sqrt(radius ** 2 + r ** 2 + z ** 2 - 2 * radius * r * c);
    a += c / distance;
    br += (z * c) / distance ** 3;
    bz += (radius - r * c) / distance ** 3;
  }
  const scale = (MU0 * current * radius) / (2 * points);
  return { a: scale * a, br: scale * br, bz: scale * bz };
}
