import { describe, expect, it } from "vitest";
import { currentOf, type PerAmpere, powerAt, terminal } from "./drive.ts";
import type { Drive } from "./scene.ts";
import { sure } from "./uncertain.ts";

/** A series circuit of 0.03 Ω (coil 0.01, heated 0.016, other 0.004) and 0.04 Ω reactance: |Z| = 0.05 Ω, a 3-4-5 triangle. */
const coil: PerAmpere = {
  resistance: { value: 0.03, plusMinus: 9.4e-5 },
  reactance: { value: 0.04, plusMinus: 8e-5 },
  coil: { value: 0.01, plusMinus: 1e-5 },
  heated: { value: 0.016, plusMinus: 8e-5 },
  other: { value: 0.004, plusMinus: 4e-6 },
};
const omega = 2 * Math.PI * 10_000;
const drives: Drive[] = [
  { kind: "current", ampere: 500 },
  { kind: "voltage", volt: 25 },
  { kind: "power", watt: 4000 },
];

describe("the coil at work", () => {
  it.each(drives)("is the same whichever of current, voltage and power is given: $kind", (drive) => {
    const power = powerAt(drive, coil, omega);
    expect(power.currentA.value).toBeCloseTo(500, 9);
    expect(power.coilVoltageV.value).toBeCloseTo(25, 9);
    expect(power.totalW.value).toBeCloseTo(7500, 8);
    expect(power.coilW.value).toBeCloseTo(2500, 8);
    expect(power.heatedW.value).toBeCloseTo(4000, 8);
    expect(power.otherW.value).toBeCloseTo(1000, 8);
    expect(power.efficiency.value).toBeCloseTo(4000 / 7500, 12);
    expect(power.reactiveVar.value).toBeCloseTo(10_000, 8);
    // The tank resonates where 1/(ωC) = X.
    expect(1 / (omega * power.resonantCapacitanceF.value)).toBeCloseTo(0.04, 12);
  });

  it.each(drives)("what the drive fixes is exact, the rest is not: $kind", (drive) => {
    const power = powerAt(drive, coil, omega);
    expect(power.currentA.plusMinus === 0).toBe(drive.kind === "current");
    expect(power.coilVoltageV.plusMinus === 0).toBe(drive.kind === "voltage");
    expect(power.heatedW.plusMinus === 0).toBe(drive.kind === "power");
    expect(power.totalW.plusMinus).toBeGreaterThan(0);
  });

  it.each(drives)("bars hold the powers of every circuit within the bars: $kind", (drive) => {
    const power = powerAt(drive, coil, omega);
    for (const [c, h, o, x] of corners()) {
      const [coilR, heated, other] = [0.01 + c * 1e-5, 0.016 + h * 8e-5, 0.004 + o * 4e-6];
      const [r, reactance] = [coilR + heated + other, 0.04 + x * 8e-5];
      const current =
        drive.kind === "current"
          ? drive.ampere
          : drive.kind === "voltage"
            ? drive.volt / Math.hypot(r, reactance)
            : Math.sqrt(drive.watt / heated);
      const exact: [{ value: number; plusMinus: number }, number][] = [
        [power.currentA, current],
        [power.coilVoltageV, current * Math.hypot(r, reactance)],
        [power.totalW, current ** 2 * r],
        [power.coilW, current ** 2 * coilR],
        [power.heatedW, current ** 2 * heated],
        [power.otherW, current ** 2 * other],
        [power.efficiency, heated / r],
        [power.reactiveVar, current ** 2 * reactance],
        [power.resonantCapacitanceF, 1 / omega / reactance],
      ];
      for (const [u, value] of exact)
        expect(Math.abs(value - u.value)).toBeLessThanOrEqual(u.plusMinus * 1.01 + 1e-12 * u.value);
    }
  });

  it("the efficiency's bar is no wider than the worst of these circuits", () => {
    const { efficiency } = powerAt({ kind: "current", ampere: 1 }, coil, omega);
    const worst = Math.max(
      ...corners().map(([c, h, o]) => {
        const heated = 0.016 + h * 8e-5;
        return Math.abs(heated / (heated + 0.014 + c * 1e-5 + o * 4e-6) - efficiency.value);
      }),
    );
    expect(efficiency.plusMinus).toBeLessThan(1.01 * worst);
  });

  it("nothing heated: no efficiency, and no quarrel about its digits", () => {
    const idle = powerAt({ kind: "current", ampere: 1 }, { ...coil, heated: sure(0) }, omega);
    expect(idle.efficiency.value).toBe(0);
    const nothing = { ...coil, heated: sure(0), coil: sure(0), other: sure(0) };
    expect(powerAt({ kind: "current", ampere: 1 }, nothing, omega).efficiency).toEqual(sure(0));
  });

  it("a current is what it is, whatever the coil", () => {
    expect(currentOf({ kind: "current", ampere: 7 }, coil)).toEqual(sure(7));
  });
});

type Four = [number, number, number, number];

/** All ends of the four bars. */
function corners(): Four[] {
  const end = (k: number, bit: number): number => ((k & bit) === 0 ? -1 : 1);
  return Array.from({ length: 16 }, (_, k): Four => [end(k, 1), end(k, 2), end(k, 4), end(k, 8)]);
}

describe("terminals", () => {
  it("L = X/ω and Q = X/R", () => {
    const t = terminal(coil.resistance, coil.reactance, omega);
    expect(t.inductanceH.value * omega).toBeCloseTo(0.04, 12);
    expect(t.inductanceH.plusMinus * omega).toBeCloseTo(8e-5, 12);
    expect(t.q.value).toBeCloseTo(4 / 3, 12);
    expect(t.q.plusMinus / t.q.value).toBeCloseTo(9.4e-5 / 0.03 + 2e-3, 9);
  });
});
