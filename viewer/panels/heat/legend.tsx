/** What the picture shows in a sentence, and which power density each colour stands for. */
import { useId, useRef } from "preact/hooks";
import { heatColour } from "../../../api/format/colour.ts";
import { homelyUnit, plain, plainFigure } from "../../../api/format/figures.ts";
import { type HeatScale, marks, position } from "../../../api/format/heat-scale.ts";
import type { Result } from "../../../meshes/result.ts";
import { densityWords } from "./seen.ts";
import { useSize } from "./size.ts";
import "./heat.css";

export interface LegendProps {
  /** null: nothing is heated. */
  readonly scale: HeatScale | null;
  readonly result: Result;
}

/** Colours the bar is blended from, its size, and the room beside it for half a number, px. */
const stops = 48;
const bar = { most: 560, height: 14, side: 16 };
/** Numbers nearer to each other than this run together, px. */
const apart = 34;

/** The marks that have room; where not all have, the powers of ten or every other. */
function spaced(all: readonly number[], x: (density: number) => number): readonly number[] {
  const gaps = all.slice(1).map((density, k) => x(density) - x(all[k]!));
  if (all.length < 3 || Math.min(...gaps) >= apart) return all;
  const tens = all.filter(
    (density) => Math.abs(Math.log10(density) - Math.round(Math.log10(density))) < 1e-6,
  );
  return all[0]! > 0 && tens.length > 1 ? tens : all.filter((_, k) => k % 2 === 0);
}

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
    parts.length === 0 ? "the coil, without a part," : `coil and ${parts.length === 1 ? "part" : "parts"}`;
  const drive = `${plainFigure(power.currentA.value, "A", 3)}, ${plainFigure(design.drive.frequencyHz, "Hz", 6)}`;
  return `Heat in ${what} at ${drive}; cut open along the axis.`;
}

function Bar({ scale }: { readonly scale: HeatScale }) {
  const drawing = useRef<SVGSVGElement>(null);
  const room = useSize(drawing).width;
  const unit = homelyUnit({ factor: 1e6, symbol: "W/cm³" }, [scale.high]);
  const width = Math.max(160, Math.min(bar.most, room));
  const length = width - 2 * bar.side;
  const x = (density: number): number => bar.side + length * position(scale, density);
  const number = (density: number): string => plain(density / unit.factor, 3);
  const ramp = useId();
  const label = `Colours from dark violet, ${densityWords(scale.low)}, to pale yellow, ${densityWords(scale.high)}`;
  return (
    <>
      <svg ref={drawing} width={width} height={bar.height + 24} role="img" aria-label={label}>
        <defs>
          <linearGradient id={ramp}>
            {Array.from({ length: stops + 1 }, (_, k) => (
              <stop key={k} offset={k / stops} stop-color={heatColour(k / stops)} />
            ))}
          </linearGradient>
        </defs>
        <rect x={bar.side} width={length} height={bar.height} fill={`url(#${ramp})`} />
        {spaced(marks(scale), x).map((density) => (
          <g key={density}>
            <path class="heat-mark" d={`M${x(density)} ${bar.height}v5`} />
            <text x={x(density)} y={bar.height + 18} text-anchor="middle">
              {number(density)}
            </text>
          </g>
        ))}
      </svg>
      <figcaption>
        Power density, {unit.symbol}, {scale.kind === "log" ? "logarithmic" : "linear from zero"}; the
        brightest colour stands for {number(scale.high)} and above
        {scale.kind === "log" ? `, the darkest for ${number(scale.low)} and below` : ""}.
      </figcaption>
    </>
  );
}
