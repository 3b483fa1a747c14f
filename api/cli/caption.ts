/** The words of a heat picture, from a result. */
import type { Result } from "../../meshes/result.ts";
import { figure } from "../format/figures.ts";
import { coilSentence, driveSentence, printable } from "../format/sentence.ts";
import type { Caption } from "./picture.ts";

/** Title, the design in a sentence, and the figures asked for first. */
export function captionOf(result: Result): Caption {
  const { resistanceOhm, inductanceH } = result.loaded ?? result.empty;
  const { heatedW, efficiency } = result.power;
  const heat =
    heatedW.value === 0
      ? "nothing is heated"
      : `${figure(heatedW, "W")} into heated parts, efficiency ${figure(efficiency, { factor: 0.01, symbol: "%" })}`;
  const skins = result.parts.flatMap((part) => (part.skinDepthMm === null ? [] : [part.skinDepthMm / 1e3]));
  return {
    title: printable(result.design.name),
    lines: [
      `${coilSentence(result.design.coil)}; ${driveSentence(result.design.drive)}`,
      `R ${figure(resistanceOhm, "Ω")}, L ${figure(inductanceH, "H")}; ${heat}`,
    ],
    skinDepth: skins.length === 0 ? null : Math.min(...skins),
  };
}
