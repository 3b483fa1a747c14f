/** What the grids solved so far say, while the next one is at work: the digits that hold, and how far they are to be trusted. */

import type { Job } from "../../../api/contract/job.ts";
import { plain, plainFigure } from "../../../api/format/figures.ts";

/** The first grid alone tells no bar; over the battery of designs it was never further off than this, percent. */
const firstGrid = 1;

export function FirstDigits({ digits }: { readonly digits: NonNullable<Job["firstDigits"]> }) {
  const { emptyOhm, emptyH, loadedOhm, loadedH, withinPercent } = digits;
  const within = withinPercent ?? firstGrid;
  const places = Math.min(6, Math.max(3, 1 + Math.ceil(-Math.log10(within / 100))));
  const say = (ohm: number, henry: number): string =>
    `R ${plainFigure(ohm, "Ω", places)}, L ${plainFigure(henry, "H", places)}`;
  return (
    <p class="key-figures">
      {loadedOhm !== null && loadedH !== null && `Loaded: ${say(loadedOhm, loadedH)}. `}
      Empty: {say(emptyOhm, emptyH)}. Within {withinPercent === null ? "about " : ""}
      {plain(within, 2)} % so far.
    </p>
  );
}
