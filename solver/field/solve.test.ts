import { describe, expect, it } from "vitest";
import { COIL_TURNS, circuit, coilMaterials, coilMesh, prepared } from "./fixtures.ts";
import { lossesOf, powerBalance } from "./losses.ts";
import { solveState } from "./solve.ts";

const OMEGA = 2 * Math.PI * 10000;

describe("a coil and its part", () => {
  const p = prepared(coilMesh(), 2, COIL_TURNS);
  it("balances active and reactive power", () => {
    const s = solveState(p, { materials: coilMaterials(), omega: OMEGA }, circuit([1, 1, 1]));
    const losses = lossesOf(s);

    const balance = powerBalance(s, losses);

    expect(balance.active).toBeLessThan(1e-12);
    expect(balance.reactive).toBeLessThan(1e-12);
  });
});
