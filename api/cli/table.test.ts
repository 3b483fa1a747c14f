import { describe, expect, it } from "vitest";
import type { Conductor, Winding } from "../../meshes/design.ts";
import type { PartResult, Result, Uncertain } from "../../meshes/result.ts";
import { coilSentence, driveSentence, printable } from "../format/sentence.ts";
import { captionOf } from "./caption.ts";
import { lineWidth } from "./layout.ts";
import { renderTable } from "./table.ts";

const q = (value: number, plusMinus = Math.abs(value) / 1000): Uncertain => ({ value, plusMinus });

const pin: PartResult = {
  name: "pin",
  powerW: q(3892.4, 3),
  skinDepthMm: 0.32487,
  surfaceWPerM2: q(393327, 300),
  surfaceHAPerM: q(22702, 12),
  peakWPerM3: q(3.437e9, 2.4e7),
  hotSpotMm: [15, 0.4],
  sliceShares: [0.053, 0.113, 0.157, 0.177, 0.177, 0.157, 0.113, 0.053],
  depthShares: [
    { depthMm: 0.162, share: 0.629 },
    { depthMm: 0.325, share: 0.86 },
    { depthMm: 0.65, share: 0.978 },
  ],
  sideDepthShares: null,
  boreDepthShares: null,
};

const terminal = (r: number, l: number, x: number) => ({
  resistanceOhm: q(r),
  inductanceH: q(l, l / 1e4),
  reactanceOhm: q(x, x / 1e4),
  q: q(x / r),
});

const result: Result = {
  design: {
    format: "emberturn/1",
    name: "Pin-end hardening",
    coil: {
      conductor: {
        section: "roundTube",
        outsideDiameterMm: 8,
        wallMm: 1,
        material: "copper",
        temperatureC: 20,
      },
      winding: { form: "helix", boreDiameterMm: 50, turns: 7, pitchMm: 10.5, centreZMm: 0 },
    },
    parts: [],
    guides: [],
    strayPointsMm: [],
    drive: { frequencyHz: 10000, currentA: 400 },
    accuracyPercent: 0.2,
  },
  empty: terminal(2.538e-3, 1.3214e-6, 0.083023),
  loaded: terminal(0.02692, 1.4614e-6, 0.091822),
  power: {
    totalW: q(4307.2, 3.2),
    coilW: q(414.79, 0.12),
    heatedW: q(3892.4, 3),
    otherW: q(0, 0),
    efficiency: q(0.9037, 0.0003),
    currentA: q(400, 0),
    coilVoltageV: q(38.28, 0.01),
    reactiveVar: q(14690, 4),
    resonantCapacitanceF: q(1.733e-4, 5e-8),
  },
  turns: Array.from({ length: 7 }, (_, k) => ({ rMm: 29, zMm: 10.5 * (k - 3), powerW: 51 + (k - 3) ** 2 })),
  parts: [pin],
  strayField: [{ rMm: 300, zMm: 0, fluxDensityT: q(2.715e-5, 2e-8) }],
  leads: { resistanceOhm: 3.1e-4, inductanceH: 1.1e-7 },
  copper: { lengthMm: 1276, helixExtraOhm: 5e-6, helixExtraH: 2e-10 },
  numerics: {
    unknowns: 24276,
    grids: 3,
    iterations: 3,
    seconds: 1.62,
    peakMemoryBytes: 3.1e8,
    powerBalance: 4e-13,
    accuracyMet: true,
  },
  cautions: [
    "Every turn is a closed ring at its centre line: pitch slope, cross-overs and the lead exit are not modelled.",
  ],
};

const text = (r: Result): string => renderTable(r, { colour: false });

