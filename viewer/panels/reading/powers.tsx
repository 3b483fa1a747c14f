/** Where the power goes, and what the supply sees. */
import { percent, prefixed, type Unit } from "../../../api/format/figures.ts";
import type { Power, Uncertain } from "../../../meshes/result.ts";
import { Figure } from "./figure.tsx";

export interface PowersProps {
  readonly power: Power;
  /** No part in the coil. */
  readonly bare: boolean;
}

export function Powers({ power, bare }: PowersProps) {
  return (
    <section aria-label="Power and supply">
      <h2>Power and supply</h2>
      {!bare && <Split power={power} />}
      <SplitTable power={power} bare={bare} />
      <Supply power={power} bare={bare} />
    </section>
  );
}

const kinds = [
  ["heatedW", "into the part", "heated"],
  ["coilW", "in the coil", "coil"],
  ["otherW", "elsewhere", "other"],
] as const;

/** The split as one bar, lengths in proportion; the table below says the same in figures. */
function Split({ power }: { readonly power: Power }) {
  const total = power.totalW.value;
  if (total <= 0) return null;
  const shares = kinds.map(([key, words, tone]) => ({ share: power[key].value / total, words, tone }));
  const label = shares.map(({ share, words }) => `${percent(share)} ${words}`).join(", ");
  return (
    <div class="split" role="img" aria-label={`Power: ${label}`}>
      {shares
        .filter(({ share }) => share > 0)
        .map(({ share, words, tone }) => (
          <span key={tone} class={`split-${tone}`} style={{ flexGrow: String(share) }}>
            {share > 0.28 ? `${percent(share)} ${words}` : share > 0.09 ? percent(share) : ""}
          </span>
        ))}
    </div>
  );
}

/** The row's unit, unless the quantity is so much smaller that its own reads better. */
const unitFor = ({ value }: Uncertain, column: Unit): Unit =>
  value !== 0 && Math.abs(value) * 1000 < column.factor ? prefixed("W", [value]) : column;

function SplitTable({ power, bare }: PowersProps) {
  const unit = prefixed("W", [power.totalW.value]);
  const lines: readonly (readonly [string, Uncertain])[] = [
    ["total", power.totalW],
    ...(bare ? [] : [["into heated parts", power.heatedW] as const]),
    ["in the coil, leads included", power.coilW],
    ["elsewhere", power.otherW],
  ];
  return (
    <table class="reading-list">
      <caption class="unseen">Power split</caption>
      <thead class="unseen">
        <tr>
          <th scope="col">where</th>
          <th scope="col">power</th>
          <th scope="col">share of the total</th>
        </tr>
      </thead>
      <tbody>
        {lines.map(([words, of]) => (
          <tr key={words}>
            <th scope="row">{words}</th>
            <td>
              <Figure of={of} unit={unitFor(of, unit)} />
            </td>
            <td class="reading-share">
              {power.totalW.value > 0 ? percent(of.value / power.totalW.value) : ""}
            </td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}

function Supply({ power, bare }: PowersProps) {
  const lines: readonly (readonly [string, Uncertain, Unit])[] = [
    ...(bare ? [] : [["efficiency", power.efficiency, { factor: 0.01, symbol: "%" }] as const]),
    ["coil current", power.currentA, prefixed("A", [power.currentA.value])],
    ["coil voltage", power.coilVoltageV, prefixed("V", [power.coilVoltageV.value])],
    ["reactive power", power.reactiveVar, prefixed("var", [power.reactiveVar.value])],
    [
      "capacitance for resonance",
      power.resonantCapacitanceF,
      prefixed("F", [power.resonantCapacitanceF.value]),
    ],
  ];
  return (
    <table class="reading-list">
      <caption class="unseen">What the supply sees</caption>
      <tbody>
        {lines.map(([words, of, unit]) => (
          <tr key={words}>
            <th scope="row">{words}</th>
            <td>
              <Figure of={of} unit={unit} />
            </td>
            <td class="reading-share" />
          </tr>
        ))}
      </tbody>
    </table>
  );
}
