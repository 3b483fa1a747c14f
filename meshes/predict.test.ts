import { describe, expect, it } from "vitest";
import { answerAt } from "./answer.ts";
import { build } from "./build.ts";
import { checkDesign } from "./check.ts";
import { scaleScene } from "./fixtures.ts";
import { leadPair } from "./leadpair.ts";
import { leastSpacing } from "./leads.ts";
import { Cancelled, type Progress, predict } from "./predict.ts";
import type { Scene } from "./scene.ts";

/** A short coil round a magnetic plug that sits off its middle, quick to solve. */
const draft = {
  name: "plug, trial",
  coil: {
    conductor: {
      section: "roundTube",
      outsideDiameterMm: 6,
      wallMm: 1,
      material: { resistivityOhmM: 1.75e-8 },
    },
    winding: { form: "helix", boreDiameterMm: 40, turns: 3, pitchMm: 9 },
  },
  parts: [
    {
      name: "plug",
      shape: "cylinder",
      diameterMm: 24,
      lengthMm: 30,
      centreZMm: 4,
      material: { resistivityOhmM: 2.5e-7, relativePermeability: 20 },
    },
  ],
  drive: { frequencyHz: 5000, currentA: 300 },
  strayPointsMm: [
    [0, 60],
    [200, 10],
  ],
};

const solved = predict(checkDesign(draft)).result;

function scene(changes: object = {}): Scene {
  return checkDesign({ ...draft, ...changes }).scene;
}

const near = (a: number, b: number, relative: number): void => {
  expect(Math.abs(a - b)).toBeLessThanOrEqual(relative * Math.abs(b));
};

