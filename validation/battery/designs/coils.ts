/** Coils without a part: winding forms × sections × d/δ of the copper, close nesting, counter-wound and parallel turns, leads. */
import {
  amps,
  bar,
  cone,
  type Entry,
  helix,
  layers,
  rectBar,
  rectTube,
  rings,
  spiral,
  tube,
  volts,
} from "./pieces.ts";

const far: [number, number] = [900, 200];

export const COILS: readonly Entry[] = [
  {
    id: "one-ring-mains",
    tags: ["ci"],
    design: {
      coil: { conductor: bar(2.8), winding: rings([[40, 0]]) },
      drive: amps(50, 30),
      strayPointsMm: [[0, 0], [0, 120], far],
    },
  },
  {
    id: "one-ring-450k",
    tags: [],
    design: {
      coil: { conductor: bar(6), winding: rings([[30, 0]]) },
      drive: amps(450_000, 200),
      strayPointsMm: [[0, 0], [33.4, 0], far],
    },
  },
  {
    id: "two-wires-mains",
    tags: [],
    design: {
      coil: {
        conductor: bar(3),
        winding: rings([
          [25, -4],
          [60, 6],
        ]),
      },
      drive: amps(50, 40),
      strayPointsMm: [
        [0, 10],
        [150, 0],
      ],
    },
  },
  {
    id: "helix-wire-1k",
    tags: [],
    design: { coil: { conductor: bar(1.2), winding: helix(24, 6, 3) }, drive: amps(1000, 10) },
  },
  {
    id: "helix-tube-10k",
    tags: ["leads"],
    design: {
      coil: { conductor: tube(8, 1), winding: helix(50, 7, 10.5), leads: { lengthMm: 150, spacingMm: 20 } },
      drive: volts(10_000, 25),
      strayPointsMm: [[0, 0], [300, 0], far],
    },
  },
  {
    id: "helix-tube-uneven",
    tags: ["uneven pitch"],
    design: {
      coil: { conductor: tube(6, 1), winding: helix(36, 6, [7, 9, 14, 9, 6.5]) },
      drive: amps(25_000, 300),
      strayPointsMm: [[21, 5]],
    },
  },
  {
    id: "helix-recttube-3k",
    tags: [],
    design: { coil: { conductor: rectTube(8, 12, 2), winding: helix(80, 5, 14) }, drive: amps(3000, 800) },
  },
  {
    id: "helix-bar-450k",
    tags: [],
    design: { coil: { conductor: rectBar(5, 6), winding: helix(30, 3, 8) }, drive: amps(450_000, 150) },
  },
  {
    id: "helix-tight-bars",
    tags: ["close turns"],
    design: { coil: { conductor: bar(5), winding: helix(40, 5, 5.1) }, drive: amps(8000, 200) },
  },
  {
    id: "helix-tight-rect",
    tags: ["close turns"],
    design: { coil: { conductor: rectBar(4, 6), winding: helix(40, 4, 6.1) }, drive: amps(20_000, 200) },
  },
  {
    id: "helix-thirty-400k",
    tags: ["many turns"],
    design: { coil: { conductor: tube(3, 0.5), winding: helix(40, 30, 4) }, drive: amps(400_000, 60) },
  },
  {
    id: "helix-foil-tube",
    tags: ["thin wall"],
    design: { coil: { conductor: tube(10, 0.3), winding: helix(60, 4, 13) }, drive: amps(6000, 300) },
  },
  {
    id: "strap-one-turn",
    tags: ["flat section"],
    design: {
      coil: { conductor: rectBar(2, 40), winding: helix(60, 1, 40) },
      drive: amps(30_000, 1500),
      strayPointsMm: [
        [0, 0],
        [35, 22],
      ],
    },
  },
  {
    id: "spiral-wire-mains",
    tags: [],
    design: { coil: { conductor: bar(2.5), winding: spiral(30, 10, 3.5) }, drive: amps(50, 20) },
  },
  {
    id: "spiral-tube-60k",
    tags: [],
    design: {
      coil: { conductor: tube(6, 1), winding: spiral(30, 4, 9) },
      drive: amps(60_000, 250),
      strayPointsMm: [
        [0, 12],
        [40, -8],
      ],
    },
  },
  {
    id: "spiral-strip-edge",
    tags: ["flat section", "close turns"],
    design: { coil: { conductor: rectBar(1.5, 12), winding: spiral(40, 8, 2.2) }, drive: amps(2000, 120) },
  },
  {
    id: "spiral-recttube-uneven",
    tags: ["uneven pitch"],
    design: {
      coil: { conductor: rectTube(6, 8, 1), winding: spiral(40, 5, [7, 8, 10, 12]) },
      drive: amps(15_000, 400),
    },
  },
  {
    id: "layers-tube",
    tags: [],
    design: {
      coil: { conductor: tube(6, 1), winding: layers(60, [4, 2], [8, 7.5]) },
      drive: amps(9000, 250),
      strayPointsMm: [[0, 60], far],
    },
  },
  {
    id: "layers-winding-mains",
    tags: ["close turns"],
    design: {
      coil: { conductor: rectBar(5, 3), winding: layers(90, [6, 3], [3.3, 5.5]) },
      drive: volts(50, 2),
    },
  },
  {
    id: "layers-wire-20k",
    tags: ["many turns"],
    design: { coil: { conductor: bar(1), winding: layers(30, [8, 4], [1.2, 1.3]) }, drive: amps(20_000, 5) },
  },
  {
    id: "layers-recttube",
    tags: ["leads"],
    design: {
      coil: {
        conductor: rectTube(8, 10, 1.5),
        winding: layers(120, [3, 2], [12, 11]),
        leads: { lengthMm: 250, spacingMm: 24 },
      },
      drive: amps(1000, 900),
    },
  },
  {
    id: "layers-tenth-gaps",
    tags: ["close turns", "close nesting"],
    design: {
      coil: { conductor: bar(4), winding: layers(40, [4, 2], [4.1, 4.1]) },
      drive: amps(30_000, 100),
    },
  },
  {
    id: "cone-tube",
    tags: ["ci"],
    design: {
      coil: { conductor: tube(6, 0.8), winding: cone(70, 34, 5, 8) },
      drive: amps(40_000, 200),
      strayPointsMm: [[0, 30]],
    },
  },
  {
    id: "cone-rectbar",
    tags: ["uneven pitch"],
    design: {
      coil: { conductor: rectBar(5, 5), winding: cone(40, 80, 5, [6, 7, 8, 9]) },
      drive: amps(5000, 300),
    },
  },
  {
    id: "cone-wire-200",
    tags: [],
    design: { coil: { conductor: bar(3), winding: cone(60, 30, 6, 3.4) }, drive: amps(200, 50) },
  },
  {
    id: "cone-recttube",
    tags: [],
    design: {
      coil: { conductor: rectTube(6, 8, 1.2), winding: cone(90, 60, 4, 11) },
      drive: amps(12_000, 500),
    },
  },
  {
    id: "rings-double-pancake",
    tags: ["close nesting", "close turns"],
    design: {
      coil: {
        conductor: bar(5),
        winding: rings([
          ...[0, 1, 2, 3].map((k) => [20 + 5.4 * k, -2.7] as const),
          ...[0, 1, 2, 3].map((k) => [20 + 5.4 * k, 2.7] as const),
        ]),
      },
      drive: amps(15_000, 150),
    },
  },
  {
    id: "rings-hexagonal",
    tags: ["close nesting", "close turns"],
    design: {
      coil: {
        conductor: tube(6, 1),
        winding: rings([
          [30, -6.2],
          [30, 0],
          [30, 6.2],
          [35.4, -3.1],
          [35.4, 3.1],
          [40.8, 0],
        ]),
      },
      drive: amps(12_000, 200),
    },
  },
  {
    id: "rings-rect-nest",
    tags: ["close nesting", "close turns"],
    design: {
      coil: {
        conductor: rectTube(6, 6, 1),
        winding: rings([
          [30, -3.2],
          [30, 3.2],
          [36.3, -3.2],
          [36.3, 3.2],
          [42.6, 0],
        ]),
      },
      drive: amps(10_000, 200),
    },
  },
  {
    id: "rings-opposed-pair",
    tags: ["no net dipole", "ci"],
    design: {
      coil: {
        conductor: tube(8, 1),
        winding: rings(
          [
            [40, -20],
            [40, 20],
          ],
          [1, -1],
        ),
      },
      drive: amps(10_000, 400),
      strayPointsMm: [
        [0, 0],
        [0, 150],
        [800, 0],
      ],
    },
  },
  {
    id: "rings-opposed-inner",
    tags: ["no net dipole"],
    design: {
      coil: {
        conductor: bar(4),
        winding: rings(
          [
            [30, -8],
            [30, -2.7],
            [30, 2.7],
            [30, 8],
            [60, 0],
          ],
          [1, 1, 1, 1, -1],
        ),
      },
      drive: amps(30_000, 150),
      strayPointsMm: [
        [0, 0],
        [0, 400],
        [500, 500],
      ],
    },
  },
  {
    id: "strands-turn-about",
    tags: [],
    design: {
      coil: {
        conductor: bar(4),
        winding: helix(50, 8, 5),
        strands: [
          [0, 2, 4, 6],
          [1, 3, 5, 7],
        ],
      },
      drive: amps(3000, 300),
    },
  },
  {
    id: "strands-layers",
    tags: [],
    design: {
      coil: {
        conductor: rectBar(3, 5),
        winding: layers(60, [3, 2], [6, 4]),
        strands: [
          [0, 1, 2],
          [3, 4, 5],
        ],
      },
      drive: volts(10_000, 8),
    },
  },
];
