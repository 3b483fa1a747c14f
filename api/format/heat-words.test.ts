import { describe, expect, it } from "vitest";
import type { Part } from "../../meshes/design.ts";
import type { PartResult } from "../../meshes/result.ts";
import { heatWords } from "./heat-words.ts";

const exact = (value: number) => ({ value, plusMinus: 0 });

const even = [0.12, 0.12, 0.13, 0.13, 0.13, 0.13, 0.12, 0.12];
const middle = [0.053, 0.113, 0.157, 0.177, 0.177, 0.157, 0.113, 0.053];

const depths = (...shares: number[]) =>
  shares.map((share, k) => ({ depthMm: [0.2634, 0.5268, 1.0536][k]!, share }));

const rod: PartResult = {
  name: "rod",
  powerW: exact(1000),
  skinDepthMm: 0.5268,
  surfaceWPerM2: exact(1e5),
  surfaceHAPerM: exact(2e4),
  peakWPerM3: exact(1e9),
  hotSpotMm: [15, 0],
  sliceShares: middle,
  depthShares: depths(0.629, 0.86, 0.978),
  sideDepthShares: depths(0.628, 0.859, 0.977),
  boreDepthShares: null,
};

const cylinder = (diameterMm: number, lengthMm: number): Part => ({
  name: "rod",
  shape: "cylinder",
  diameterMm,
  lengthMm,
  boreDiameterMm: 0,
  centreZMm: 0,
  material: { resistivityOhmM: 3e-7, relativePermeability: 1 },
  temperatureC: 20,
  heated: true,
});

const along = (...sliceShares: number[]): string => heatWords({ ...rod, sliceShares }).short.split(", ")[1]!;

describe("the words for a part's heat", () => {
  it("say how deep and where, for long and for flat parts", () => {
    expect(heatWords(rod, cylinder(30, 90)).short).toBe(
      "63 % within 0.26 mm of the side, hottest at mid-length",
    );
    expect(heatWords(rod, cylinder(90, 30)).short).toMatch(/hottest at mid-height$/);
    expect(heatWords({ ...rod, sideDepthShares: null }).short).toMatch(
      /^63 % within 0.26 mm of the surface,/,
    );
  });

  it("name the surface most of it lies at: side, bore or a face", () => {
    const near = (side: number, bore: number | null): string =>
      heatWords({
        ...rod,
        depthShares: depths(0.6, 0.8, 0.95),
        sideDepthShares: depths(side, side, side),
        boreDepthShares: bore === null ? null : depths(bore, bore, bore),
      }).short;
    expect(near(0.05, 0.55)).toMatch(/^55 % within 0.26 mm of the bore,/);
    expect(near(0.55, 0.05)).toMatch(/^55 % within 0.26 mm of the outer side,/);
    expect(near(0.02, null)).toMatch(/^60 % within 0.26 mm of the surface,/);
    expect(near(0.3, 0.3)).toMatch(/^60 % within 0.26 mm of the surface,/);
  });

  it("do not round what is nearly all or nearly nothing", () => {
    const first = (share: number): string =>
      heatWords({ ...rod, sideDepthShares: null, depthShares: depths(share, 1, 1) }).short;
    expect(first(1)).toMatch(/^heated right through,/);
    expect(first(0.998)).toMatch(/^over 99 % within/);
    expect(first(0.004)).toMatch(/^under 1 % within/);
    expect(first(0)).toMatch(/^next to none at the surface,/);
  });

  it("find the hottest place along it", () => {
    expect(along(...even)).toBe("even along its height");
    expect(along(0.02, 0.03, 0.05, 0.1, 0.2, 0.3, 0.2, 0.1)).toBe("hottest about two thirds up");
    expect(along(0.1, 0.2, 0.3, 0.2, 0.1, 0.05, 0.03, 0.02)).toBe("hottest about a third up");
    expect(along(0.35, 0.15, 0, 0, 0, 0, 0.15, 0.35)).toBe("hottest towards both ends");
    expect(along(0.5, 0.3, 0.1, 0.05, 0.03, 0.01, 0.005, 0.005)).toBe("hottest at the bottom end");
    expect(along(0.005, 0.005, 0.01, 0.03, 0.05, 0.1, 0.3, 0.5)).toBe("hottest at the top end");
  });

  it("list the figures behind: every surface worth telling apart, and halves that differ", () => {
    expect(heatWords(rod).more).toEqual([
      "62.9 % within 0.263 mm, 86.0 % within 0.527 mm, 97.8 % within 1.05 mm of the surface",
    ]);
    const pipe = { ...rod, boreDepthShares: depths(0, 0, 0), depthShares: depths(1, 1, 1) };
    const sliceShares = [0.16, 0.15, 0.14, 0.12, 0.12, 0.12, 0.1, 0.09];
    expect(heatWords({ ...pipe, sliceShares }).more).toEqual([
      "all within 0.263 mm of the surface",
      "62.8 % within 0.263 mm, 85.9 % within 0.527 mm, 97.7 % within 1.05 mm of the outer side",
      "next to none at the bore",
      "57.0 % in the lower half",
    ]);
  });
});