describe("predict", () => {
  it("closes the power balance and meets the asked accuracy", () => {
    expect(solved.numerics.powerBalance).toBeLessThan(1e-9);
    expect(solved.numerics.accuracyMet).toBe(true);
    const { totalW, coilW, heatedW, otherW } = solved.power;
    near(coilW.value + heatedW.value + otherW.value, totalW.value, 1e-9);
    const shares = solved.parts[0]?.sliceShares ?? [];
    near(
      shares.reduce((a, b) => a + b, 0),
      1,
      1e-9,
    );
  });

  it("gives the same digits on every run", () => {
    const again = predict(checkDesign(draft)).result;
    const { numerics: _a, ...first } = solved;
    const { numerics: _b, ...second } = again;
    expect(second).toEqual(first);
  });

  it("turned upside down: the same figures, turns and slices in the other order, to rounding", () => {
    const parts = draft.parts.map((p) => ({ ...p, centreZMm: -p.centreZMm }));
    const strayPointsMm = draft.strayPointsMm.map(([r, z]) => [r, -(z ?? 0)]);
    const turned = predict(checkDesign({ ...draft, parts, strayPointsMm })).result;
    near(turned.loaded?.resistanceOhm.value ?? 0, solved.loaded?.resistanceOhm.value ?? 0, 1e-9);
    near(turned.loaded?.inductanceH.value ?? 0, solved.loaded?.inductanceH.value ?? 0, 1e-9);
    solved.turns.forEach((t, k) => {
      near(turned.turns[solved.turns.length - 1 - k]?.powerW ?? 0, t.powerW, 1e-8);
    });
    solved.parts[0]?.sliceShares.forEach((s, k) => {
      near(turned.parts[0]?.sliceShares[7 - k] ?? 0, s, 1e-6);
    });
    solved.strayField.forEach((s, k) => {
      near(turned.strayField[k]?.fluxDensityT.value ?? 0, s.fluxDensityT.value, 1e-7);
    });
  });

  it("a symmetric design has symmetric turns, to rounding", () => {
    const parts = draft.parts.map((p) => ({ ...p, centreZMm: 0 }));
    const { turns } = predict(checkDesign({ ...draft, parts })).result;
    near(turns[0]?.powerW ?? 0, turns[2]?.powerW ?? 1, 1e-9);
  });

  it("drives by power and by voltage what the same drive by current gives", () => {
    const watt = solved.power.heatedW.value;
    const volt = solved.power.coilVoltageV.value;
    for (const drive of [
      { frequencyHz: 5000, partPowerW: watt },
      { frequencyHz: 5000, coilVoltageV: volt },
    ]) {
      const other = predict(checkDesign({ ...draft, drive })).result.power;
      near(other.currentA.value, 300, 1e-12);
      near(other.totalW.value, solved.power.totalW.value, 1e-12);
      near(other.coilVoltageV.value, volt, 1e-12);
    }
  });

  it("without a part: loaded is null and the powers are the empty coil's", () => {
    const empty = predict(checkDesign({ ...draft, parts: [] })).result;
    expect(empty.loaded).toBeNull();
    near(empty.power.totalW.value, 300 ** 2 * empty.empty.resistanceOhm.value, 1e-12);
    expect(empty.power.efficiency).toEqual({ value: 0, plusMinus: 0 });
  });

  it("carries fields when asked to, whose power is the result's without the leads'", () => {
    expect(predict(checkDesign({ ...draft, parts: [] })).fields).toBeUndefined();
    const { result, fields } = predict(checkDesign(draft), { fields: true });
    if (fields?.loaded === undefined || fields.loaded === null) throw new Error("no fields");
    const { nr, nz, r, z } = fields.grid;
    const watts = fields.loaded.powerDensity.reduce((sum, p, c) => {
      const [i, k] = [Math.floor(c / (nz - 1)), c % (nz - 1)];
      const [r0, r1] = [r[i * nz] ?? 0, r[(i + 1) * nz] ?? 0];
      return sum + p * Math.PI * (r1 ** 2 - r0 ** 2) * ((z[k + 1] ?? 0) - (z[k] ?? 0));
    }, 0);
    expect(nr * nz).toBe(r.length);
    near(watts, result.power.totalW.value, 1e-9);
  });

  it("tells the digits of each grid while the next is solved, the last one's with what they are good to", () => {
    const told: Progress[] = [];
    predict(checkDesign({ ...draft, coil: { ...draft.coil, leads: { lengthMm: 200, spacingMm: 12 } } }), {
      progress: (p) => told.push(p),
    });
    expect(
      told.filter((p) => p.stage.startsWith("first grid")).every((p) => p.firstDigits === undefined),
    ).toBe(true);
    const early = told.find((p) => p.stage.startsWith("second grid"))?.firstDigits;
    expect(early?.withinPercent).toBeNull();
    const { firstDigits: last } = told.at(-1) ?? {};
    expect(last?.withinPercent).toBeLessThan(0.2);
    if (early === undefined || last === undefined) throw new Error("no digits");
    near(early.emptyOhm, last.emptyOhm, 0.02);
    near(early.loadedH ?? 0, last.loadedH ?? 1, 0.01);
    near(early.loadedOhm ?? 0, last.loadedOhm ?? 1, 0.02);
  });

  it("tells at last the digits of the result, leads included, and null without a part", () => {
    let last: Progress | undefined;
    const hooks = {
      progress: (p: Progress) => {
        last = p;
      },
    };
    const check = (design: object): void => {
      const { empty, loaded } = predict(checkDesign(design), hooks).result;
      const digits = last?.firstDigits;
      near(digits?.emptyOhm ?? 0, empty.resistanceOhm.value, 1e-12);
      near(digits?.emptyH ?? 0, empty.inductanceH.value, 1e-12);
      if (loaded === null) expect([digits?.loadedOhm, digits?.loadedH]).toEqual([null, null]);
      else near(digits?.loadedOhm ?? 0, loaded.resistanceOhm.value, 1e-12);
    };
    check({ ...draft, coil: { ...draft.coil, leads: { lengthMm: 200, spacingMm: 12 } } });
    check({ ...draft, parts: [] });
  });

  it("stops when asked to", () => {
    const signal = { aborted: false };
    const progress = (): void => {
      signal.aborted = true;
    };
    expect(() => predict(checkDesign(draft), { progress, signal })).toThrow(Cancelled);
  });
});