describe("the people's table", () => {
  it("keeps to 80 columns, without blanks at line ends", () => {
    for (const line of text(result).split("\n")) {
      expect(line.length).toBeLessThanOrEqual(lineWidth);
      expect(line).toBe(line.trimEnd());
    }
  });

  it("keeps to 80 columns with names of 200 characters, and names what has no name", () => {
    const long = "a flange forged from the offcuts of two older ones ".repeat(4).trim();
    const named = (name: string): string =>
      text({
        ...result,
        design: { ...result.design, name },
        parts: result.parts.map((part) => ({ ...part, name })),
      });
    for (const line of named(long).split("\n")) expect(line.length).toBeLessThanOrEqual(lineWidth);
    expect(named(long).replace(/\s+/g, " ")).toContain(`PART: ${long}`);
    expect(named("")).toMatch(/^unnamed design\n/);
    expect(named("")).toContain("\nPART: part\n");
  });

  it("keeps to 80 columns for instrument currents and for giant ones", () => {
    for (const k of [1e-10, 1e10]) {
      const times = (u: { value: number; plusMinus: number }) => ({
        value: k * u.value,
        plusMinus: k * u.plusMinus,
      });
      const odd = text({
        ...result,
        turns: result.turns.map((turn) => ({ ...turn, powerW: k * turn.powerW })),
        parts: result.parts.map((part) => ({
          ...part,
          powerW: times(part.powerW),
          surfaceWPerM2: times(part.surfaceWPerM2),
          peakWPerM3: times(part.peakWPerM3),
        })),
      });
      for (const line of odd.split("\n")) expect(line.length).toBeLessThanOrEqual(lineWidth);
      expect(odd).toMatch(k < 1 ? /power in the copper of each, nW/ : /power in the copper of each, [GT]W/);
      expect(odd).toMatch(k < 1 ? /[nµ]W\/cm²/ : /[GT]W\/cm²/);
    }
  });

  it("sets empty beside loaded in one unit, decimal points under each other", () => {
    const lines = text(result).split("\n");
    const row = lines.find((line) => line.includes("resistance R"))!;
    expect(row).toMatch(/2\.5380 +± 0\.0026 +26\.920 +± 0\.027 +mΩ$/);
    const points = ["resistance R", "inductance L", "reactance X"].map((name) =>
      lines.find((line) => line.includes(name))!.indexOf("."),
    );
    expect(new Set(points).size).toBe(1);
  });

  it("tells powers, supply, part, turns, stray field, leads, copper, cautions and safety", () => {
    const running = text(result).replace(/\s+/g, " ");
    for (const phrase of [
      "7 turns of round copper tube 8 mm, wall 1 mm, on a bore of 50 mm at a pitch of 10.5 mm; driven with",
      "400 A at 10 kHz",
      /into heated parts +3\.892 +± 0\.003 +kW +90\.4 %/,
      /efficiency +90\.37 ± 0\.03 %/,
      /coil current +400 A/,
      /reactive power +14\.690 ± 0\.004 kvar/,
      /capacitance for resonance +173\.30 ± 0\.05 µF/,
      /over its whole surface +39\.33 ± 0\.03 W\/cm²/,
      /hottest spot +3437 ± 24 W\/cm³ at r 15, z 0\.4 mm/,
      "62.9 % within 0.162 mm, 86.0 % within 0.325 mm, 97.8 % within 0.65 mm of the surface",
      "63 % within 0.16 mm of the surface, hottest at mid-height. 62.9 %",
      /6 +29\.00 +31\.50 +60\.00/,
      /27\.150 +± 0\.020 +µT/,
      "Copper to cut: 1.276 m",
      "310 µΩ, 110 nH",
      "- Every turn is a closed ring",
      "the asked 0.2 % holds",
      "Follow local codes; have a qualified person check",
    ]) {
      expect(running).toMatch(phrase);
    }
  });

  it("draws the slices top first, the largest longest", () => {
    const bars = text(result)
      .split("\n")
      .filter((line) => line.includes("█"))
      .map((line) => line.match(/█/g)!.length);
    expect(bars).toHaveLength(8);
    expect(bars[0]).toBeLessThan(bars[3]!);
  });

  it("leaves out what is not there: no part, no leads, no stray points", () => {
    const bare = text({ ...result, loaded: null, parts: [], strayField: [], leads: null, cautions: [] });
    expect(bare).not.toMatch(/loaded|PART|STRAY|CAUTIONS|NaN|undefined|null/);
    expect(bare).toContain("No leads in the design.");
  });

  it("says when the accuracy was not reached and when a part takes no heat", () => {
    const short = text({
      ...result,
      numerics: { ...result.numerics, accuracyMet: false },
      parts: [{ ...pin, powerW: q(0, 0), skinDepthMm: null, hotSpotMm: null, depthShares: null }],
    });
    expect(short).toMatch(/was\s+NOT\s+reached/);
    expect(short).toContain("takes no heat");
  });

  it("stands eight powers in a line when there are many turns", () => {
    const turns = Array.from({ length: 20 }, () => ({ rMm: 1, zMm: 1, powerW: 1234.5 }));
    expect(text({ ...result, turns })).toMatch(/16 to 19 +1235( +1235){3}\n/);
  });

  it("is plain without colour and bold with it", () => {
    const esc = String.fromCharCode(27);
    expect(text(result)).not.toContain(esc);
    expect(renderTable(result, { colour: true })).toContain(`${esc}[1m`);
  });
});

