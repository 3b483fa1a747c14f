/** Checks that a design document can say run through the same door as everybody: check, predict, read the result document. */
import { checkDesign } from "../meshes/check.ts";
import { predict } from "../meshes/predict.ts";
import type { Result } from "../meshes/result.ts";
import type { Constants } from "./check.ts";

/** The result document of a design. */
export function resultOf(design: unknown): Result {
  return predict(checkDesign(design)).result;
}

/** What a coil of rings is made of: lengths in mm, one resistivity, one frequency, 1 A. */
export interface Rings {
  readonly centresMm: readonly (readonly [number, number])[];
  readonly sense?: readonly (1 | -1)[];
  readonly diameterMm: number;
  /** Wall of a tube; absent for a bar. */
  readonly wallMm?: number;
  readonly resistivityOhmM: number;
  readonly frequencyHz: number;
  readonly accuracyPercent?: number;
}

/** The design document of such a coil, its constants spoiled as asked. */
export function ringsDesign(rings: Rings, constants: Constants): unknown {
  const { wallMm, sense } = rings;
  const scale = constants.length;
  return {
    coil: {
      conductor: {
        section: wallMm === undefined ? "roundBar" : "roundTube",
        outsideDiameterMm: rings.diameterMm * scale,
        ...(wallMm === undefined ? {} : { wallMm: wallMm * scale }),
        material: { resistivityOhmM: rings.resistivityOhmM / constants.conductivity },
      },
      winding: {
        form: "rings",
        centresMm: rings.centresMm.map((p) => p.map((x) => x * scale)),
        ...(sense === undefined ? {} : { sense }),
      },
    },
    drive: { frequencyHz: rings.frequencyHz, currentA: 1 },
    accuracyPercent: rings.accuracyPercent ?? 0.1,
  };
}

/** What of a design can be spoiled. */
interface Spoilable {
  readonly coil: { readonly conductor: { readonly material: { resistivityOhmM: number } } };
  readonly parts: readonly { readonly material: { resistivityOhmM: number } }[];
}

/** A copy of the design with copper's and parts' conductivities spoiled as asked. */
export function spoiltDesign<T extends Spoilable>(design: T, constants: Constants): T {
  const copy = structuredClone(design);
  copy.coil.conductor.material.resistivityOhmM /= constants.conductivity;
  for (const part of copy.parts) part.material.resistivityOhmM /= constants.conductivity;
  return copy;
}