describe("invariants of one grid's answer", () => {
  it("scaled in length with σω fixed by the square: X/ω scales, powers follow, to rounding", () => {
    const factor = 2.5;
    const plain = scene();
    const large = scaleScene(plain, factor);
    const [a, b] = [plain, large].map((s) => answerAt(s, build(s), 1, () => {}));
    const omega = (s: Scene): number => 2 * Math.PI * s.frequency;
    const inductance = (k: number): number =>
      k *
      ((b?.values.get("loaded.X") ?? 0) / omega(large) / ((a?.values.get("loaded.X") ?? 1) / omega(plain)));
    near(inductance(1), factor, 1e-9);
    // R ∝ ρ·length/area: one over the length scale.
    near((b?.values.get("loaded.R") ?? 0) * factor, a?.values.get("loaded.R") ?? 0, 1e-9);
  });

  it("σ and ω exchanged at a fixed product: the same X/ω and R/ω, to rounding", () => {
    const plain = scene();
    const k = 3;
    const swapped: Scene = {
      ...plain,
      frequency: plain.frequency * k,
      conductor: { ...plain.conductor, resistivity: (plain.conductor.resistivity ?? 0) * k },
      bodies: plain.bodies.map((b) => ({
        ...b,
        material: { ...b.material, resistivity: (b.material.resistivity ?? 0) * k },
      })),
    };
    const [a, b] = [plain, swapped].map((s) => answerAt(s, build(s), 1, () => {}));
    for (const name of ["empty.R", "empty.X", "loaded.R", "loaded.X"]) {
      near(b?.values.get(name) ?? 0, k * (a?.values.get(name) ?? 0), 1e-9);
    }
  });
});

describe("leads", () => {
  const leadScene = (frequency: number, spacing: number, diameter: number): Scene => ({
    ...scene(),
    section: { kind: "round", radius: diameter / 2, wall: 0 },
    frequency,
    leads: { length: 1, spacing },
  });

  it("far apart at low frequency: DC resistance and (μ0/π)(ln(s/a) + 1/4) per length", () => {
    // Straight parallel wires with uniform current, e.g. Rosa, Bull. Bureau of Standards 4 (1908) 301 (from memory).
    const pair = leadPair(leadScene(1, 0.05, 0.004));
    near(pair.resistance, (2 * 1.75e-8) / (Math.PI * 0.002 ** 2), 1e-3);
    near(pair.inductance, 4e-7 * (Math.log(0.05 / 0.002) + 0.25), 1e-3);
  });

  it("thin wire very far apart: the same closed form holds where no grid spans wire and spacing", () => {
    const pair = leadPair(leadScene(1, 20, 1e-5));
    near(pair.resistance, (2 * 1.75e-8) / (Math.PI * 5e-6 ** 2), 1e-3);
    near(pair.inductance, 4e-7 * (Math.log(20 / 5e-6) + 0.25), 1e-3);
  });

  it("as near as the design may put them: a grid is found, and the gap's crowding shows", () => {
    const least = 1.0005 * leastSpacing({ along: 0.008, across: 0.008 });
    const wide = leadPair(leadScene(1e4, 0.1, 0.008));
    for (const wall of [0, 0.001]) {
      const pair = leadPair({
        ...leadScene(1e4, least, 0.008),
        section: { kind: "round", radius: 0.004, wall },
      });
      expect(pair.resistance).toBeGreaterThan(1.5 * wide.resistance);
      expect(pair.inductance).toBeLessThan(0.2 * wide.inductance);
    }
  });

  it("close together in the skin limit: (μ0/π) acosh(s/2a) outside, crowded towards each other", () => {
    // Two perfect conductors: L' = (μ0/π) acosh(s/2a); surface resistance with the proximity factor 1/√(1 − (2a/s)²). Both closed
    // forms follow from the bicylindrical map; the first correction to L is R/ω, the field's depth inside.
    const [s, a, f] = [0.012, 0.004, 1e7];
    const pair = leadPair(leadScene(f, s, 2 * a));
    const depth = Math.sqrt(1.75e-8 / (Math.PI * f * 4e-7 * Math.PI));
    const surface = 1.75e-8 / depth;
    const resistance = (2 * surface) / (2 * Math.PI * a) / Math.sqrt(1 - ((2 * a) / s) ** 2);
    near(pair.resistance, resistance, 1e-2);
    near(pair.inductance, 4e-7 * Math.acosh(s / (2 * a)) + resistance / (2 * Math.PI * f), 2e-3);
  });
});
