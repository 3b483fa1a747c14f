/** One ring of round wire: uniform current, and the limit of all current on its surface. */
import { type Circuit, solvePrescribed, solveState } from "../../solver/index.ts";
import { type Check, type Constants, type Figure, type Row, relativeRow } from "../check.ts";
import {
  air,
  conducting,
  disc,
  limitOfHalves,
  meshOf,
  metal,
  omegaFor,
  onTwoGrids,
  PASSIVE,
} from "../setups.ts";
import { checkValue } from "../tables/read.ts";

const COPPER = 5.8e7;
const ONE_TURN: Circuit = { turns: 1, path: Int32Array.of(0), sense: Int8Array.of(1) };
const OPEN = { kind: "open", radius: 1.5, mirror: false } as const;
/** Wire diameters in skin depths, each twice the last. */
const DEPTHS = [50, 100, 200] as const;

export const ringInductance: Check = {
  id: "ring-inductance",
  title: "Single ring of round wire",
  method:
    "Uniform density: prescribed current, flux linked by the section. Surface limit: solved at d/δ = 50, 100, 200 and taken to δ = 0 by the quadratic through the three; loss against a straight wire of the same circumference.",
  why: "Low frequency: the published series leaves out (r/a)⁴ terms (up to 5e-5 at r/a = 0.1), the rest is the grid. Limit: the two grids' error, amplified about three times by the extrapolation.",
  spoiled: { conductivity: 1, permeability: 1.01, length: 1 },
  pieces: ["ind-ring-r0.01", "ind-ring-r0.05", "ind-ring-r0.1"].map(
    (id) => (constants) => rows(id, constants),
  ),
};

function rows(id: string, constants: Constants): Row[] {
  const c = checkValue("inductance", id);
  const a = c.input("a") * constants.length;
  const r = c.input("r_wire") * constants.length;
  const name = `r/a = ${(c.input("r_wire") / c.input("a")).toPrecision(1)}`;
  const low = uniform(a, r, constants);
  const [l, phi] = limitOfHalves(DEPTHS.map((d) => atDepth(a, r, (2 * r) / d, constants)));
  return [
    relativeRow(`L, uniform current, ${name}`, c.source, c.expected("L_lf_uniform_current"), low, 1e-4),
    relativeRow(`L, surface current, ${name}`, c.source, c.expected("L_hf_perfect_conductor"), l!, 1e-4),
    relativeRow(
      `loss over straight wire's, surface current, ${name}`,
      c.source,
      c.expected("hf_loss_factor_vs_straight_wire"),
      phi!,
      1e-3,
    ),
  ];
}

function uniform(a: number, r: number, constants: Constants): Figure {
  const unit = a + r;
  const mesh = meshOf([disc(a / unit, 0, r / unit, 1)], [PASSIVE, PASSIVE], OPEN, unit);
  const materials = [air(constants), air(constants)];
  const [figure] = onTwoGrids(mesh, [-1, -1], [1, 2], (prepared) => {
    const [link] = solvePrescribed(prepared, { materials, omega: 1 }, [
      { region: 1, density: { re: 1, im: 0 } },
    ]).linkages;
    return [link!.linkage.re / link!.current.re];
  });
  return figure!;
}

/** Inductance and loss factor at one skin depth. */
function atDepth(a: number, r: number, depth: number, constants: Constants): Figure[] {
  const unit = a + r;
  const omega = omegaFor(depth, COPPER);
  const mesh = meshOf([disc(a / unit, 0, r / unit, 1)], [PASSIVE, conducting(depth, unit)], OPEN, unit);
  const materials = [air(constants), metal(constants, COPPER, 1, 0)];
  const straight = a / r / (COPPER * depth);
  return onTwoGrids(mesh, [-1, 0], [1, 2], (prepared) => {
    const { impedance } = solveState(prepared, { materials, omega }, ONE_TURN);
    return [impedance.im / omega, impedance.re / straight];
  });
}
