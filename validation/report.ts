/** The report: rows of every check as Markdown. No date, no times: the same digits make the same file. */
import type { Check, Row } from "./check.ts";

export interface Section {
  readonly check: Check;
  readonly rows: readonly Row[];
}

const HEAD = `# What the solver is checked against

Written by \`npm run validate\`. Each figure of a named source is computed by this project and compared: "difference" is computed
against expected, "our bar" the project's own error bar, both relative to the expected figure unless the row says absolute.
A row agrees when the difference stays within its tolerance; why the tolerance is what it is stands above each table.
Behind each source stands how its figures came: computed from its formula, read (often second-hand) or from memory; \`validation/tables\`
says more. In \`npm test\` every
check also runs with one constant spoiled, and must turn red.
`;

export function reportOf(sections: readonly Section[]): string {
  const all = sections.flatMap((s) => s.rows);
  const agree = all.filter((row) => row.passed).length;
  const summary = `\n${agree} of ${all.length} figures agree, in ${sections.length} checks.\n`;
  return HEAD + summary + sections.map(sectionText).join("");
}

function sectionText({ check, rows }: Section): string {
  const sources = [...new Set(rows.map((row) => row.source))];
  const table = rows.map(rowText).join("\n");
  return `
## ${check.title}

${check.method}

Tolerance: ${check.why} Spoiled in the tests: ${spoiledText(check)}.

${sources.map((source) => `- Source: ${source}`).join("\n")}

| figure | expected | computed | difference | our bar | tolerance | verdict |
|---|---|---|---|---|---|---|
${table}
`;
}

function spoiledText(check: Check): string {
  const words = Object.entries(check.spoiled).filter(([, factor]) => factor !== 1);
  return words.map(([name, factor]) => `${name} × ${factor}`).join(", ");
}

function rowText(row: Row): string {
  const cells = [
    row.name.replaceAll("|", "\\|"),
    digits(row.expected),
    digits(row.computed),
    short(row.difference),
    row.bar === null ? "–" : short(row.bar),
    short(row.tolerance),
    row.passed ? "agrees" : "**off**",
  ];
  return `| ${cells.join(" | ")} |`;
}

const digits = (x: number): string => (Number.isFinite(x) ? String(Number(x.toPrecision(7))) : String(x));
const short = (x: number): string => (Number.isFinite(x) ? x.toExponential(1) : String(x));
