/** What the picture shows in a sentence, and which power density each colour stands for. */
import { useId } from "preact/hooks";
import { heatColour } from "../../../api/format/colour.ts";
import { homelyUnit, plain, plainFigure } from "../../../api/format/figures.ts";
import { type HeatScale, marks, position } from "../../../api/format/heat-scale.ts";
import type { Result } from "../../../meshes/result.ts";
import { densityWords } from "./seen.ts";
import "./heat.css";

export interface LegendProps {
  /** null: nothing is heated. */
  readonly scale: HeatScale | null;
  readonly result: Result;
}

/** Colours the bar is blended from, and its size in its own units. */
const stops = 48;
const bar = { length: 480, height: 14, left: 14 };
const width = bar.length + 2 * bar.left;

export function Legend({ scale, result }: LegendProps) {
  return (
    <figure class="heat-legend" aria-label="Legend of the heat">
      <p>{shownWords(result)}</p>
      {scale === null ? <p>Nothing here takes heat.</p> : <Bar scale={scale} />}
    </figure>
  );
}

/** "Heat in coil and part at 590 A, 8 kHz; cut open along the axis." */
function shownWords({ power, parts, design }: Result): string {
  const what =
    parts.length === 0 ? "the coil, without a part" : `coil and ${parts.length === 1 ? "part" : "parts"}`;
  const drive = `${plainFigure(power.currentA.value, "A", 3)}, ${plainFigure(design.drive.frequencyHz, "Hz", 6)}`;
  return `Heat in ${what} at ${drive}; cut open along the axis.`;
}

function Bar({ scale }: { readonly scale: HeatScale }) {
  const unit = homelyUnit({ factor: 1e6, symbol: "W/cm³" }, [scale.high]);
  const x = (density: number): number => bar.left + bar.length * position(scale, density);
  const ramp = useId();
  const label = `Colours from dark violet, ${densityWords(scale.low)}, to pale yellow, ${densityWords(scale.high)}`;
  return (
    <>
      <svg viewBox={`0 0 ${width} 40`} role="img" aria-label={label}>
        <defs>
          <linearGradient id={ramp}>
            {Array.from({ length: stops + 1 }, (_, k) => (
              <stop key={k} offset={k / stops} stop-color={heatColour(k / stops)} />
            ))}
          </linearGradient>
        </defs>
        <rect x={bar.left} width={bar.length} height={bar.height} fill={`url(#${ramp})`} />
        {marks(scale).map((density) => (
          <g key={density}>
            <path class="heat-mark" d={`M${x(density)} ${bar.height}v5`} />
            <text x={x(density)} y={bar.height + 18} text-anchor="middle">
              {plain(density / unit.factor, 3)}
            </text>
          </g>
        ))}
      </svg>
      <figcaption>
        Power density, {unit.symbol}, {scale.kind === "log" ? "logarithmic" : "linear from zero"}. The
        brightest colour stands for {densityWords(scale.high)} and above
        {scale.kind === "log" ? `, the darkest for ${densityWords(scale.low)} and below.` : "."}
      </figcaption>
    </>
  );
}
