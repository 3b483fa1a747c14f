/** Infinite row of equal round wires with one field-free side: a long solenoid of very large radius, one pitch of it. */
import {
  type Circuit,
  cutGrid,
  type PatchMesh,
  type Prepared,
  prepare,
  solveState,
} from "../../solver/index.ts";
import { tubeImpedanceRatio } from "../analytic/skin.ts";
import { type Check, type Constants, type Figure, type Row, relativeRow } from "../check.ts";
import { air, conducting, disc, limitOfHalves, meshOf, metal, omegaFor, PASSIVE } from "../setups.ts";
import { caseIds, checkValue } from "../tables/read.ts";

const COPPER = 5.8e7;
const ONE_TURN: Circuit = { turns: 1, path: Int32Array.of(0), sense: Int8Array.of(1) };
/** Radius of the solenoid in wire diameters: curvature changes the loss by a few parts in 1e5. */
const RADIUS = 2e4;
/** Free width on either side of the wire, in pitches: the field's ripple there is e^(−2π·2) of itself. */
const MARGIN = 2;
const DEPTHS = [50, 100, 200] as const;

export const wireRow: Check = {
  id: "wire-row",
  title: "Proximity effect in a row of wires",
  method:
    "One pitch of a solenoid 20 000 wire diameters in radius; natural ends (the field is axial there) and natural outside (no field), no flux enclosed inside. Skin limit: d/δ = 50, 100, 200 taken to δ = 0.",
  why: "Finite depth: the grid (1e-4) and the source's 1e-5. Skin limit: the grid's error amplified about three times.",
  spoiled: { conductivity: 1.05, permeability: 1, length: 1 },
  pieces: [
    ...caseIds("proximity", "prox-grating-finite-").map((id) => (constants: Constants) => [
      finite(id, constants),
    ]),
    ...["prox-grating-0.3", "prox-grating-0.5", "prox-grating-0.7"].map((id) => (constants: Constants) => [
      limit(id, constants),
    ]),
  ],
};

function finite(id: string, constants: Constants): Row {
  const c = checkValue("proximity", id);
  const ratio = resistance(c.input("d/s"), c.input("d/delta"), constants);
  const name = `R/R_dc, d/s = ${c.input("d/s")}, d/δ = ${c.input("d/delta")}`;
  return relativeRow(name, c.source, c.expected("R/R0_dc"), ratio, 5e-4);
}

function limit(id: string, constants: Constants): Row {
  const c = checkValue("proximity", id);
  const [figure] = limitOfHalves(DEPTHS.map((d) => [overIsolated(c.input("d/s"), d, constants)]));
  const name = `φ at the skin limit, d/s = ${c.input("d/s")}`;
  return relativeRow(name, c.source, c.expected("phi_one_side_field_free"), figure!, 2e-3);
}

function overIsolated(dOverS: number, dOverDelta: number, constants: Constants): Figure {
  const ratio = resistance(dOverS, dOverDelta, constants);
  const isolated = tubeImpedanceRatio(dOverDelta / 2, 0).re;
  return { value: ratio.value / isolated, bar: (ratio.bar ?? 0) / isolated };
}

/** R/R_dc of the wire. */
function resistance(dOverS: number, dOverDelta: number, constants: Constants): Figure {
  const d = 0.002 * constants.length;
  const s = 1 / dOverS;
  const width = s * MARGIN;
  const shapes = [disc(width + 1, 0, 0.5, 1)];
  const strip = { kind: "strip", rFrom: 1, rTo: 1 + 2 * width, zFrom: -s / 2, zTo: s / 2 } as const;
  const depth = 0.002 / dOverDelta;
  const local = meshOf(shapes, [PASSIVE, conducting(depth, 0.002)], strip, d);
  const shift = RADIUS * d;
  const mesh = { ...local, r: local.r.map((r) => r + shift), edgeArc: shiftArcs(local, shift) };
  const omega = omegaFor(depth, COPPER);
  const direct = (2 * Math.PI * (shift + (width + 1) * d)) / (COPPER * Math.PI * (0.002 / 2) ** 2);
  const [coarse, fine] = [1, 2].map((level) => {
    const prepared = enclosed(mesh, level);
    const materials = [air(constants), metal(constants, COPPER, 1, 0)];
    return solveState(prepared, { materials, omega }, ONE_TURN).impedance.re / direct;
  }) as [number, number];
  return { value: fine, bar: Math.abs(fine - coarse) / 2 };
}

function shiftArcs(mesh: PatchMesh, shift: number): Float64Array {
  return mesh.edgeArc.map((x, i) => (i % 3 === 0 && (mesh.edgeArc[i + 2] ?? 0) > 0 ? x + shift : x));
}

/** The grid with ψ = 0 along its inner side: no flux inside it, as a long solenoid of any bore would have it. */
function enclosed(mesh: PatchMesh, level: number): Prepared {
  const grid = cutGrid(mesh, level);
  const inner = grid.r.reduce((least, r) => Math.min(least, r), Infinity);
  const fixed = grid.fixed.map((_, i) => ((grid.r[i] ?? 0) <= inner * (1 + 1e-12) ? 1 : 0));
  return prepare({ ...grid, fixed }, [-1, 0]);
}
