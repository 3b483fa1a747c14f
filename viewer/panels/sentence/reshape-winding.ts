/** Another form for the winding: what makes sense in both is carried over, the rest starts where copper keeps clear of copper. */
import { sketch } from "../../../meshes/sketch.ts";
import { withValueAt } from "../../pointer.ts";
import { bestOf, type Keyed, listAt, numberOf, objectAt, roundly, tidy } from "./document.ts";

export const windingForms = ["helix", "spiral", "layers", "cone", "rings"] as const;
export type WindingForm = (typeof windingForms)[number];

/** What every form has in some way, mm. */
interface Measures {
  readonly bore: number;
  readonly turns: number;
  readonly pitch: unknown;
  readonly centre: unknown;
  /** Of the conductor's section. */
  readonly radial: number;
  readonly axial: number;
  readonly centres: readonly (readonly [number, number])[];
}

/** The document with its winding in another form. */
export function reshapeWinding(document: unknown, form: WindingForm): unknown {
  const measures = measuresOf(document);
  return bestOf(
    windingsOf(form, measures).map((winding) => {
      const wound = withValueAt(document, "/coil/winding", winding);
      return withValueAt(wound, "/coil/strands", strandsFor(document, turnsIn(winding)));
    }),
  );
}

function measuresOf(document: unknown): Measures {
  const winding = objectAt(document, "/coil/winding");
  const conductor = objectAt(document, "/coil/conductor");
  const radial = numberOf(conductor, "outsideDiameterMm", numberOf(conductor, "radialWidthMm", 8));
  const axial = numberOf(conductor, "outsideDiameterMm", numberOf(conductor, "axialHeightMm", 8));
  const turns = sketch(document).copper?.turns ?? [];
  const centres = turns.map(({ r, z }) => [tidy(r), tidy(z)] as const);
  const rest = { radial, axial, centres };
  switch (winding["form"]) {
    case "spiral":
      return {
        ...rest,
        bore: numberOf(winding, "innerDiameterMm", 50),
        turns: numberOf(winding, "turns", 1),
        pitch: winding["pitchMm"],
        centre: winding["zMm"],
      };
    case "rings":
      return { ...rest, ...measuresOfRings(centres, radial) };
    default:
      return {
        ...rest,
        // A cone's wider end: what stands inside a cone stands clear there.
        bore: Math.max(numberOf(winding, "boreDiameterMm", 50), numberOf(winding, "topBoreDiameterMm", 0)),
        turns: numberOf(winding, "turns", numberOf(winding, "turnsPerLayer", 1)),
        pitch: winding["pitchMm"],
        centre: winding["centreZMm"],
      };
  }
}

function measuresOfRings(centres: Measures["centres"], radial: number) {
  if (centres.length === 0) return { bore: 50, turns: 1, pitch: undefined, centre: undefined };
  const z = centres.map((c) => c[1]);
  const [low, high] = [Math.min(...z), Math.max(...z)];
  const steps = centres.length - 1;
  return {
    bore: tidy(2 * Math.min(...centres.map((c) => c[0])) - radial),
    turns: centres.length,
    pitch: steps === 0 ? undefined : tidy((high - low) / steps),
    centre: tidy((low + high) / 2) === 0 ? undefined : tidy((low + high) / 2),
  };
}

/** The windings of a form to try, the natural one first. */
function windingsOf(form: WindingForm, m: Measures): Keyed[] {
  const helix = {
    boreDiameterMm: m.bore,
    turns: m.turns,
    ...given("pitchMm", pitchOver(m, m.axial)),
    ...given("centreZMm", m.centre),
  };
  switch (form) {
    case "helix":
      return [{ form, ...helix }];
    case "spiral":
      return [
        {
          form,
          innerDiameterMm: m.bore,
          turns: m.turns,
          ...given("pitchMm", pitchOver(m, m.radial)),
          ...given("zMm", m.centre),
        },
      ];
    case "cone":
      return (m.turns > 1 ? [1.25, 0.8, 1] : [1]).map((wider) => ({
        form,
        ...helix,
        topBoreDiameterMm: wider === 1 ? m.bore : roundly(wider * m.bore),
      }));
    case "layers": {
      const { turns, ...others } = helix;
      const layerPitchMm = clearOf(m.radial);
      return [2, 1].map((layers) => ({ form, ...others, turnsPerLayer: turns, layers, layerPitchMm }));
    }
    case "rings":
      return [{ form, centresMm: m.centres.length > 0 ? m.centres : [[m.bore / 2 + m.radial, 0]] }];
  }
}

const given = (key: string, value: unknown): Keyed => (value === undefined ? {} : { [key]: value });

/** The pitch as it is where it clears a section of that side and fits the turns, else one that clears it. */
function pitchOver({ pitch, turns }: Measures, side: number): unknown {
  if (turns === 1) return typeof pitch === "number" ? Math.max(pitch, clearOf(side)) : undefined;
  const list = Array.isArray(pitch) ? pitch : [pitch];
  const clears = list.every((p) => typeof p === "number" && p > 1.001 * side);
  return clears && (!Array.isArray(pitch) || pitch.length === turns - 1) ? pitch : clearOf(side);
}

/** A pitch a quarter above the section, to the next half of a millimetre where that is fine enough. */
const clearOf = (side: number): number => (side > 2 ? Math.ceil(2.5 * side) / 2 : roundly(1.3 * side));

function turnsIn(winding: Keyed): number {
  if (Array.isArray(winding["centresMm"])) return winding["centresMm"].length;
  return (
    numberOf(winding, "turns", 1) * numberOf(winding, "layers", 1) * numberOf(winding, "turnsPerLayer", 1)
  );
}

/** The strands as they are where the turns are as many as before, else as many strands, turn about. */
function strandsFor(document: unknown, turns: number): unknown {
  const strands = listAt(document, "/coil/strands");
  if (strands.length === 0 || strands.flat().length === turns) return objectAt(document, "/coil")["strands"];
  return strands.length <= turns ? turnAbout(turns, strands.length) : undefined;
}

/** Turn k in strand k mod n. */
export function turnAbout(turns: number, strands: number): number[][] {
  return Array.from({ length: strands }, (_, s) =>
    Array.from({ length: Math.ceil((turns - s) / strands) }, (_, i) => s + i * strands),
  );
}
