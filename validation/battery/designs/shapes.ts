/** Parts that are no straight cylinder: spheres, steps, cones, tips, undercuts, curved outlines, stacks, discs under spirals. */
import {
  amps,
  arc,
  bar,
  box,
  cone,
  cylinder,
  type Entry,
  helix,
  METALS,
  outline,
  type Points,
  rectBar,
  rectTube,
  rings,
  sphere,
  spiral,
  stack,
  steel,
  tube,
  volts,
  watts,
} from "./pieces.ts";

const undercut: Points = [
  [10, -30],
  [34, -30],
  [34, -12],
  [22, -12],
  [22, -4],
  [30, -4],
  [30, 6],
  [20, 10],
  [20, 18],
  [32, 18],
  [32, 30],
  [10, 30],
];
const stepped: Points = [
  [0, -60],
  [16, -60],
  [16, -18],
  [23, -12],
  [23, 28],
  [14, 28],
  [14, 60],
  [0, 60],
];
const domed: Points = [[0, -40], [20, -40], ...arc([0, 0], 20, [0, 90], 12)];

export const SHAPES: readonly Entry[] = [
  {
    id: "ball-in-rings-wide-skin",
    tags: ["wide skin", "ci"],
    design: {
      coil: {
        conductor: bar(1),
        winding: rings([
          [30, -15],
          [30, 15],
        ]),
      },
      parts: [sphere(24, METALS.stainless)],
      drive: amps(500, 20),
    },
  },
  {
    id: "ball-in-rings-thin-skin",
    tags: ["curved magnetic"],
    design: {
      coil: {
        conductor: bar(0.6),
        winding: rings([
          [30, -15],
          [30, 15],
        ]),
      },
      parts: [sphere(24, [1e-8, 50])],
      drive: amps(1500, 20),
    },
  },
  {
    id: "ball-hot-60k",
    tags: [],
    design: {
      coil: { conductor: tube(6, 1), winding: helix(60, 4, 9) },
      parts: [sphere(46, METALS.hotSteel)],
      drive: amps(60_000, 300),
    },
  },
  {
    id: "ball-magnetic-20k",
    tags: ["curved magnetic"],
    design: {
      coil: { conductor: tube(6, 1), winding: helix(44, 4, 9) },
      parts: [sphere(34, steel(150), { z: 4 })],
      drive: amps(20_000, 200),
    },
  },
  {
    id: "ball-1000-mains",
    tags: ["curved magnetic"],
    design: {
      coil: { conductor: bar(4), winding: helix(50, 6, 5) },
      parts: [sphere(40, steel(1000))],
      drive: amps(50, 60),
    },
  },
  {
    id: "balls-in-a-row",
    tags: ["curved magnetic"],
    design: {
      coil: { conductor: tube(4, 0.7), winding: helix(24, 6, 6) },
      parts: [stack(3, 1, { shape: "sphere", diameterMm: 12 }, steel(120))],
      drive: amps(80_000, 120),
    },
  },
  {
    id: "stepped-shaft",
    tags: ["stepped", "magnetic edges", "leads"],
    design: {
      coil: {
        conductor: rectTube(10, 8, 1.5),
        winding: helix(62, 5, [10, 12, 11, 10], 5),
        leads: { lengthMm: 120, spacingMm: 16 },
      },
      parts: [outline(stepped, [6.5e-7, 12])],
      drive: amps(9500, 650),
    },
  },
  {
    id: "stepped-hot",
    tags: ["stepped"],
    design: {
      coil: { conductor: tube(8, 1), winding: helix(58, 5, 11) },
      parts: [outline(stepped, METALS.hotSteel)],
      drive: watts(4000, 5000),
    },
  },
  {
    id: "stepped-450k",
    tags: ["stepped", "magnetic edges"],
    design: {
      coil: { conductor: tube(4, 0.8), winding: helix(20, 4, 6) },
      parts: [
        outline(
          [
            [0, -16],
            [4, -16],
            [4, -2],
            [7, -2],
            [7, 8],
            [5, 8],
            [5, 16],
            [0, 16],
          ],
          steel(60),
        ),
      ],
      drive: amps(450_000, 80),
    },
  },
  {
    id: "plumb-tip-hot",
    tags: ["cone tip", "slanted"],
    design: {
      coil: { conductor: tube(6, 0.8), winding: cone(66, 30, 5, 8) },
      parts: [
        outline(
          [
            [0, -30],
            [24, -30],
            [24, -22],
            [0, 34],
          ],
          METALS.hotSteel,
        ),
      ],
      drive: amps(30_000, 300),
    },
  },
  {
    id: "plumb-tip-magnetic",
    tags: ["cone tip", "slanted", "magnetic edges"],
    design: {
      coil: { conductor: tube(6, 0.8), winding: cone(66, 30, 5, 8) },
      parts: [
        outline(
          [
            [0, -30],
            [24, -30],
            [24, -22],
            [0, 34],
          ],
          [4e-7, 30],
        ),
      ],
      drive: amps(30_000, 300),
    },
  },
  {
    id: "double-cone",
    tags: ["cone tip", "slanted", "magnetic edges"],
    design: {
      coil: { conductor: bar(5), winding: helix(44, 4, 8) },
      parts: [
        outline(
          [
            [0, -22],
            [18, 0],
            [0, 22],
          ],
          steel(40),
        ),
      ],
      drive: amps(12_000, 200),
    },
  },
  {
    id: "taper-magnetic",
    tags: ["slanted", "magnetic edges"],
    design: {
      coil: { conductor: rectBar(5, 6), winding: cone(60, 40, 5, 8) },
      parts: [
        outline(
          [
            [0, -25],
            [24, -25],
            [13, 25],
            [0, 25],
          ],
          steel(200),
        ),
      ],
      drive: volts(8000, 12),
    },
  },
  {
    id: "hollow-cone",
    tags: ["slanted"],
    design: {
      coil: { conductor: tube(6, 1), winding: cone(50, 90, 5, 9) },
      parts: [
        outline(
          [
            [14, -24],
            [18, -24],
            [38, 24],
            [34, 24],
          ],
          METALS.stainless,
        ),
      ],
      drive: amps(6000, 300),
    },
  },
  {
    id: "undercut-hub",
    tags: ["undercut", "magnetic edges"],
    design: {
      coil: { conductor: tube(8, 1), winding: helix(76, 4, 10) },
      parts: [outline(undercut, [3.2e-7, 20])],
      drive: amps(10_000, 400),
    },
  },
  {
    id: "undercut-hot",
    tags: ["undercut"],
    design: {
      coil: { conductor: rectTube(8, 8, 1), winding: helix(76, 4, 11) },
      parts: [outline(undercut, METALS.hotSteel)],
      drive: amps(40_000, 300),
    },
  },
  {
    id: "hook-undercut",
    tags: ["undercut", "magnetic edges"],
    design: {
      coil: { conductor: tube(5, 0.8), winding: helix(50, 4, 7) },
      parts: [
        outline(
          [
            [0, -20],
            [20, -20],
            [20, 12],
            [12, 12],
            [12, 4],
            [15, 4],
            [15, -10],
            [6, -10],
            [6, 20],
            [0, 20],
          ],
          steel(100),
        ),
      ],
      drive: amps(25_000, 200),
    },
  },
  {
    id: "domed-punch",
    tags: ["curved", "curved magnetic"],
    design: {
      coil: { conductor: tube(6, 1), winding: helix(54, 4, 9, 2) },
      parts: [outline(domed, steel(100))],
      drive: amps(15_000, 250),
    },
  },
  {
    id: "domed-hot",
    tags: ["curved"],
    design: {
      coil: { conductor: tube(6, 1), winding: helix(54, 4, 9, 2) },
      parts: [outline(domed, METALS.hotSteel)],
      drive: amps(100_000, 200),
    },
  },
  {
    id: "waisted-roller",
    tags: ["curved", "curved magnetic"],
    design: {
      coil: { conductor: tube(5, 0.8), winding: helix(52, 5, 8) },
      parts: [outline([[0, -24], ...arc([40, 0], 30, [233.13, 126.87], 14), [0, 24]], steel(50))],
      drive: amps(20_000, 250),
    },
  },
  {
    id: "groove-pulley",
    tags: ["curved", "undercut"],
    design: {
      coil: { conductor: bar(4), winding: helix(70, 4, 6) },
      parts: [
        outline(
          [[8, -12], [30, -12], [30, -8], ...arc([30, 0], 6, [270, 90], 10), [30, 8], [30, 12], [8, 12]],
          METALS.hotSteel,
        ),
      ],
      drive: amps(50_000, 150),
    },
  },
  {
    id: "washers-half-gap",
    tags: ["narrow part gap"],
    design: {
      coil: { conductor: rectTube(6, 6, 1), winding: helix(52, 5, 8) },
      parts: [
        stack(6, 0.5, { shape: "cylinder", diameterMm: 40, boreDiameterMm: 21, lengthMm: 4 }, steel(50)),
      ],
      drive: amps(20_000, 350),
    },
  },
  {
    id: "laminations-tenth-gap",
    tags: ["narrow part gap"],
    design: {
      coil: { conductor: bar(4), winding: helix(40, 4, 6) },
      parts: [stack(4, 0.1, { shape: "cylinder", diameterMm: 30, lengthMm: 3 }, METALS.stainless)],
      drive: amps(30_000, 100),
    },
  },
  {
    id: "stacked-cones",
    tags: ["slanted"],
    design: {
      coil: { conductor: tube(6, 1), winding: helix(50, 4, 9) },
      parts: [
        stack(
          3,
          1.5,
          {
            shape: "outline",
            pointsMm: [
              [6, -5],
              [18, -5],
              [12, 5],
              [6, 5],
            ],
          },
          METALS.hotSteel,
        ),
      ],
      drive: amps(70_000, 150),
    },
  },
  {
    id: "plate-under-spiral",
    tags: ["ci"],
    design: {
      coil: { conductor: tube(6, 1), winding: spiral(24, 5, 8) },
      parts: [cylinder(120, 6, METALS.hotSteel, { z: -9 })],
      drive: amps(25_000, 250),
      strayPointsMm: [
        [30, -5.8],
        [0, 60],
      ],
    },
  },
  {
    id: "plate-magnetic-close",
    tags: ["magnetic edges", "narrow part gap"],
    design: {
      coil: { conductor: rectBar(3, 3), winding: spiral(30, 8, 4) },
      parts: [cylinder(110, 4, [6e-7, 90], { z: -4 })],
      drive: amps(24_000, 60),
    },
  },
  {
    id: "plate-mains-wide-skin",
    tags: ["wide skin"],
    design: {
      coil: { conductor: bar(5), winding: spiral(40, 6, 7) },
      parts: [cylinder(140, 8, METALS.brass, { z: -10 })],
      drive: amps(50, 150),
    },
  },
  {
    id: "slab-between-spirals",
    tags: ["no net dipole"],
    design: {
      coil: {
        conductor: bar(4),
        winding: rings(
          [
            [20, -9],
            [26, -9],
            [32, -9],
            [20, 9],
            [26, 9],
            [32, 9],
          ],
          [1, 1, 1, -1, -1, -1],
        ),
      },
      parts: [cylinder(84, 6, METALS.stainless)],
      drive: amps(40_000, 100),
      strayPointsMm: [[0, 100]],
    },
  },
  {
    id: "angle-ring",
    tags: ["stepped", "bore heating", "magnetic edges"],
    design: {
      coil: { conductor: rectBar(5, 6), winding: helix(50, 3, 8) },
      parts: [
        outline(
          [
            [34, -14],
            [50, -14],
            [50, -6],
            [40, -6],
            [40, 14],
            [34, 14],
          ],
          steel(60),
        ),
      ],
      drive: amps(10_000, 300),
    },
  },
  {
    id: "square-ring-1000",
    tags: ["magnetic edges"],
    design: {
      coil: { conductor: bar(6), winding: helix(90, 4, 8) },
      parts: [outline(box(28, 40, -6, 6), steel(1000))],
      drive: amps(1000, 200),
    },
  },
];
