import { describe, expect, it } from "vitest";
import type { PartFigures } from "./answer.ts";
import { type CautionInput, cautions } from "./cautions.ts";
import { checkDesign } from "./check.ts";
import { randomScene } from "./fixtures.ts";
import type { Scene, SceneMaterial } from "./scene.ts";

const scene: Scene = { ...randomScene(1), frequency: 1e4, bodies: [] };
const steel: SceneMaterial = {
  resistivity: 2e-7,
  relativePermeability: 100,
  lossTangent: 0,
  saturation: null,
};

/** A part with the given mean field (A/m) and peak density (W/m³) at 1 A. */
function part(surfaceH: number, peak: number, material: Partial<SceneMaterial> = {}): PartFigures {
  return {
    body: {
      name: "pin",
      role: "part",
      index: 0,
      heated: true,
      pieces: [],
      material: { ...steel, ...material },
      cylinder: true,
    },
    region: 1,
    power: 1,
    surfaceH,
    surfaceArea: 1,
    touches: [],
    peak,
    hotSpot: null,
    slices: [],
    surfaceShares: [],
    besidePeak: [],
  };
}

const of = (changes: Partial<CautionInput>): string[] =>
  cautions({ scene, current: 1, voltage: 10, parts: [], accuracyMet: true, worstExcess: 0.5, ...changes });
const saturated = (p: PartFigures, current = 1): boolean =>
  of({ parts: [p], current }).some((c) => c.startsWith("pin: "));

/** Field whose peak µ0 µr √2 H is 2 T at µr = 100. */
const H2 = 2 / (Math.SQRT2 * 4e-7 * Math.PI * 100);

describe("cautions", () => {
  it("always tells what closed rings leave out, and nothing more of a calm coil", () => {
    expect(of({})).toHaveLength(1);
    expect(of({})[0]).toContain("closed ring");
  });

  it("of touch voltage from 50 V rms", () => {
    expect(of({ voltage: 50 })).toHaveLength(1);
    expect(of({ voltage: 50.1 })[1]).toContain("50.1 V rms");
  });

  it("of an accuracy not reached, with the widest bar", () => {
    const said = of({ accuracyMet: false, worstExcess: 3, scene: { ...scene, accuracy: 0.002 } });
    expect(said[0]).toContain("0.2 %");
    expect(said[0]).toContain("0.6 %");
  });
});

describe("saturation", () => {
  it("is told of a linear part from 2 T of peak µ0 µr H, at the current that flows", () => {
    expect(saturated(part(0.999 * H2, 0))).toBe(false);
    expect(saturated(part(1.001 * H2, 0))).toBe(true);
    expect(saturated(part(0.1 * H2, 0), 9.9)).toBe(false);
    expect(saturated(part(0.1 * H2, 0), 10.1)).toBe(true);
  });

  it("by the hottest place where that says more: J²ρ = 2ρ H²/δ² under a plane surface", () => {
    // Uniform half space: H e^(−x/δ), |J| = √2 H/δ; e.g. Smythe, Static and Dynamic Electricity, 10.02 (from memory).
    const skin = Math.sqrt(2e-7 / (Math.PI * 1e4 * 4e-7 * Math.PI * 100));
    const density = (H: number): number => 2e-7 * ((Math.SQRT2 * H) / skin) ** 2;
    expect(saturated(part(0.1 * H2, density(0.999 * H2)))).toBe(false);
    expect(saturated(part(0.1 * H2, density(1.001 * H2)))).toBe(true);
  });

  it("is never told of what is not magnetic, nor of what does not conduct by its heat", () => {
    expect(saturated(part(100 * H2, 1e12, { relativePermeability: 1 }))).toBe(false);
    expect(saturated(part(0.5 * H2, 0, { resistivity: null }))).toBe(false);
  });

  it("given but not followed is told from a tenth of Bs", () => {
    const at = (share: number): boolean => saturated(part((share * H2 * 1.6) / 2, 0, { saturation: 1.6 }));
    expect(at(0.09)).toBe(false);
    expect(at(0.11)).toBe(true);
  });

  it("of a guide with a saturation is told by its name", () => {
    const guided = checkDesign({
      coil: {
        conductor: { section: "roundBar", outsideDiameterMm: 6, material: "copper" },
        winding: { form: "helix", boreDiameterMm: 40, turns: 3, pitchMm: 9 },
      },
      guides: [
        {
          name: "yoke",
          shape: "cylinder",
          diameterMm: 80,
          boreDiameterMm: 70,
          lengthMm: 30,
          material: { relativePermeability: 40, saturationT: 1.2 },
        },
      ],
      drive: { frequencyHz: 1e4, currentA: 1 },
    }).scene;
    expect(of({ scene: guided }).some((c) => c.startsWith("yoke: "))).toBe(true);
  });
});
