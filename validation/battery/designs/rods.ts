/** Straight parts in coils: µr 1 … 1000, δ from 0.02 mm to larger than the part, solid, hollow, thin sheaths, heated from the bore. */
import {
  amps,
  bar,
  cylinder,
  type Entry,
  helix,
  layers,
  METALS,
  rectBar,
  rectTube,
  rings,
  spiral,
  steel,
  tube,
  volts,
  watts,
} from "./pieces.ts";

const far: [number, number] = [600, 300];

export const RODS: readonly Entry[] = [
  {
    id: "billet-hot-10k",
    tags: ["ci"],
    design: {
      coil: { conductor: tube(8, 1), winding: helix(50, 7, 10.5) },
      parts: [cylinder(32, 80, METALS.hotSteel)],
      drive: amps(10_000, 400),
      strayPointsMm: [[0, 120], [21, 0], far],
    },
  },
  {
    id: "billet-cold-10k",
    tags: [],
    design: {
      coil: { conductor: tube(8, 1), winding: helix(50, 5, 11) },
      parts: [cylinder(32, 80, steel(60))],
      drive: amps(10_000, 400),
    },
  },
  {
    id: "billet-mains-1000",
    tags: [],
    design: {
      coil: { conductor: rectBar(8, 20), winding: helix(110, 5, 22) },
      parts: [cylinder(80, 200, steel(1000))],
      drive: amps(50, 500),
      strayPointsMm: [far],
    },
  },
  {
    id: "billet-mains-aluminium",
    tags: [],
    design: {
      coil: { conductor: rectTube(16, 24, 4), winding: helix(180, 6, 26) },
      parts: [cylinder(150, 240, METALS.aluminium)],
      drive: watts(50, 20_000),
    },
  },
  {
    id: "pin-400k",
    tags: ["ci"],
    design: {
      coil: { conductor: tube(5, 0.8), winding: helix(14, 4, 6.5) },
      parts: [cylinder(8, 30, steel(80))],
      drive: amps(400_000, 100),
    },
  },
  {
    id: "pin-140k-1000",
    tags: [],
    design: {
      coil: { conductor: tube(4, 0.8), winding: helix(16, 4, 5) },
      parts: [cylinder(10, 24, steel(1000))],
      drive: amps(140_000, 80),
    },
  },
  {
    id: "pin-450k-stainless",
    tags: [],
    design: {
      coil: { conductor: tube(4, 0.7), winding: helix(12, 5, 5) },
      parts: [cylinder(6, 40, METALS.stainless, { z: 5 })],
      drive: watts(450_000, 500),
    },
  },
  {
    id: "needle-50-wide-skin",
    tags: ["wide skin"],
    design: {
      coil: { conductor: bar(3), winding: helix(30, 5, 4) },
      parts: [cylinder(6, 60, METALS.stainless)],
      drive: amps(50, 40),
    },
  },
  {
    id: "graphite-2k",
    tags: ["wide skin"],
    design: {
      coil: { conductor: rectTube(8, 10, 1.5), winding: helix(120, 6, 13) },
      parts: [cylinder(90, 100, METALS.graphite)],
      drive: amps(2000, 600),
    },
  },
  {
    id: "iron-5-2k",
    tags: ["magnetic edges"],
    design: {
      coil: { conductor: tube(10, 1.5), winding: helix(70, 5, 13) },
      parts: [cylinder(50, 60, [3e-7, 5])],
      drive: amps(2000, 500),
    },
  },
  {
    id: "iron-300-1k",
    tags: ["magnetic edges"],
    design: {
      coil: { conductor: rectBar(6, 10), winding: helix(70, 5, 12) },
      parts: [cylinder(50, 60, steel(300))],
      drive: volts(1000, 5),
    },
  },
  {
    id: "soft-core-wide-skin",
    tags: ["magnetic edges", "wide skin", "ci"],
    design: {
      coil: { conductor: bar(4), winding: helix(30, 6, 5) },
      parts: [cylinder(20, 30, [1e-4, 200])],
      drive: amps(3000, 50),
    },
  },
  {
    id: "disc-coin",
    tags: [],
    design: {
      coil: { conductor: tube(5, 0.8), winding: helix(40, 3, 7) },
      parts: [cylinder(30, 3, METALS.brass)],
      drive: amps(80_000, 150),
    },
  },
  {
    id: "snug-bar-third-gap",
    tags: ["narrow part gap"],
    design: {
      coil: { conductor: rectBar(6, 8), winding: helix(40.6, 4, 10) },
      parts: [cylinder(40, 60, steel(20))],
      drive: amps(8000, 300),
    },
  },
  {
    id: "snug-tube-tenth-gap",
    tags: ["narrow part gap"],
    design: {
      coil: { conductor: tube(6, 1), winding: helix(30.2, 3, 9) },
      parts: [cylinder(30, 40, METALS.hotSteel)],
      drive: amps(60_000, 150),
      strayPointsMm: [[15.05, 0]],
    },
  },
  {
    id: "rod-off-end",
    tags: [],
    design: {
      coil: { conductor: tube(6, 1), winding: helix(36, 4, 8.5) },
      parts: [cylinder(24, 50, steel(40), { z: 38 })],
      drive: amps(30_000, 250),
    },
  },
  {
    id: "two-rods",
    tags: ["two parts"],
    design: {
      coil: { conductor: tube(6, 1), winding: helix(40, 6, 9) },
      parts: [cylinder(28, 24, steel(100), { z: -16 }), cylinder(20, 30, METALS.brass, { z: 20 })],
      drive: amps(20_000, 200),
    },
  },
  {
    id: "clad-rod",
    tags: ["parts touch", "two parts"],
    design: {
      coil: { conductor: tube(8, 1), winding: helix(56, 4, 11) },
      parts: [
        cylinder(36, 60, METALS.hotSteel),
        cylinder(42, 60, steel(50), { bore: 36, heated: false, name: "clad" }),
      ],
      drive: amps(5000, 400),
    },
  },
  {
    id: "long-rod-spiral",
    tags: [],
    design: {
      coil: { conductor: bar(4), winding: spiral(34, 3, 5) },
      parts: [cylinder(20, 160, steel(30))],
      drive: amps(100_000, 100),
    },
  },
  {
    id: "pipe-3k",
    tags: ["ci"],
    design: {
      coil: { conductor: rectTube(10, 8, 1.5), winding: helix(100, 5, 10) },
      parts: [cylinder(80, 90, METALS.hotSteel, { bore: 64 })],
      drive: amps(3000, 600),
    },
  },
  {
    id: "pipe-magnetic-mains",
    tags: ["magnetic edges"],
    design: {
      coil: { conductor: rectBar(10, 10), winding: helix(120, 8, 11) },
      parts: [cylinder(100, 120, steel(200), { bore: 84 })],
      drive: watts(50, 800),
    },
  },
  {
    id: "sheath-copper",
    tags: ["thin sheath"],
    design: {
      coil: { conductor: tube(6, 1), winding: helix(50, 5, 9) },
      parts: [cylinder(40, 60, [2e-8, 1], { bore: 39.6 })],
      drive: amps(10_000, 200),
    },
  },
  {
    id: "sheath-magnetic",
    tags: ["thin sheath", "magnetic edges"],
    design: {
      coil: { conductor: tube(6, 1), winding: helix(50, 4, 10) },
      parts: [cylinder(40, 50, steel(150), { bore: 39.4 })],
      drive: amps(15_000, 200),
    },
  },
  {
    id: "sheath-over-core",
    tags: ["thin sheath", "parts touch", "two parts"],
    design: {
      coil: { conductor: tube(6, 1), winding: helix(44, 4, 9) },
      parts: [
        cylinder(34, 50, [2e-8, 1], { bore: 33.6, heated: false, name: "plating" }),
        cylinder(33.6, 50, steel(40), { name: "core" }),
      ],
      drive: amps(50_000, 200),
    },
  },
  {
    id: "foil-disc",
    tags: ["thin sheath"],
    design: {
      coil: { conductor: bar(4), winding: spiral(20, 5, 6) },
      parts: [cylinder(80, 0.1, METALS.aluminium, { z: -6 })],
      drive: amps(20_000, 60),
    },
  },
  {
    id: "bore-ring-6k",
    tags: ["bore heating", "magnetic edges"],
    design: {
      coil: { conductor: rectBar(5, 8), winding: helix(70, 4, 10) },
      parts: [cylinder(130, 40, steel(80), { bore: 90 })],
      drive: amps(6000, 500),
    },
  },
  {
    id: "bore-bush-200k",
    tags: ["bore heating"],
    design: {
      coil: { conductor: tube(3, 0.5), winding: helix(12, 4, 4.5) },
      parts: [cylinder(40, 20, METALS.stainless, { bore: 20 })],
      drive: amps(200_000, 120),
      strayPointsMm: [[40, 0]],
    },
  },
  {
    id: "bore-close",
    tags: ["bore heating", "narrow part gap"],
    design: {
      coil: { conductor: rectTube(5, 6, 1), winding: helix(40, 3, 8) },
      parts: [cylinder(80, 24, METALS.hotSteel, { bore: 50.8 })],
      drive: watts(30_000, 2000),
    },
  },
  {
    id: "in-and-out",
    tags: ["bore heating", "two parts"],
    design: {
      coil: { conductor: tube(5, 0.8), winding: helix(40, 4, 7) },
      parts: [cylinder(30, 30, steel(10)), cylinder(80, 30, METALS.stainless, { bore: 56, name: "collar" })],
      drive: amps(25_000, 200),
    },
  },
  {
    id: "layers-rod-magnetic",
    tags: ["close nesting", "close turns"],
    design: {
      coil: { conductor: bar(5), winding: layers(46, [5, 2], [5.3, 5.3]) },
      parts: [cylinder(36, 40, steel(100))],
      drive: amps(4000, 150),
    },
  },
  {
    id: "opposed-over-rod",
    tags: ["no net dipole"],
    design: {
      coil: {
        conductor: tube(8, 1),
        winding: rings(
          [
            [38, -28],
            [38, -17],
            [38, 17],
            [38, 28],
          ],
          [1, 1, -1, -1],
        ),
      },
      parts: [cylinder(44, 100, METALS.hotSteel)],
      drive: amps(8000, 500),
      strayPointsMm: [
        [500, 0],
        [0, 400],
      ],
    },
  },
  {
    id: "opposed-over-steel",
    tags: ["no net dipole", "magnetic edges"],
    design: {
      coil: {
        conductor: bar(5),
        winding: rings(
          [
            [24, -10],
            [24, 10],
          ],
          [1, -1],
        ),
      },
      parts: [cylinder(30, 50, steel(120))],
      drive: amps(20_000, 200),
      strayPointsMm: [[300, 40]],
    },
  },
  {
    id: "strands-over-pipe",
    tags: [],
    design: {
      coil: {
        conductor: bar(5),
        winding: helix(70, 6, 6.5),
        strands: [
          [0, 2, 4],
          [1, 3, 5],
        ],
      },
      parts: [cylinder(54, 60, METALS.brass, { bore: 42, z: 6 })],
      drive: amps(2500, 400),
    },
  },
  {
    id: "thirty-turns-rod",
    tags: ["many turns"],
    design: {
      coil: { conductor: tube(4, 0.6), winding: helix(30, 24, 5) },
      parts: [cylinder(20, 100, steel(50))],
      drive: amps(100_000, 80),
    },
  },
];
