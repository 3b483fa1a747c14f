/** Coils in company: guides with and without loss, shields, crucibles, and designs of several kinds at once. */
import {
  amps,
  bar,
  box,
  cone,
  cylinder,
  type Entry,
  guide,
  helix,
  layers,
  METALS,
  outline,
  rectBar,
  rectTube,
  rings,
  sleeve,
  sphere,
  spiral,
  steel,
  tube,
  volts,
  watts,
} from "./pieces.ts";

export const COMPANY: readonly Entry[] = [
  {
    id: "yoke-outside",
    tags: [],
    design: {
      coil: { conductor: tube(8, 1), winding: helix(50, 4, 11) },
      parts: [cylinder(32, 60, METALS.hotSteel)],
      guides: [guide(box(36, 46, -26, 26), { mur: 40, tan: 0.01 })],
      drive: amps(10_000, 400),
      strayPointsMm: [
        [60, 0],
        [400, 0],
      ],
    },
  },
  {
    id: "yoke-no-part",
    tags: [],
    design: {
      coil: { conductor: bar(5), winding: helix(40, 3, 8) },
      guides: [sleeve(56, 70, [30, 0], { mur: 200 })],
      drive: amps(20_000, 100),
    },
  },
  {
    id: "u-yoke-spiral",
    tags: ["undercut"],
    design: {
      coil: { conductor: rectBar(4, 6), winding: spiral(30, 4, 6) },
      parts: [cylinder(100, 6, steel(30), { z: -10 })],
      guides: [
        guide(
          [
            [6, -4],
            [12, -4],
            [12, 6],
            [42, 6],
            [42, -4],
            [48, -4],
            [48, 12],
            [6, 12],
          ],
          { mur: 60, tan: 0.02 },
        ),
      ],
      drive: watts(20_000, 1500),
    },
  },
  {
    id: "ferrite-plate-spiral",
    tags: ["ci"],
    design: {
      coil: { conductor: bar(4), winding: spiral(36, 6, 5.2) },
      parts: [cylinder(120, 5, [6e-7, 90], { z: 11 })],
      guides: [sleeve(30, 124, [6, -8], { mur: 1800, tan: 0.004 })],
      drive: volts(24_000, 30),
      strayPointsMm: [
        [0, 80],
        [300, 0],
      ],
    },
  },
  {
    id: "core-in-bore",
    tags: ["bore heating"],
    design: {
      coil: { conductor: tube(3, 0.5), winding: helix(14, 4, 4.5) },
      parts: [cylinder(44, 24, METALS.stainless, { bore: 24 })],
      guides: [sleeve(0, 11, [30, 0], { mur: 30, tan: 0.05 })],
      drive: amps(150_000, 120),
    },
  },
  {
    id: "lossy-round-core",
    tags: [],
    design: {
      coil: { conductor: bar(3), winding: helix(34, 5, 4.5) },
      guides: [{ shape: "sphere", diameterMm: 26, material: { relativePermeability: 50, lossTangent: 0.3 } }],
      drive: amps(100_000, 20),
    },
  },
  {
    id: "guide-touches-part",
    tags: ["parts touch"],
    design: {
      coil: { conductor: tube(6, 1), winding: helix(50, 3, 9) },
      parts: [cylinder(36, 30, METALS.hotSteel)],
      guides: [sleeve(0, 36, [10, 20], { mur: 25 })],
      drive: amps(15_000, 250),
    },
  },
  {
    id: "conducting-guide",
    tags: [],
    design: {
      coil: { conductor: tube(6, 1), winding: helix(40, 3, 9) },
      parts: [cylinder(26, 40, METALS.hotSteel)],
      guides: [
        {
          shape: "cylinder",
          diameterMm: 76,
          boreDiameterMm: 60,
          lengthMm: 24,
          material: { relativePermeability: 300, resistivityOhmM: 1e-3 },
        },
      ],
      drive: amps(30_000, 200),
    },
  },
  {
    id: "copper-shield",
    tags: ["shield"],
    design: {
      coil: { conductor: tube(8, 1), winding: helix(50, 4, 11) },
      parts: [
        cylinder(32, 60, steel(40)),
        cylinder(110, 80, [1.75e-8, 1], { bore: 104, heated: false, name: "shield" }),
      ],
      drive: amps(10_000, 400),
      strayPointsMm: [
        [60, 0],
        [0, 100],
        [500, 0],
      ],
    },
  },
  {
    id: "flux-robber",
    tags: ["shield"],
    design: {
      coil: { conductor: tube(6, 1), winding: helix(44, 4, 9) },
      parts: [
        cylinder(28, 60, steel(60), { z: -10 }),
        cylinder(40, 3, [1.75e-8, 1], { bore: 31, z: 24, heated: false, name: "robber ring" }),
      ],
      drive: watts(40_000, 1200),
    },
  },
  {
    id: "base-plate-shield",
    tags: ["shield"],
    design: {
      coil: { conductor: tube(6, 1), winding: cone(60, 40, 4, 9, 10) },
      parts: [
        sphere(24, METALS.hotSteel, { z: 12 }),
        cylinder(140, 4, METALS.aluminium, { z: -24, heated: false, name: "table" }),
      ],
      drive: amps(60_000, 200),
    },
  },
  {
    id: "crucible-graphite",
    tags: ["shield", "slanted", "two parts"],
    design: {
      coil: { conductor: rectTube(8, 12, 2), winding: layers(150, [5, 2], [15, 12]) },
      parts: [
        outline(
          [
            [0, -75],
            [55, -75],
            [65, 70],
            [53, 70],
            [44, -60],
            [0, -60],
          ],
          METALS.graphite,
          {
            heated: false,
            name: "crucible",
          },
        ),
        cylinder(80, 90, [2.4e-7, 1], { z: -15, name: "charge" }),
      ],
      drive: watts(4000, 15_000),
      strayPointsMm: [[500, 0]],
    },
  },
  {
    id: "yoke-counter-wound",
    tags: ["no net dipole"],
    design: {
      coil: {
        conductor: bar(5),
        winding: rings(
          [
            [30, -12],
            [30, 12],
          ],
          [1, -1],
        ),
      },
      parts: [cylinder(40, 50, METALS.stainless)],
      guides: [guide(box(35, 41, -20, 20), { mur: 80, tan: 0.01 })],
      drive: amps(25_000, 200),
      strayPointsMm: [[250, 0]],
    },
  },
  {
    id: "e-yoke-pancake",
    tags: ["undercut"],
    design: {
      coil: {
        conductor: tube(5, 0.8),
        winding: rings(
          [
            [20, 0],
            [38, 0],
          ],
          [1, -1],
        ),
      },
      parts: [cylinder(120, 8, steel(80), { z: -8 })],
      guides: [
        guide(
          [
            [8, -3],
            [14, -3],
            [14, 5],
            [26, 5],
            [26, -3],
            [32, -3],
            [32, 5],
            [44, 5],
            [44, -3],
            [50, -3],
            [50, 11],
            [8, 11],
          ],
          { mur: 50, tan: 0.01 },
        ),
      ],
      drive: amps(20_000, 300),
    },
  },
];
