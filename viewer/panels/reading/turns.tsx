/** Losses in the copper, turn by turn. */
import { evenly, homelyUnit, plain, type Unit } from "../../../api/format/figures.ts";
import type { TurnResult } from "../../../meshes/result.ts";

/** More turns than this are folded away, with what matters of them said first. */
const mostOpen = 8;

export function Turns({ turns }: { readonly turns: readonly TurnResult[] }) {
  const unit = homelyUnit(
    { factor: 1, symbol: "W" },
    turns.map((turn) => turn.powerW),
  );
  if (turns.length <= mostOpen) {
    return (
      <section aria-label="Losses in the copper, turn by turn">
        <h2>Copper, turn by turn</h2>
        <TurnTable turns={turns} unit={unit} />
      </section>
    );
  }
  return (
    <section aria-label="Losses in the copper, turn by turn">
      <h2>Copper, turn by turn</h2>
      <details>
        <summary>{summary(turns, unit)}</summary>
        <TurnTable turns={turns} unit={unit} />
      </details>
    </section>
  );
}

/** "24 turns, 51 to 119 W each; the most in turn 23". */
function summary(turns: readonly TurnResult[], unit: Unit): string {
  const powers = turns.map((turn) => turn.powerW);
  const [least, most] = [Math.min(...powers), Math.max(...powers)];
  const range = `${plain(least / unit.factor, 3)} to ${plain(most / unit.factor, 3)} ${unit.symbol} each`;
  return `${turns.length} turns, ${range}; the most in turn ${powers.indexOf(most)}`;
}

function TurnTable({ turns, unit }: { readonly turns: readonly TurnResult[]; readonly unit: Unit }) {
  const r = evenly(turns.map((turn) => turn.rMm));
  const z = evenly(turns.map((turn) => turn.zMm));
  const powers = evenly(turns.map((turn) => turn.powerW / unit.factor));
  return (
    <table class="reading-grid">
      <caption>Counted from 0, in the winding's order; place of the turn's centre line</caption>
      <thead>
        <tr>
          <th scope="col">turn</th>
          <th scope="col">r, mm</th>
          <th scope="col">z, mm</th>
          <th scope="col">loss, {unit.symbol}</th>
        </tr>
      </thead>
      <tbody>
        {powers.map((power, k) => (
          <tr key={k}>
            <th scope="row">{k}</th>
            <td>{r[k]!.replace("-", "−")}</td>
            <td>{z[k]!.replace("-", "−")}</td>
            <td>{power}</td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}
