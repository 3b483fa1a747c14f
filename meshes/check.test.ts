/** Properties of the check as a whole, over random designs. */
import fc from "fast-check";
import { expect, test } from "vitest";
import { checkDesign } from "./check.ts";
import type { Design } from "./design.ts";
import { limits, turnCount } from "./design.ts";
import { type Draft, faultsOfDocument } from "./drafts.ts";

/** Whole and half millimetres, so that shifting and mirroring round nothing. */
const half = (min: number, max: number) => fc.integer({ min: 2 * min, max: 2 * max }).map((k) => k / 2);

const conductor = fc.oneof(
  fc.record({
    section: fc.constant("roundBar"),
    outsideDiameterMm: half(4, 9),
    material: fc.constant("copper"),
  }),
  fc.record({
    section: fc.constant("rectTube"),
    radialWidthMm: half(4, 9),
    axialHeightMm: half(4, 9),
    wallMm: fc.constant(1),
    material: fc.constant("copper"),
  }),
);
const count = fc.integer({ min: 1, max: 6 });
/** Mostly clear of the largest section, sometimes not. */
const pitch = half(7, 16);
const helix = count.chain((turns) =>
  fc.record({
    form: fc.constant("helix"),
    turns: fc.constant(turns),
    boreDiameterMm: half(20, 60),
    pitchMm: fc.oneof(pitch, fc.array(pitch, { minLength: turns - 1, maxLength: turns - 1 })),
    centreZMm: half(-20, 20),
  }),
);
const spiral = fc.record({
  form: fc.constant("spiral"),
  turns: count,
  innerDiameterMm: half(20, 60),
  pitchMm: pitch,
  zMm: half(-20, 20),
});
const layers = fc.record({
  form: fc.constant("layers"),
  turnsPerLayer: count,
  layers: fc.integer({ min: 1, max: 3 }),
  boreDiameterMm: half(20, 60),
  pitchMm: pitch,
  layerPitchMm: pitch,
  centreZMm: half(-20, 20),
});
const cone = fc.record({
  form: fc.constant("cone"),
  turns: fc.integer({ min: 2, max: 6 }),
  boreDiameterMm: half(20, 60),
  topBoreDiameterMm: half(20, 60),
  pitchMm: pitch,
  centreZMm: half(-20, 20),
});
const ring = fc.tuple(half(12, 60), half(-40, 40));
const rings = fc.record({
  form: fc.constant("rings"),
  centresMm: fc.array(ring, { minLength: 1, maxLength: 4 }),
});

const cylinder = fc.record({
  shape: fc.constant("cylinder"),
  diameterMm: half(11, 24),
  boreDiameterMm: half(0, 10),
  lengthMm: half(1, 60),
  centreZMm: half(-30, 30),
});
const sphere = fc.record({ shape: fc.constant("sphere"), diameterMm: half(5, 24), centreZMm: half(-30, 30) });
const outline = fc
  .tuple(half(1, 12), half(1, 12), half(1, 12), half(-30, 30), half(1, 20))
  .map(([a, b, c, low, height]) => ({
    shape: "outline",
    pointsMm: [
      [0, low],
      [a, low],
      [b, low + height / 2],
      [c, low + height],
      [0, low + height],
    ],
  }));
const stack = fc.record({
  shape: fc.constant("stack"),
  count: fc.integer({ min: 1, max: 4 }),
  gapMm: half(1, 3),
  of: fc.oneof(cylinder, sphere, outline),
});
const body = fc
  .oneof(cylinder, sphere, outline, stack)
  .map((shape) => ({ ...shape, name: "x", material: { resistivityOhmM: 1e-6 } }));

const design = fc.record({
  coil: fc.record({ conductor, winding: fc.oneof(helix, spiral, layers, cone, rings) }),
  parts: fc.array(body, { maxLength: 2 }),
  guides: fc.array(body, { maxLength: 1 }),
  drive: fc.constant({ frequencyHz: 1e4, currentA: 100 }),
});

const accepted = (d: unknown) => faultsOfDocument(d).length === 0;
const pointers = (d: unknown) =>
  new Set(faultsOfDocument(d).map((f) => f.pointer.split("/").slice(0, 3).join("/")));

/** z → factor·z + shift, factor ±1. */
function moved(d: Draft, factor: 1 | -1, shift: number): Draft {
  const at = (z: number) => factor * z + shift;
  const copy = structuredClone(d);
  const w = copy.coil.winding;
  if (w.form === "spiral") w.zMm = at(w.zMm);
  else if (w.form === "rings") for (const centre of w.centresMm) centre[1] = at(centre[1]);
  else w.centreZMm = at(w.centreZMm);
  if (factor === -1) {
    if (Array.isArray(w.pitchMm)) w.pitchMm.reverse();
    if (w.form === "cone") [w.boreDiameterMm, w.topBoreDiameterMm] = [w.topBoreDiameterMm, w.boreDiameterMm];
  }
  for (const b of [...copy.parts, ...copy.guides]) {
    const solid = b.shape === "stack" ? b.of : b;
    if (solid.shape === "outline") for (const p of solid.pointsMm) p[1] = at(p[1]);
    else solid.centreZMm = at(solid.centreZMm);
  }
  return copy;
}

test("both accepted and refused designs are among the random ones (seed 1319)", () => {
  const share = fc.sample(design, { seed: 1319, numRuns: 200 }).filter(accepted).length / 200;
  expect(share).toBeGreaterThan(0.15);
  expect(share).toBeLessThan(0.85);
});

