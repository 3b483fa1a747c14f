/** The result document as a table for people: aligned, with units and bars, 80 columns wide. Pure: result in, text out. */
import { styleText } from "node:util";
import type { Power, Result, Terminal, Uncertain } from "../../meshes/result.ts";
import {
  evenly,
  figure,
  homelyUnit,
  percent,
  plain,
  plainFigure,
  prefixed,
  show,
  type Unit,
} from "../format/figures.ts";
import { coilSentence, driveSentence, printable } from "../format/sentence.ts";
import { type Alignment, columns, wrap } from "./layout.ts";
import { partSection } from "./part-section.ts";

/** How the text is to be dressed. */
export interface Dress {
  /** Bold headings and dimmed remarks, for a terminal that shows them. */
  readonly colour: boolean;
}

/** The whole table; ends with a line break. */
export function renderTable(result: Result, dress: Dress): string {
  const { quiet, section } = dressed(dress);
  const watts = homelyUnit(
    { factor: 1, symbol: "W" },
    result.turns.map((turn) => turn.powerW),
  );
  const lines = [
    ...mainLines(result, dress),
    ...result.parts.flatMap((part, k) =>
      section(`PART: ${part.name || "part"}`, partSection(part, result.design.parts[k])),
    ),
    ...section(
      `TURNS (counted from 0, in the winding's order; power in the copper of each, ${watts.symbol})`,
      turnLines(result, watts),
    ),
    ...section("STRAY FIELD (rms)", strayLines(result)),
    ...section("COPPER AND LEADS", copperLines(result)),
    ...section(
      "CAUTIONS",
      result.cautions.flatMap((text) => wrap(text, "- ", "  ")),
    ),
    "",
    ...numericsLines(result).map(quiet),
    ...safety.map(quiet),
  ];
  return `${lines.join("\n")}\n`;
}

/** Its first two sections: R, L, X and Q of both states, and the powers; ends with a line break. */
export const renderSummary = (result: Result, dress: Dress): string =>
  `${mainLines(result, dress).join("\n")}\n`;

function mainLines(result: Result, dress: Dress): string[] {
  const { heading, section } = dressed(dress);
  return [
    ...heading(result.design.name || "unnamed design"),
    ...wrap(`${coilSentence(result.design.coil)}; driven with ${driveSentence(result.design.drive)}.`),
    ...section("AT THE COIL'S TERMINALS", terminalLines(result.empty, result.loaded)),
    ...section("POWER AND SUPPLY", powerLines(result.power)),
  ];
}

/** Headings, remarks and sections in the given dress. */
function dressed({ colour }: Dress) {
  const put = (look: "bold" | "dim", text: string): string =>
    colour ? styleText(look, text, { validateStream: false }) : text;
  const heading = (words: string): string[] => wrap(printable(words)).map((text) => put("bold", text));
  return {
    heading,
    quiet: (text: string): string => put("dim", text),
    section: (words: string, lines: readonly string[]): string[] =>
      lines.length === 0 ? [] : ["", ...heading(words), ...lines],
  };
}

const safety = wrap(
  "Calculated, not measured. Follow local codes; have a qualified person check voltages, fields and cooling.",
);

/** Value and bar of one quantity, for two neighbouring columns. */
function pair(quantity: Uncertain | null, unit: Unit): [string, string] {
  if (quantity === null) return ["", ""];
  const { value, bar } = show(quantity, unit);
  return [value, bar === "" ? "" : `± ${bar}`];
}

/** The column's unit, unless the quantity is so much smaller that its own reads better. */
function unitFor({ value }: Uncertain, column: Unit, symbol: string): Unit {
  return value !== 0 && Math.abs(value) * 1000 < column.factor ? prefixed(symbol, [value]) : column;
}

function terminalLines(empty: Terminal, loaded: Terminal | null): string[] {
  const row = (label: string, key: keyof Terminal, symbol: string): string[] => {
    const both = [empty[key], ...(loaded === null ? [] : [loaded[key]])];
    const unit =
      symbol === ""
        ? { factor: 1, symbol: "" }
        : prefixed(
            symbol,
            both.map((q) => q.value),
          );
    return [
      label,
      ...pair(empty[key], unit),
      ...(loaded === null ? [] : pair(loaded[key], unit)),
      unit.symbol,
    ];
  };
  const head = loaded === null ? ["", "no part", ""] : ["", "empty", "", "loaded", ""];
  const how: Alignment[] = [
    "left",
    "decimal",
    "left",
    ...(loaded === null ? [] : (["decimal", "left"] as const)),
    "left",
  ];
  return columns(
    [
      row("resistance R", "resistanceOhm", "Ω"),
      row("inductance L", "inductanceH", "H"),
      row("reactance X", "reactanceOhm", "Ω"),
      row("quality Q = X/R", "q", ""),
    ],
    how,
    head,
  );
}

