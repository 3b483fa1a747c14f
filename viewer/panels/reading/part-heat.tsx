/** One part: its power, its surface, and where its heat sits, in words, by depth and by height. */
import { decimalsFor, homelyUnit, percent, plain, prefixed, type Unit } from "../../../api/format/figures.ts";
import { heatWords } from "../../../api/format/heat-words.ts";
import { printable } from "../../../api/format/sentence.ts";
import type { Part } from "../../../meshes/design.ts";
import type { DepthShare, PartResult, Uncertain } from "../../../meshes/result.ts";
import { Cautions } from "./cautions.tsx";
import { Figure } from "./figure.tsx";

export interface PartHeatProps {
  readonly part: PartResult;
  /** The part as designed. */
  readonly shape: Part | undefined;
  readonly cautions: readonly string[];
}

export function PartHeat({ part, shape, cautions }: PartHeatProps) {
  const name = printable(part.name) || "part";
  return (
    <section aria-label={`Part: ${name}`}>
      <h2>{name}</h2>
      {part.powerW.value === 0 ? <p>Takes no heat.</p> : <Heated part={part} shape={shape} />}
      <Cautions cautions={cautions} />
    </section>
  );
}

const perArea: Unit = { factor: 1e4, symbol: "W/cm²" };
const perVolume: Unit = { factor: 1e6, symbol: "W/cm³" };

function Heated({ part, shape }: Pick<PartHeatProps, "part" | "shape">) {
  const { short } = heatWords(part, shape);
  const lines: readonly (readonly [string, Uncertain, Unit, string])[] = [
    ["power", part.powerW, prefixed("W", [part.powerW.value]), ""],
    ["over its whole surface", part.surfaceWPerM2, homelyUnit(perArea, [part.surfaceWPerM2.value]), ""],
    ["field at its surface, H", part.surfaceHAPerM, prefixed("A/m", [part.surfaceHAPerM.value]), ""],
    ["hottest spot", part.peakWPerM3, homelyUnit(perVolume, [part.peakWPerM3.value]), spot(part.hotSpotMm)],
  ];
  return (
    <>
      <p class="reading-heat">{sentence(short)}</p>
      <table class="reading-list">
        <caption class="unseen">Figures of the part</caption>
        <tbody>
          {lines.map(([words, of, unit, where]) => (
            <tr key={words}>
              <th scope="row">{words}</th>
              <td>
                <Figure of={of} unit={unit} />
                {where !== "" && <span class="reading-where">{where}</span>}
              </td>
            </tr>
          ))}
          {part.skinDepthMm !== null && (
            <tr>
              <th scope="row">skin depth</th>
              <td>{plain(part.skinDepthMm, 3)} mm</td>
            </tr>
          )}
        </tbody>
      </table>
      <Depths part={part} />
      <Slices shares={part.sliceShares} />
    </>
  );
}

const sentence = (words: string): string => `${words.charAt(0).toUpperCase()}${words.slice(1)}.`;

function spot(at: readonly number[] | null): string {
  if (at === null) return "";
  const decimals = decimalsFor(at, 4);
  const [r, z] = at.map((mm) => String(Number(mm.toFixed(decimals))).replace("-", "−"));
  return `at r ${r}, z ${z} mm`;
}

/** How much of the heat lies within some depths of each surface. */
function Depths({ part }: { readonly part: PartResult }) {
  const columns: readonly (readonly [string, readonly DepthShare[]])[] = [
    ["any surface", part.depthShares ?? []] as const,
    ["outer side", (part.boreDepthShares === null ? null : part.sideDepthShares) ?? []] as const,
    ["bore", part.boreDepthShares ?? []] as const,
  ].filter(([, shares]) => shares.length > 0);
  if (columns.length === 0) return null;
  return (
    <table class="reading-grid">
      <caption>Heat within a depth of</caption>
      <thead>
        <tr>
          <td />
          {columns.map(([words]) => (
            <th key={words} scope="col">
              {words}
            </th>
          ))}
        </tr>
      </thead>
      <tbody>
        {columns[0]![1].map(({ depthMm }, k) => (
          <tr key={depthMm}>
            <th scope="row">{plain(depthMm, 3)} mm</th>
            {columns.map(([words, shares]) => (
              <td key={words}>{percent(shares[k]?.share ?? 0)}</td>
            ))}
          </tr>
        ))}
      </tbody>
    </table>
  );
}

/** Eight bars, top slice first, as the part stands. */
function Slices({ shares }: { readonly shares: readonly number[] }) {
  const largest = Math.max(...shares);
  if (largest <= 0) return null;
  return (
    <table class="reading-slices">
      <caption>Heat in eight slices of equal height, the top one first</caption>
      <tbody>
        {[...shares].reverse().map((share, k) => (
          <tr key={k}>
            <th scope="row">
              {k === 0 ? (
                "top"
              ) : k === shares.length - 1 ? (
                "bottom"
              ) : (
                <span class="unseen">slice {k + 1}</span>
              )}
            </th>
            <td>{percent(share)}</td>
            <td aria-hidden="true">
              <span class="slice" style={{ width: `${(100 * share) / largest}%` }} />
            </td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}
