/** R, L, X and Q at the coil's terminals, as a meter would read them: empty beside loaded. */
import { prefixed, type Unit } from "../../../api/format/figures.ts";
import type { Terminal } from "../../../meshes/result.ts";
import { Figure } from "./figure.tsx";

export interface TerminalsProps {
  readonly empty: Terminal;
  readonly loaded: Terminal | null;
}

const rows: readonly (readonly [keyof Terminal, string, string, string])[] = [
  ["resistanceOhm", "R", "resistance", "Ω"],
  ["inductanceH", "L", "inductance", "H"],
  ["reactanceOhm", "X", "reactance", "Ω"],
  ["q", "Q", "quality, X/R", ""],
];

export function Terminals({ empty, loaded }: TerminalsProps) {
  const states = loaded === null ? [empty] : [empty, loaded];
  return (
    <section aria-label="At the coil's terminals">
      <h2>At the coil's terminals</h2>
      <table class="reading-main">
        <thead>
          <tr>
            <td />
            <th scope="col">empty</th>
            {loaded !== null && <th scope="col">loaded</th>}
          </tr>
        </thead>
        <tbody>
          {rows.map(([key, letter, words, symbol]) => (
            <tr key={key}>
              <th scope="row">
                <b>{letter}</b> <span class="reading-words">{words}</span>
              </th>
              {states.map((state, k) => (
                <td key={k}>
                  <Figure
                    of={state[key]}
                    unit={unitOf(
                      symbol,
                      states.map((s) => s[key].value),
                    )}
                  />
                </td>
              ))}
            </tr>
          ))}
        </tbody>
      </table>
    </section>
  );
}

/** One unit for both states, so that they compare at sight. */
const unitOf = (symbol: string, values: readonly number[]): Unit =>
  symbol === "" ? { factor: 1, symbol: "" } : prefixed(symbol, values);