function powerLines(power: Power): string[] {
  const unit = prefixed("W", [power.totalW.value]);
  const share = (q: Uncertain): string =>
    power.totalW.value > 0 ? percent(q.value / power.totalW.value) : "";
  const row = (label: string, q: Uncertain): string[] => {
    const own = unitFor(q, unit, "W");
    return [label, ...pair(q, own), own.symbol, share(q)];
  };
  const split = columns(
    [
      row("total", power.totalW),
      row("into heated parts", power.heatedW),
      row("in the coil", power.coilW),
      row("elsewhere", power.otherW),
    ],
    ["left", "decimal", "left", "left", "right"],
  );
  const supply = columns(
    [
      ["efficiency", figure(power.efficiency, { factor: 0.01, symbol: "%" })],
      ["coil current", figure(power.currentA, "A")],
      ["coil voltage", figure(power.coilVoltageV, "V")],
      ["reactive power", figure(power.reactiveVar, "var")],
      ["capacitance for resonance", figure(power.resonantCapacitanceF, "F")],
    ],
    ["left", "left"],
  );
  return [...split, ...supply];
}

/** A line a turn up to a dozen turns; beyond, ten powers a line. */
function turnLines({ turns }: Result, watts: Unit): string[] {
  const powers = evenly(turns.map((turn) => turn.powerW / watts.factor));
  if (turns.length <= 12) {
    const r = evenly(turns.map((turn) => turn.rMm));
    const z = evenly(turns.map((turn) => turn.zMm));
    const rows = turns.map((_, k) => [String(k), r[k]!, z[k]!, powers[k]!]);
    return columns(rows, ["right", "right", "right", "right"], ["turn", "r mm", "z mm", watts.symbol]);
  }
  const lines: string[][] = [];
  for (let k = 0; k < turns.length; k += 8) {
    const some = powers.slice(k, k + 8);
    lines.push([`${k} to ${k + some.length - 1}`, ...some]);
  }
  return columns(lines, Array<Alignment>(9).fill("right"));
}

function strayLines({ strayField }: Result): string[] {
  const unit = prefixed(
    "T",
    strayField.map((point) => point.fluxDensityT.value),
  );
  const rows = strayField.map((point) => {
    const own =
      point.fluxDensityT.value * 1000 < unit.factor ? prefixed("T", [point.fluxDensityT.value]) : unit;
    return [
      `r ${plain(point.rMm, 5)}`,
      `z ${plain(point.zMm, 5)} mm`,
      ...pair(point.fluxDensityT, own),
      own.symbol,
    ];
  });
  return columns(rows, ["left", "left", "decimal", "left", "left"]);
}

function copperLines({ copper, leads }: Result): string[] {
  const extra =
    copper.helixExtraOhm === 0 && copper.helixExtraH === 0
      ? ""
      : `; the helix adds about ${plainFigure(copper.helixExtraOhm, "Ω", 2)} and ${plainFigure(copper.helixExtraH, "H", 2)} to closed rings (not added above)`;
  const length = `Copper to cut: ${plain(copper.lengthMm / 1000, 4)} m${extra}.`;
  const pairOfLeads =
    leads === null
      ? "No leads in the design."
      : `Leads, counted in all figures above: ${plainFigure(leads.resistanceOhm, "Ω", 3)}, ${plainFigure(leads.inductanceH, "H", 3)}.`;
  return [...wrap(length, "  "), ...wrap(pairOfLeads, "  ")];
}

function numericsLines({ numerics: n, design }: Result): string[] {
  const asked = `${plain(design.accuracyPercent, 3)} %`;
  const met = n.accuracyMet
    ? `the asked ${asked} holds`
    : `the asked ${asked} was NOT reached, so go by the ± of each figure`;
  return wrap(
    `Each ± should hold in at least 95 of 100 designs; ${met}. ${n.unknowns} unknowns on the finest of ${n.grids} grids, ` +
      `${n.seconds.toFixed(1)} s, ${Math.round(n.peakMemoryBytes / 1e6)} MB, power balance ${n.powerBalance.toExponential(0)}.`,
  );
}
