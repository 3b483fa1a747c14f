/** The four open cases: whole designs against our own independent finite-element figures. */
import type { Result, Uncertain } from "../../meshes/result.ts";
import { absoluteRow, type Check, type Constants, type Figure, type Row, relativeRow } from "../check.ts";
import { resultOf, spoiltDesign } from "../document.ts";
import reference from "../reference/open-cases.json";

const SOURCE =
  "our own figures: an independent body-fitted second-order finite-element computation (not a published source)";
/** The reference's own uncertainty is no smaller than this. */
const FLOOR = 5e-5;
/** Greatest bar the default accuracy of 0.2 % allows. */
const ASKED = 2e-3;

type Case = (typeof reference.cases)[number];

export const openCases: Check = {
  id: "open-cases",
  title: "Four whole designs",
  method: "The design documents as they stand, through predict, at the default accuracy.",
  why: "R, L and part powers: the document's own bar plus the reference's uncertainty (at least 5e-5), the bar itself at most 0.2 %. Slice shares 0.005, depth shares 0.02, turn powers 2 % of the hottest turn's; stray field its bar plus the reference's uncertainty; surface field 1 % (the reference squares a field that is infinite at its edges); peak density 5 % (the reference is up to 2.7 % uncertain).",
  spoiled: { conductivity: 1.02, permeability: 1, length: 1 },
  pieces: reference.cases.map((c) => (constants) => rows(c, constants)),
};

function rows(c: Case, constants: Constants): Row[] {
  const result = resultOf(spoiltDesign(c.design, constants));
  const loaded = result.loaded;
  const part = result.parts[0];
  if (loaded === null || part === undefined) throw new RangeError(`${c.name} has no part`);
  const of = c.loaded.parts[0]!;
  const doubt = c.uncertainty;
  return [
    governed(c, "R empty", c.empty.resistanceOhm, doubt.empty.resistanceOhm, result.empty.resistanceOhm),
    governed(c, "L empty", c.empty.inductanceH, doubt.empty.inductanceH, result.empty.inductanceH),
    governed(c, "R loaded", c.loaded.resistanceOhm, doubt.loaded.resistanceOhm, loaded.resistanceOhm),
    governed(c, "L loaded", c.loaded.inductanceH, doubt.loaded.inductanceH, loaded.inductanceH),
    governed(c, "part power", c.loaded.partPowerW, doubt.loaded.partPowerW, part.powerW),
    governed(c, "coil power", c.loaded.coilPowerW, doubt.loaded.coilPowerW, result.power.coilW),
    relativeRow(`${c.name}: surface field`, SOURCE, of.surfaceHRmsAPerM, figure(part.surfaceHAPerM), 0.01),
    relativeRow(`${c.name}: peak density`, SOURCE, of.peakPowerDensityWPerM3, figure(part.peakWPerM3), 0.05),
    ...shares(c, "slice", of.sliceShares, part.sliceShares, 0.005),
    ...shares(c, "side depth", of.depthShares, part.sideDepthShares?.map((s) => s.share) ?? [], 0.02),
    ...shares(
      c,
      "bore depth",
      of.boreDepthShares ?? [],
      part.boreDepthShares?.map((s) => s.share) ?? [],
      0.02,
    ),
    turns(c, result),
    ...stray(c, result),
  ];
}

const figure = (u: Uncertain): Figure => ({ value: u.value, bar: u.plusMinus });

/** A figure held to its own bar plus the reference's uncertainty, and the bar to 0.2 %. */
function governed(c: Case, name: string, expected: number, doubt: number, got: Uncertain): Row {
  const tolerance = got.plusMinus / expected + Math.max(FLOOR, doubt / expected);
  const row = relativeRow(`${c.name}: ${name}`, SOURCE, expected, figure(got), tolerance);
  return { ...row, passed: row.passed && (row.bar ?? Infinity) <= ASKED };
}

/** The share that is furthest off; every share counts. */
function shares(
  c: Case,
  name: string,
  expected: readonly number[],
  got: readonly number[],
  tolerance: number,
): Row[] {
  if (expected.length === 0) return [];
  if (got.length !== expected.length) throw new RangeError(`${c.name}: ${got.length} ${name} shares`);
  const off = expected.map((e, i) => Math.abs((got[i] ?? Infinity) - e));
  const worst = off.indexOf(Math.max(...off));
  const label = `${c.name}: ${name} share ${worst + 1} of ${expected.length}, the worst`;
  return [absoluteRow(label, SOURCE, expected[worst]!, { value: got[worst]!, bar: null }, tolerance)];
}

/** The turn that is furthest off, in parts of the hottest turn's power. */
function turns(c: Case, result: Result): Row {
  const hottest = Math.max(...c.loaded.turnPowerW);
  const off = c.loaded.turnPowerW.map((w, k) => Math.abs((result.turns[k]?.powerW ?? Infinity) - w));
  const worst = off.indexOf(Math.max(...off));
  const value = (result.turns[worst]?.powerW ?? Number.NaN) / hottest;
  const label = `${c.name}: power of turn ${worst}, the worst, over the hottest turn's`;
  return absoluteRow(label, SOURCE, c.loaded.turnPowerW[worst]! / hottest, { value, bar: null }, 0.02);
}

function stray(c: Case, result: Result): Row[] {
  return result.strayField.map((s, i) => {
    const expected = c.loaded.fieldBRmsT[i]!;
    const doubt = Math.max(FLOOR, (c.uncertainty.loaded.fieldBRmsT[i] ?? 0) / expected);
    const tolerance = s.fluxDensityT.plusMinus / expected + doubt;
    const place = `(${s.rMm}, ${s.zMm}) mm`;
    return relativeRow(`${c.name}: |B| at ${place}`, SOURCE, expected, figure(s.fluxDensityT), tolerance);
  });
}
