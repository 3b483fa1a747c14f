/** What is hard for a grid: acute magnetic edges, tips, thin sheaths at tenth-of-a-millimetre gaps, pieces that touch; spheres driven by power. */
import {
  amps,
  bar,
  cylinder,
  type Entry,
  helix,
  METALS,
  outline,
  sphere,
  stack,
  steel,
  tube,
  watts,
} from "./pieces.ts";

export const HARD: readonly Entry[] = [
  {
    id: "ball-by-power",
    tags: [],
    design: {
      coil: { conductor: tube(6, 1), winding: helix(52, 4, 9) },
      parts: [sphere(40, METALS.stainless, { z: 3 })],
      drive: watts(30_000, 1200),
    },
  },
  {
    id: "balls-tenth-gap",
    tags: ["curved magnetic"],
    design: {
      coil: { conductor: tube(4, 0.7), winding: helix(26, 6, 6) },
      parts: [stack(3, 0.1, { shape: "sphere", diameterMm: 13 }, steel(40))],
      drive: watts(60_000, 300),
    },
  },
  {
    id: "washers-no-gap",
    tags: ["parts touch"],
    design: {
      coil: { conductor: tube(6, 1), winding: helix(50, 4, 9) },
      parts: [
        stack(5, 0, { shape: "cylinder", diameterMm: 36, boreDiameterMm: 12, lengthMm: 5 }, METALS.stainless),
      ],
      drive: watts(40_000, 800),
    },
  },
  {
    id: "knife-ring-magnetic",
    tags: ["slanted", "magnetic edges"],
    design: {
      coil: { conductor: bar(5), winding: helix(80, 4, 7) },
      parts: [
        outline(
          [
            [18, -6],
            [34, 4],
            [18, 4],
          ],
          steel(80),
        ),
      ],
      drive: amps(2500, 250),
    },
  },
  {
    id: "needle-tip-1000",
    tags: ["cone tip", "slanted", "magnetic edges"],
    design: {
      coil: { conductor: tube(5, 0.8), winding: helix(30, 5, 7) },
      parts: [
        outline(
          [
            [0, -28],
            [9, -28],
            [9, -14],
            [0, 30],
          ],
          steel(1000),
        ),
      ],
      drive: amps(20_000, 120),
    },
  },
  {
    id: "sheath-tenth-gap",
    tags: ["thin sheath", "two parts", "magnetic edges"],
    design: {
      coil: { conductor: tube(6, 1), winding: helix(48, 4, 9) },
      parts: [
        cylinder(36, 30, steel(60), { bore: 35.4, name: "sheath" }),
        cylinder(35.2, 30, METALS.hotSteel, { name: "core" }),
      ],
      drive: amps(12_000, 300),
    },
  },
];
