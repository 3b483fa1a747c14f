import { beforeAll, describe, expect, it } from "vitest";
import { type Answer, answerAt } from "./answer.ts";
import { build } from "./build.ts";
import { checkDesign } from "./check.ts";
import { leadPair } from "./leadpair.ts";
import { predict } from "./predict.ts";
import type { Result } from "./result.ts";

/** A steel tube that is heated, a copper shield that is not, a lossy yoke, leads. */
const draft = (currentA: number) =>
  checkDesign({
    coil: {
      conductor: { section: "roundTube", outsideDiameterMm: 6, wallMm: 1, material: "copper" },
      winding: { form: "helix", boreDiameterMm: 50, turns: 3, pitchMm: 9 },
      leads: { lengthMm: 120, spacingMm: 15 },
    },
    parts: [
      {
        name: "tube",
        shape: "cylinder",
        diameterMm: 36,
        boreDiameterMm: 20,
        lengthMm: 40,
        material: { resistivityOhmM: 2.5e-7, relativePermeability: 12 },
      },
      {
        name: "shield",
        shape: "cylinder",
        diameterMm: 30,
        lengthMm: 4,
        centreZMm: 30,
        material: { resistivityOhmM: 1.7e-8 },
        heated: false,
      },
    ],
    guides: [
      {
        name: "yoke",
        shape: "cylinder",
        diameterMm: 84,
        boreDiameterMm: 72,
        lengthMm: 20,
        material: { relativePermeability: 30, lossTangent: 0.02 },
      },
    ],
    drive: { frequencyHz: 8000, currentA },
    strayPointsMm: [
      [200, 20],
      [25.5, 0],
    ],
    accuracyPercent: 1,
  });

const checked = draft(300);
const { scene } = checked;
const built = build(scene);
const sum = (x: Iterable<number> = []): number => [...x].reduce((a, b) => a + b, 0);

let answer: Answer;
let once: Result;
let twice: Result;
beforeAll(() => {
  answer = answerAt(scene, built, 1, () => {});
  once = predict(checked).result;
  twice = predict(draft(600)).result;
}, 120_000);

describe("one grid's answer", () => {
  it("R and X are the sums of the parts that guard their bars, powers too", () => {
    for (const name of [
      "empty.R",
      "empty.X",
      "loaded.R",
      "loaded.X",
      "coil",
      "heated",
      "other",
      "part0.power",
    ]) {
      const value = answer.values.get(name) ?? 0;
      expect(value).not.toBe(0);
      expect(sum(answer.parts.get(name)) / value).toBeCloseTo(1, 9);
    }
  });

  it("a heated part's energy, which errs as its power does, guards the bar of both", () => {
    const [region] = answer.figures.map((p) => p.region);
    const energy = answer.loaded?.losses.regionEnergy[region ?? 0];
    for (const name of ["part0.power", "heated"]) expect(answer.kin?.get(name)?.[0]?.value).toBe(energy);
    expect(energy).toBeGreaterThan(0);
  });

  it("X, which errs as the field does that crowds the current, guards R's bars and the coil's", () => {
    expect(answer.kin?.get("empty.R")?.[0]?.value).toBe(answer.values.get("empty.X"));
    for (const name of ["loaded.R", "coil"]) {
      const [kin] = answer.kin?.get(name) ?? [];
      expect(kin?.value).toBe(answer.values.get("loaded.X"));
      // A small part: R's own movement is what counts as a rule.
      expect(kin?.weight).toBeGreaterThan(0);
      expect(kin?.weight).toBeLessThan(0.5 * (answer.values.get(name) ?? 0));
    }
  });

  it("coil, heated and other losses are all of R", () => {
    const total = ["coil", "heated", "other"].reduce((t, name) => t + (answer.values.get(name) ?? 0), 0);
    expect(total / (answer.values.get("loaded.R") ?? 0)).toBeCloseTo(1, 9);
    expect((answer.values.get("heated") ?? 0) / (answer.figures[0]?.power ?? 1)).toBeCloseTo(1, 9);
  });

  it("a sharp magnetic edge slows every global figure to 4/3, places to less; without one it is 2", () => {
    const order = (name: string): number => answer.falls.get(name)?.order ?? Number.NaN;
    for (const name of ["loaded.R", "empty.R", "coil", "heated", "loaded.X", "part0.power"])
      expect(order(name)).toBeCloseTo(4 / 3, 12);
    expect(order("part0.peak")).toBeLessThan(1);
    expect(order("part0.surfaceH")).toBeCloseTo(1 / 3, 12);
    // Far away by a sum over all sources; within copper from the cell there.
    expect(order("stray0")).toBeCloseTo(4 / 3, 12);
    expect(order("stray1")).toBeLessThan(1);
    const { scene: round } = checkDesign({
      coil: checked.design.coil,
      parts: [
        { shape: "sphere", diameterMm: 30, material: { resistivityOhmM: 2.5e-7, relativePermeability: 12 } },
      ],
      drive: { frequencyHz: 8000, currentA: 1 },
    });
    const smooth = answerAt(round, build(round), 1, () => {});
    expect(smooth.falls.get("loaded.R")?.order).toBe(2);
    expect(smooth.falls.get("part0.surfaceH")?.order).toBe(1);
  });

  it("the empty coil keeps its guide: its lag heats there, and the inductance is the higher for it", () => {
    const bare = { ...scene, bodies: scene.bodies.filter((b) => b.role === "part") };
    const without = answerAt(bare, build(bare), 1, () => {});
    const region = built.regionOfBody(2);
    expect(answer.empty.losses.regionPower[region]).toBeGreaterThan(0);
    expect(answer.empty.losses.regionPower[built.regionOfBody(0)]).toBe(0);
    expect(answer.values.get("empty.X")).toBeGreaterThan(1.01 * (without.values.get("empty.X") ?? 0));
  });

  it("the guide's heat is 2ω tan δ times the energy of its field", () => {
    // ∫ ω Im(ν)|B|²/µ0 against ∫ Re(ν)|B|²/(2µ0): the ratio is 2ω Im ν/Re ν = 2ω tan δ.
    const region = built.regionOfBody(2);
    const { regionPower, regionEnergy } = answer.empty.losses;
    const omega = 2 * Math.PI * scene.frequency;
    expect((regionPower[region] ?? 0) / (2 * omega * (regionEnergy[region] ?? 1))).toBeCloseTo(0.02, 12);
  });
});

