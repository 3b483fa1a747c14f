import { describe, expect, test } from "vitest";
import { MU0 } from "../solver/index.ts";
import { checkDesign } from "./check.ts";
import { block, type Draft, varied } from "./drafts.ts";

const sceneOf = (change: (d: Draft) => void) => checkDesign(varied(change)).scene;

test("lengths come out in metres, temperatures in the material's law, percent as a fraction", () => {
  const scene = sceneOf((d) => {
    d.coil.conductor.temperatureC = 60;
    d.coil.leads = { lengthMm: 150, spacingMm: 20 };
    d.strayPointsMm = [[300, -5]];
  });
  expect(scene.section).toEqual({ kind: "round", radius: 0.004, wall: 0.001 });
  expect(scene.turns[0]).toEqual({ r: 0.029, z: -0.0315 });
  expect(scene.advance[6]).toEqual({ axial: 0.0105, radial: 0 });
  // IEC 60028: 1/58 µΩ·m · (1 + 0.00393 · 40).
  expect(scene.conductor.resistivity).toBeCloseTo((1e-6 / 58) * 1.1572, 18);
  expect(scene.leads).toEqual({ length: 0.15, spacing: 0.02 });
  expect(scene.strayPoints).toEqual([[0.3, -0.005]]);
  expect(scene.accuracy).toBe(0.002);
  expect(scene.frequency).toBe(10_000);
  expect(scene.drive).toEqual({ kind: "current", ampere: 400 });
});

test("rectangular sections and the other drives", () => {
  const scene = sceneOf((d) => {
    d.coil.conductor = {
      section: "rectTube",
      radialWidthMm: 6,
      axialHeightMm: 9,
      wallMm: 1,
      material: "copper",
    };
    d.drive = { frequencyHz: 50, partPowerW: 1200 };
  });
  expect(scene.section).toEqual({ kind: "rect", width: 0.006, height: 0.009, wall: 0.001 });
  expect(scene.drive).toEqual({ kind: "power", watt: 1200 });
  const voltage = sceneOf((d) => (d.drive = { frequencyHz: 50, coilVoltageV: 24 }));
  expect(voltage.drive).toEqual({ kind: "voltage", volt: 24 });
});

test("all turns in series unless strands say otherwise", () => {
  expect([...sceneOf(() => {}).circuit.path]).toEqual([0, 0, 0, 0, 0, 0, 0]);
  const { circuit } = sceneOf(
    (d) =>
      (d.coil.strands = [
        [0, 2, 4, 6],
        [5, 3, 1],
      ]),
  );
  expect(circuit.turns).toBe(7);
  expect([...circuit.path]).toEqual([0, 1, 0, 1, 0, 1, 0]);
  expect([...circuit.sense]).toEqual([1, 1, 1, 1, 1, 1, 1]);
});

test("rings keep their sense", () => {
  const { circuit } = sceneOf((d) => {
    d.parts = [];
    d.coil.winding = {
      form: "rings",
      centresMm: [
        [30, 0],
        [30, 20],
      ],
      sense: [1, -1],
    };
  });
  expect([...circuit.sense]).toEqual([1, -1]);
});

test("parts come first, then guides, each with its place in the document", () => {
  const { bodies } = sceneOf((d) => {
    d.parts.push({ ...block("shield", 60, 70, -5, 5), heated: false });
    d.guides = [
      { ...block("yoke", 40, 50, -5, 5), material: { relativePermeability: 40, lossTangent: 0.01 } },
    ];
  });
  expect(bodies.map((b) => [b.name, b.role, b.index, b.heated, b.cylinder])).toEqual([
    ["pin", "part", 0, true, true],
    ["shield", "part", 1, false, false],
    ["yoke", "guide", 0, false, false],
  ]);
  expect(bodies[2]?.material).toEqual({
    resistivity: null,
    relativePermeability: 40,
    lossTangent: 0.01,
    saturation: null,
  });
});

describe("saturating materials", () => {
  const material = (m: Draft) => sceneOf((d) => (d.parts[0].material = m)).bodies[0]?.material;

  test("saturationT goes through beside the initial permeability", () => {
    expect(material({ resistivityOhmM: 2.5e-7, relativePermeability: 600, saturationT: 2 })).toMatchObject({
      relativePermeability: 600,
      saturation: 2,
    });
  });

  test("a curve gives its foot's slope and its end's polarisation", () => {
    const curve = [
      [0, 0],
      [100, 0.1],
      [1e5, 2.1],
    ];
    const found = material({ resistivityOhmM: 2.5e-7, curve });
    expect(found?.relativePermeability).toBeCloseTo(0.1 / (100 * MU0), 9);
    expect(found?.saturation).toBeCloseTo(2.1 - MU0 * 1e5, 12);
    expect(material({ curve, relativePermeability: 500 })?.relativePermeability).toBe(500);
  });

  test("a curve no better than air saturates nothing", () => {
    expect(
      material({
        curve: [
          [0, 0],
          [1e5, 1e5 * MU0],
        ],
      })?.saturation,
    ).toBeNull();
  });
});

test("faces that mean the same height are equal to the last bit", () => {
  const { bodies } = sceneOf((d) => (d.parts = [block("a", 0, 10, 0, 0.1 + 0.2), block("b", 0, 10, 0.3, 5)]));
  const heights = bodies.map((b) =>
    b.pieces.flatMap((p) => (p.kind === "polygon" ? p.points.map((q) => q[1]) : [])),
  );
  expect(Math.max(...heights[0]!)).toBe(Math.min(...heights[1]!));
});
