/** N rings of round wire at the skin limit: inductance, loss, and how the loss is shared between the rings. */
import { MU0 } from "../../solver/index.ts";
import { skinDepth } from "../analytic/skin.ts";
import { type Check, type Constants, type Figure, type Row, relativeRow } from "../check.ts";
import { resultOf, ringsDesign } from "../document.ts";
import { limitOfHalves } from "../setups.ts";
import { checkValue } from "../tables/read.ts";

const RESISTIVITY = 1.7e-8;
const RADIUS_MM = 50;
/** Wire diameters in skin depths, each twice the last. */
const DEPTHS = [40, 80, 160] as const;

export const ringStackLimit: Check = {
  id: "ring-stack-limit",
  title: "N rings at the skin limit",
  method:
    "Design documents of N rings at frequencies where the wire is 40, 80 and 160 skin depths thick, taken to δ = 0 by the quadratic through the three. φ is the loss over that of a straight wire of the same length.",
  why: "The extrapolation amplifies the documents' accuracy of 0.1 % about four times; between rings the loss of one is known less well than the sum.",
  spoiled: { conductivity: 1, permeability: 1, length: 1.01 },
  pieces: ["prox-rings-N7-a", "prox-rings-N7-b", "prox-rings-N12"].map(
    (id) => (constants) => rows(id, constants),
  ),
};

function rows(id: string, constants: Constants): Row[] {
  const c = checkValue("proximity", id);
  const [n, lOverD, dOverS] = [c.input("N"), c.input("l/D"), c.input("d/s")];
  const pitch = (2 * RADIUS_MM * lOverD) / n;
  const wire = dOverS * pitch;
  const limit = limitOfHalves(DEPTHS.map((d) => atDepth(n, pitch, wire, wire / d, constants)));
  const keys = ["L_over_mu0_a", "phi_mean", "phi_end_ring", "phi_middle_ring"];
  const tolerance = [1e-3, 4e-3, 6e-3, 6e-3];
  return keys.map((key, i) => {
    const name = `${key}, N = ${n}, l/D = ${lOverD}, d/s = ${dOverS}`;
    return relativeRow(name, c.source, c.expected(key), limit[i]!, tolerance[i]!);
  });
}

/** L/(μ0 a), φ of all rings, of the end ring and of a middle one; lengths in mm. */
function atDepth(n: number, pitch: number, wire: number, depth: number, constants: Constants): Figure[] {
  const frequencyHz = RESISTIVITY / (Math.PI * MU0 * (depth * 1e-3) ** 2);
  const centresMm = Array.from({ length: n }, (_, k) => [RADIUS_MM, (k - (n - 1) / 2) * pitch] as const);
  const result = resultOf(
    ringsDesign({ centresMm, diameterMm: wire, resistivityOhmM: RESISTIVITY, frequencyHz }, constants),
  );
  const { inductanceH, resistanceOhm } = result.empty;
  const straight = ((2 * RADIUS_MM) / wire) * (RESISTIVITY / skinDepth(RESISTIVITY, frequencyHz, 1));
  const perMu0a = 1 / (MU0 * RADIUS_MM * 1e-3);
  // At 1 A a turn's power is its resistance.
  const ring = (k: number): Figure => ({
    value: (result.turns[k]?.powerW ?? Number.NaN) / straight,
    bar: null,
  });
  return [
    { value: inductanceH.value * perMu0a, bar: inductanceH.plusMinus * perMu0a },
    { value: resistanceOhm.value / straight / n, bar: resistanceOhm.plusMinus / straight / n },
    ring(0),
    ring(Math.floor(n / 2)),
  ];
}
