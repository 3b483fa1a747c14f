/** What is wrong with the coil by itself: copper across the axis, turns that touch, walls and gaps too fine to resolve. */
import type { Winding } from "./design.ts";
import type { Copper, Scale } from "./layout.ts";
import { boxDistance } from "./planar.ts";
import { type Fault, pointerTo } from "./refusal.ts";
import { figureBox, separation } from "./shapes.ts";
import { stepsOf } from "./windings.ts";
import { figure } from "./words.ts";

const CONDUCTOR = "/coil/conductor";
const WINDING = "/coil/winding";

/** All faults of the copper alone, `scale` of the whole arrangement. */
export function copperFaults(copper: Copper, scale: Scale): Fault[] {
  return [...sectionFaults(copper, scale), ...axisFaults(copper, scale), ...turnFaults(copper, scale)];
}

/** Words for a measure that is too fine beside the size of everything. */
export function tooFine(pointer: string, what: string, mm: number, scale: Scale): Fault {
  const detail = `${what} of ${figure(mm)} mm is too fine beside an arrangement ${figure(scale.size)} mm large`;
  return { pointer, detail, accepted: `at least ${figure(scale.finest)} mm` };
}

function sectionFaults({ section }: Copper, scale: Scale): Fault[] {
  const keys =
    section.kind === "round"
      ? ([["outsideDiameterMm", section.radialMm]] as const)
      : ([
          ["radialWidthMm", section.radialMm],
          ["axialHeightMm", section.axialMm],
        ] as const);
  const faults = keys
    .filter(([, mm]) => mm < scale.finest)
    .map(([key, mm]) => tooFine(pointerTo(CONDUCTOR, key), "a section", mm, scale));
  if (section.wallMm > 0 && section.wallMm < scale.finest) {
    faults.push(tooFine(pointerTo(CONDUCTOR, "wallMm"), "a wall", section.wallMm, scale));
  }
  return faults;
}

/** Copper has to stay on its side of the axis; only rings and a very fine bore can fail to. */
function axisFaults({ section, winding, turns }: Copper, scale: Scale): Fault[] {
  const half = section.radialMm / 2;
  if (winding.form !== "rings") {
    const key = winding.form === "spiral" ? "innerDiameterMm" : "boreDiameterMm";
    const bore = 2 * (Math.min(...turns.map((t) => t.r)) - half);
    const narrow =
      winding.form === "cone" && winding.topBoreDiameterMm < winding.boreDiameterMm
        ? "topBoreDiameterMm"
        : key;
    return bore / 2 < scale.finest ? [tooFine(pointerTo(WINDING, narrow), "a bore", bore, scale)] : [];
  }
  return turns.flatMap(({ r }, k) => {
    if (r - half >= scale.finest) return [];
    const detail =
      r - half <= 0
        ? `ring ${k} reaches ${r === half ? "to" : `${figure(half - r)} mm across`} the axis: its copper is ${section.radialMm} mm wide, its centre at r = ${r} mm`
        : `ring ${k} leaves only ${figure(r - half)} mm to the axis`;
    return [
      {
        pointer: pointerTo(WINDING, "centresMm", k),
        detail,
        accepted: `r above ${figure(half + scale.finest)}`,
      },
    ];
  });
}

function turnFaults(copper: Copper, scale: Scale): Fault[] {
  const { section, winding } = copper;
  switch (winding.form) {
    case "helix":
      return pitchFaults(winding.pitchMm, winding.turns, "pitchMm", "axial", section.axialMm, scale);
    case "spiral":
      return pitchFaults(winding.pitchMm, winding.turns, "pitchMm", "radial", section.radialMm, scale);
    case "layers":
      return [
        ...pitchFaults(winding.pitchMm, winding.turnsPerLayer, "pitchMm", "axial", section.axialMm, scale),
        ...pitchFaults(
          winding.layerPitchMm,
          winding.layers,
          "layerPitchMm",
          "radial",
          section.radialMm,
          scale,
        ),
      ];
    case "cone":
      return coneFaults(copper, winding, scale);
    case "rings":
      return ringFaults(copper, scale);
  }
}