describe("the design in a sentence", () => {
  const conductor: Conductor = {
    section: "rectBar",
    radialWidthMm: 3,
    axialHeightMm: 8,
    material: { resistivityOhmM: 2e-8 },
    temperatureC: 20,
  };
  const coil = (winding: Winding, strands?: number[][]): string =>
    coilSentence({ conductor, winding, ...(strands === undefined ? {} : { strands }) });

  it("knows every winding form", () => {
    expect(coil({ form: "spiral", innerDiameterMm: 30, turns: 4, pitchMm: [5, 6, 7], zMm: 0 })).toBe(
      "4 turns of rectangular bar 3 × 8 mm, flat, around a clear 30 mm at an uneven pitch",
    );
    const layers = { form: "layers", boreDiameterMm: 40, turnsPerLayer: 6, layers: 2, pitchMm: 9 } as const;
    expect(coil({ ...layers, layerPitchMm: 5, centreZMm: 0 })).toBe(
      "2 layers of 6 turns of rectangular bar 3 × 8 mm, on a bore of 40 mm at a pitch of 9 mm",
    );
    const cone = { form: "cone", boreDiameterMm: 40, topBoreDiameterMm: 60, turns: 3, pitchMm: 9 } as const;
    expect(coil({ ...cone, centreZMm: 0 }, [[0, 1], [2]])).toBe(
      "3 turns of rectangular bar 3 × 8 mm, on a cone of 40 mm bore below and 60 mm above at a pitch of 9 mm, 2 strands in parallel",
    );
    expect(coil({ form: "rings", centresMm: [[30, 0]] })).toBe("1 ring of rectangular bar 3 × 8 mm");
    expect(coil({ form: "helix", boreDiameterMm: 40, turns: 1, pitchMm: 9, centreZMm: 0 })).toBe(
      "1 turn of rectangular bar 3 × 8 mm, on a bore of 40 mm",
    );
  });

  it("knows every drive", () => {
    expect(driveSentence({ frequencyHz: 400000, partPowerW: 4000 })).toBe("4 kW into the parts at 400 kHz");
    expect(driveSentence({ frequencyHz: 50, coilVoltageV: 150 })).toBe("150 V across the coil at 50 Hz");
  });

  it("prints names without what a terminal would obey", () => {
    expect(printable("pin\u001b[31m\u0007\nend ")).toBe("pin [31m end");
  });

  it("becomes the picture's caption with the key figures", () => {
    const caption = captionOf(result);
    expect(caption.title).toBe("Pin-end hardening");
    expect(caption.lines[1]).toBe(
      "R 26.920 ± 0.027 mΩ, L 1.46140 ± 0.00015 µH; 3.892 ± 0.003 kW into heated parts, efficiency 90.37 ± 0.03 %",
    );
    expect(caption.skinDepth).toBeCloseTo(3.2487e-4, 9);
  });
});
