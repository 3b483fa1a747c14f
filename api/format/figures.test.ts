import fc from "fast-check";
import { describe, expect, it } from "vitest";
import {
  decimalsFor,
  evenly,
  figure,
  homelyUnit,
  percent,
  plain,
  plainFigure,
  prefixed,
  show,
} from "./figures.ts";

const q = (value: number, plusMinus: number) => ({ value, plusMinus });

describe("figures for people", () => {
  it("end where the bar begins", () => {
    expect(figure(q(0.02691995, 3.4e-5), "Ω")).toBe("26.92 ± 0.04 mΩ");
    expect(figure(q(1.461392963e-6, 1.9e-10), "H")).toBe("1.46139 ± 0.00019 µH");
    expect(figure(q(4307.2, 120), "W")).toBe("4.31 ± 0.12 kW");
    expect(figure(q(431, 35), "W")).toBe("430 ± 40 W");
    expect(figure(q(0.2, 0.5), "T")).toBe("200 ± 500 mT");
  });

  it("show no bar where there is none, and no unit from nothing", () => {
    expect(figure(q(400, 0), "A")).toBe("400 A");
    expect(figure(q(0, 0), "W")).toBe("0 W");
    expect(prefixed("W", [])).toEqual({ factor: 1, symbol: "W" });
  });

  it("choose one prefix for a row by its largest", () => {
    expect(prefixed("Ω", [0.0025, 0.027]).symbol).toBe("mΩ");
    expect(prefixed("W", [999.7]).symbol).toBe("kW");
    expect(prefixed("F", [1.7e-4]).symbol).toBe("µF");
  });

  it("write plain numbers without exponents or empty decimals", () => {
    expect(plain(10.5)).toBe("10.5");
    expect(plain(24276)).toBe("24280");
    expect(plain(-31.5, 5)).toBe("-31.5");
    expect(plain(100, 2)).toBe("100");
    expect(plainFigure(10000, "Hz")).toBe("10 kHz");
    expect(evenly([73.084, 56.503, 5.1])).toEqual(["73.08", "56.50", "5.10"]);
  });

  it("keep a unit people know while it reads at sight, and prefix it beyond", () => {
    const perArea = { factor: 1e4, symbol: "W/cm²" };
    expect(homelyUnit(perArea, [48e4])).toBe(perArea);
    expect(homelyUnit(perArea, [0])).toBe(perArea);
    expect(figure(q(1.1155, 6e-4), homelyUnit(perArea, [1.1155]))).toBe("111.55 ± 0.06 µW/cm²");
    expect(figure(q(5.0408e14, 2e11), homelyUnit(perArea, [5.0408e14]))).toBe("50.408 ± 0.020 GW/cm²");
  });

  it("give places of tiny and of huge things the same digits", () => {
    expect(
      [
        [14, -0.69],
        [0.0227, 0],
        [2271.9, 3],
      ].map((at) => decimalsFor(at, 4)),
    ).toEqual([2, 5, 0]);
  });

  it("write shares", () => {
    expect([0, 2e-4, 0.0961, 0.6292, 1].map(percent)).toEqual([
      "0 %",
      "under 0.1 %",
      "9.6 %",
      "62.9 %",
      "100 %",
    ]);
  });

  it("never promise more than the bar: shown bar ≥ bar, shown value within the last digit (seed 20117)", () => {
    const value = fc.double({ min: 1e-3, max: 1e6, noNaN: true });
    const relative = fc.double({ min: 1e-4, max: 2, noNaN: true });
    fc.assert(
      fc.property(value, relative, (v, part) => {
        const shown = show(q(v, v * part), { factor: 1, symbol: "" });
        expect(Number(shown.bar)).toBeGreaterThanOrEqual(v * part * (1 - 1e-8));
        expect(Number(shown.bar)).toBeLessThanOrEqual(v * part * 1.35 + 1e-12);
        expect(Math.abs(Number(shown.value) - v)).toBeLessThanOrEqual(0.51 * Number(shown.bar));
      }),
      { seed: 20117 },
    );
  });
});