test("accepted designs become scenes of the right counts, and come back unchanged (seed 1321)", () => {
  fc.assert(
    fc.property(design, (d) => {
      if (!accepted(d)) return;
      const { design: completed, scene } = checkDesign(d);
      expect(scene.turns).toHaveLength(turnCount(completed.coil.winding));
      expect(scene.advance).toHaveLength(scene.turns.length);
      expect(scene.circuit.path).toHaveLength(scene.turns.length);
      expect(scene.bodies).toHaveLength(d.parts.length + d.guides.length);
      completed.parts.forEach((part, i) => {
        expect(scene.bodies[i]?.pieces).toHaveLength(part.shape === "stack" ? part.count : 1);
      });
      expect(checkDesign(completed).design).toEqual(completed);
    }),
    { seed: 1321, numRuns: 300 },
  );
});

test("moving everything along the axis, or turning it upside down, changes no verdict (seed 1327)", () => {
  fc.assert(
    fc.property(design, fc.constantFrom<1 | -1>(1, -1), half(-200, 200), (d, factor, shift) => {
      const there = moved(d, factor, shift);
      // Of several turns equally deep in the way another may be named, and a cone's list of pitches is told by another entry.
      expect(pointers(there)).toEqual(pointers(d));
    }),
    { seed: 1327, numRuns: 300 },
  );
});

test("a diameter told as acceptable is accepted (seed 1361)", () => {
  fc.assert(
    fc.property(helix, half(61, 120), half(1, 60), (winding, diameterMm, lengthMm) => {
      const part = { shape: "cylinder", diameterMm, lengthMm, material: {} };
      const coil = { conductor: { section: "roundBar", outsideDiameterMm: 6, material: "copper" }, winding };
      const document = { coil, parts: [part], drive: { frequencyHz: 1e4, currentA: 1 } };
      const told = faultsOfDocument(document).map((f) =>
        /^(\w+) (below|above) (\S+)$/.exec(f.accepted ?? ""),
      );
      fc.pre(told.length === 1 && told[0] !== null);
      const [, key = "", side, limit] = told[0]!;
      const value = Number(limit) + (side === "below" ? -0.01 : 0.01);
      expect(faultsOfDocument({ ...document, parts: [{ ...part, [key]: value }] })).toEqual([]);
    }),
    { seed: 1361, numRuns: 200 },
  );
});

test("any JSON at all is answered by faults, never by another error (seed 1367)", () => {
  const keys = fc.constantFrom(
    "coil",
    "parts",
    "drive",
    "winding",
    "material",
    "shape",
    "pointsMm",
    "of",
    "form",
    "helix",
  );
  const leaf = fc.oneof(
    fc.double(),
    fc.string(),
    fc.constant(null),
    fc.boolean(),
    fc.constantFrom("copper", "stack", "rings"),
  );
  const { tree } = fc.letrec<{ tree: unknown }>((tie) => ({
    tree: fc.oneof(
      { depthSize: "medium" },
      leaf,
      fc.array(tie("tree"), { maxLength: 4 }),
      fc.dictionary(keys, tie("tree")),
    ),
  }));
  fc.assert(
    fc.property(tree, (value) => {
      const faults = faultsOfDocument(value);
      expect(faults.length).toBeGreaterThan(0);
      for (const f of faults) expect(f.pointer).toMatch(/^(\/|$)/);
    }),
    { seed: 1367, numRuns: 500 },
  );
});

test("a good design with one value replaced is accepted or refused, never another error (seed 1373)", () => {
  const junk = fc.oneof(
    fc.constantFrom<unknown>(
      null,
      "",
      "7",
      [],
      {},
      [[]],
      -1,
      0,
      1e300,
      Number.NaN,
      -Infinity,
      true,
      1e-300,
      "copper",
    ),
    fc.double(),
  );
  fc.assert(
    fc.property(design, fc.nat(), junk, (d, pick, value) => {
      const copy = structuredClone(d) as Draft;
      const places = leavesOf(copy);
      const [holder, key] = places[pick % places.length]!;
      holder[key] = value;
      for (const f of faultsOfDocument(copy)) expect(f.detail).not.toMatch(/undefined|NaN|Infinity|\[object/);
    }),
    { seed: 1373, numRuns: 1000 },
  );
});

/** Every place of a document: its holder and key. */
function leavesOf(value: Draft): [Draft, string][] {
  if (value === null || typeof value !== "object") return [];
  return Object.keys(value).flatMap((key): [Draft, string][] => [[value, key], ...leavesOf(value[key])]);
}

test("the most that is taken is answered in a few seconds", () => {
  const part: Draft = { shape: "stack", count: limits.stackCount, gapMm: 1, material: {} };
  const of = { shape: "cylinder", diameterMm: 20, lengthMm: 1 };
  const document: Draft = {
    coil: {
      conductor: { section: "roundBar", outsideDiameterMm: 2, material: "copper" },
      winding: { form: "helix", boreDiameterMm: 50, turns: limits.turns, pitchMm: 2.5 },
    },
    parts: Array.from({ length: 4 }, (_, k) => ({ ...part, of: { ...of, centreZMm: 1100 * k } })),
    drive: { frequencyHz: 1e4, currentA: 1 },
  };
  const started = performance.now();
  const scene = checkDesign(document as Design).scene;
  expect(scene.bodies.flatMap((b) => b.pieces)).toHaveLength(4 * limits.stackCount);
  expect(performance.now() - started).toBeLessThan(10_000);
});