describe("a lagging guide", () => {
  it("has ν = 1/(µr (1 − j tan δ))", () => {
    const { re = 0, im = 0 } = built.materials("empty")[built.regionOfBody(2)]?.reluctivity ?? {};
    const [mu, lag] = [30, 30 * 0.02];
    expect(re * mu + im * lag).toBeCloseTo(1, 12);
    expect(im * mu - re * lag).toBeCloseTo(0, 12);
  });
});

describe("the result document's figures", () => {
  const part = (r: Result, i: number) => r.parts[i] as Result["parts"][number];

  it("twice the current: fields twice, powers four times, R and L the same", () => {
    const pairs = [
      [once.turns[1]?.powerW, twice.turns[1]?.powerW, 4],
      [part(once, 0).powerW.value, part(twice, 0).powerW.value, 4],
      [part(once, 0).surfaceWPerM2.value, part(twice, 0).surfaceWPerM2.value, 4],
      [part(once, 0).surfaceHAPerM.value, part(twice, 0).surfaceHAPerM.value, 2],
      [part(once, 0).peakWPerM3.value, part(twice, 0).peakWPerM3.value, 4],
      [once.strayField[0]?.fluxDensityT.value, twice.strayField[0]?.fluxDensityT.value, 2],
      [once.loaded?.resistanceOhm.value, twice.loaded?.resistanceOhm.value, 1],
      [once.loaded?.inductanceH.value, twice.loaded?.inductanceH.value, 1],
    ] as const;
    for (const [a, b, factor] of pairs) expect((b ?? 0) / (a ?? 1)).toBeCloseTo(factor, 9);
  });

  it("the asked accuracy holds for R, L and the power of each part that takes 1 %", () => {
    expect(once.numerics.accuracyMet).toBe(true);
    const states = [once.empty, once.loaded].flatMap((t) =>
      t === null ? [] : [t.resistanceOhm, t.inductanceH],
    );
    const powers = once.parts.map((p) => p.powerW).filter((p) => p.value > 0.01 * once.power.totalW.value);
    expect(powers.length).toBeGreaterThan(0);
    for (const u of [...states, ...powers]) expect(u.plusMinus).toBeLessThanOrEqual(0.01 * u.value);
  });

  it("leads are in R, L and the coil's power, turns are the rest of it", () => {
    const pair = leadPair(scene);
    const square = 300 ** 2;
    const turns = sum(once.turns.map((t) => t.powerW));
    expect(once.power.coilW.value / (turns + square * pair.resistance)).toBeCloseTo(1, 9);
    const led = once.loaded?.resistanceOhm.value ?? 0;
    expect((square * led) / once.power.totalW.value).toBeCloseTo(1, 9);
    const guides = scene.bodies.filter((b) => b.role === "guide");
    const short = predict({ ...checked, scene: { ...scene, bodies: guides, leads: null } });
    const more = (once.empty.inductanceH.value ?? 0) - short.result.empty.inductanceH.value;
    expect(more / pair.inductance).toBeCloseTo(1, 2);
  });

  it("a part's power over its surface: side, bore and both ends", () => {
    const area = 2 * Math.PI * (0.018 * 0.04 + 0.01 * 0.04 + 0.018 ** 2 - 0.01 ** 2);
    expect((part(once, 0).surfaceWPerM2.value * area) / part(once, 0).powerW.value).toBeCloseTo(1, 6);
  });

  it("depth shares: at half, one and two skin depths; the side's grow as 1 − e^(−2x), the bore hardly heats", () => {
    const { skinDepthMm, depthShares, sideDepthShares, boreDepthShares } = part(once, 0);
    expect(skinDepthMm).toBeCloseTo(Math.sqrt(2.5e-7 / (Math.PI * 8000 * 4e-7 * Math.PI * 12)) * 1000, 9);
    const side = sideDepthShares?.map((s) => s.share) ?? [];
    expect(sideDepthShares?.map((s) => s.depthMm / (skinDepthMm ?? 1))).toEqual(
      [0.5, 1, 2].map((k) => expect.closeTo(k, 9)),
    );
    // Plane wave (δ is a twentieth of the radius): ratios of 1 − e^(−1), 1 − e^(−2), 1 − e^(−4); ends and curvature change some per cent.
    expect((side[0] ?? 0) / (side[2] ?? 1)).toBeCloseTo((1 - Math.exp(-1)) / (1 - Math.exp(-4)), 1);
    expect((side[1] ?? 0) / (side[2] ?? 1)).toBeCloseTo((1 - Math.exp(-2)) / (1 - Math.exp(-4)), 1);
    depthShares?.forEach((s, k) => {
      expect(s.share).toBeGreaterThanOrEqual((side[k] ?? 0) + (boreDepthShares?.[k]?.share ?? 0) - 0.02);
      expect(boreDepthShares?.[k]?.share).toBeLessThan(0.5 * (side[k] ?? 0));
    });
  });

  it("the peak density is above the mean and at the surface that faces the coil", () => {
    const { peakWPerM3, powerW, hotSpotMm } = part(once, 0);
    const volume = Math.PI * (0.018 ** 2 - 0.01 ** 2) * 0.04;
    expect(peakWPerM3.value).toBeGreaterThan((3 * powerW.value) / volume);
    expect(hotSpotMm?.[0]).toBeGreaterThan(17);
  });

  it("a part that is not heated and the guide count as other", () => {
    const shield = part(once, 1).powerW.value;
    expect(once.power.heatedW.value / part(once, 0).powerW.value).toBeCloseTo(1, 9);
    expect(once.power.otherW.value).toBeGreaterThan(shield);
    const region = built.regionOfBody(2);
    const guide = (answer.loaded?.losses.regionPower[region] ?? 0) * 300 ** 2;
    expect((once.power.otherW.value - shield) / guide).toBeCloseTo(1, 1);
  });
});

describe("progress", () => {
  it("never falls, from 0 to 1, however many grids", () => {
    const seen: number[] = [];
    predict(
      { ...checked, scene: { ...scene, bodies: [], leads: null, strayPoints: [], accuracy: 2e-5 } },
      { progress: (p) => seen.push(p.fraction) },
    );
    seen.forEach((f, k) => {
      expect(f).toBeGreaterThanOrEqual(seen[k - 1] ?? 0);
    });
    expect([seen[0], seen.at(-1)]).toEqual([0, 1]);
  });
});