/** A pitch must exceed the section along it, each entry of a list by itself. */
function pitchFaults(
  pitch: number | readonly number[] | undefined,
  turns: number,
  key: string,
  direction: "axial" | "radial",
  side: number,
  scale: Scale,
): Fault[] {
  const steps = typeof pitch === "number" ? stepsOf(pitch, turns).slice(0, 1) : stepsOf(pitch, turns);
  return steps.flatMap((p, i) => {
    if (p - side >= scale.finest) return [];
    const pointer = typeof pitch === "number" ? pointerTo(WINDING, key) : pointerTo(WINDING, key, i);
    const name = key === "layerPitchMm" ? "layers" : "turns";
    const accepted = p > side ? `at least ${atLeast(side + 1.01 * scale.finest)}` : `above ${side}`;
    return [{ pointer, detail: closeWords(p, side, direction, name), accepted }];
  });
}

/** Rounded up to five digits: what is shown is accepted, though the whole grows by it (hence 1.01 before). */
function atLeast(mm: number): string {
  const unit = 10 ** (Math.floor(Math.log10(mm)) - 4);
  return String(Number((Math.ceil(mm / unit) * unit).toPrecision(5)));
}

function closeWords(pitch: number, side: number, direction: string, name: string): string {
  const measure = `the conductor is ${side} mm in ${direction} direction`;
  if (pitch > side)
    return `a pitch of ${pitch} mm leaves ${figure(pitch - side)} mm between ${name}, too fine to resolve; ${measure}`;
  const how = pitch === side ? "touch" : `overlap by ${figure(side - pitch)} mm`;
  return `at a pitch of ${pitch} mm neighbouring ${name} ${how}: ${measure}`;
}

/** Neighbours of a cone lie askew, so their sections themselves are compared. */
function coneFaults(copper: Copper, winding: Extract<Winding, { form: "cone" }>, scale: Scale): Fault[] {
  const { figures, turns, section } = copper;
  const pitch = winding.pitchMm;
  const last = typeof pitch === "number" ? Math.min(1, turns.length - 1) : turns.length - 1;
  return Array.from({ length: last }, (_, k) => k).flatMap((k) => {
    const { overlap, gap } = separation(figures[k]!, figures[k + 1]!, scale.touch);
    if (gap >= scale.finest) return [];
    const pointer =
      typeof pitch === "number" ? pointerTo(WINDING, "pitchMm") : pointerTo(WINDING, "pitchMm", k);
    const how = overlap > 0 ? `overlap by ${figure(overlap)} mm` : gap > 0 ? "nearly touch" : "touch";
    const radial = Math.abs(turns[k + 1]!.r - turns[k]!.r);
    const least =
      section.kind === "rect" ? section.axialMm : Math.sqrt(Math.max(0, section.radialMm ** 2 - radial ** 2));
    const step = turns[k + 1]!.z - turns[k]!.z;
    const detail = `at a pitch of ${figure(step)} mm turns ${k} and ${k + 1} (counted from 0) ${how}`;
    return [{ pointer, detail, accepted: `above ${figure(least)}` }];
  });
}

function ringFaults({ figures }: Copper, scale: Scale): Fault[] {
  const boxes = figures.map(figureBox);
  return figures.flatMap((later, k) => {
    for (let i = 0; i < k; i++) {
      if (boxDistance(boxes[i]!, boxes[k]!) >= scale.finest) continue;
      const { overlap, gap } = separation(figures[i]!, later, scale.touch);
      if (gap >= scale.finest) continue;
      const how = overlap > 0 ? "overlaps" : gap > 0 ? "nearly touches" : "touches";
      const by = overlap > 0 ? ` by ${figure(overlap)} mm` : "";
      const detail = `ring ${k} ${how} ring ${i}${by} (rings counted from 0)`;
      return [
        {
          pointer: pointerTo(WINDING, "centresMm", k),
          detail,
          accepted: "copper that stands clear of all other copper",
        },
      ];
    }
    return [];
  });
}
