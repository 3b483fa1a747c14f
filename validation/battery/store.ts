/** Truths on disk: one JSON file, a line a figure, written anew after every design so that a run can be broken off and taken up again. */
import { existsSync, readFileSync, renameSync, writeFileSync } from "node:fs";
import { BATTERY } from "./designs/index.ts";
import type { Truth } from "./truth.ts";

const FILE = "validation/battery/truth.json";
const MADE_BY = "npm run validate -- --make-truth";

/** All stored truths by design id; none when the file is not there. */
export function readTruths(): Map<string, Truth> {
  if (!existsSync(FILE)) return new Map();
  const { designs } = JSON.parse(readFileSync(FILE, "utf8")) as { designs: Record<string, Truth> };
  return new Map(Object.entries(designs));
}

/** Writes the truths of the battery's designs, in the battery's order, in one step. */
export function writeTruths(truths: ReadonlyMap<string, Truth>): void {
  const blocks = BATTERY.flatMap(({ id }) => {
    const truth = truths.get(id);
    return truth === undefined ? [] : [`${JSON.stringify(id)}: ${truthText(truth)}`];
  });
  const text = `{\n"madeBy": ${JSON.stringify(MADE_BY)},\n"designs": {\n${blocks.join(",\n")}\n}\n}\n`;
  const draft = `${FILE}.${process.pid}.tmp`;
  writeFileSync(draft, text);
  renameSync(draft, FILE);
}

function truthText({ barred, plain, ...head }: Truth): string {
  const lines = (figures: Readonly<Record<string, unknown>>): string =>
    Object.entries(figures)
      .map(([path, x]) => `    ${JSON.stringify(path)}: ${figureText(x)}`)
      .join(",\n");
  const top = Object.entries(head).map(([key, x]) => `  ${JSON.stringify(key)}: ${JSON.stringify(x)}`);
  return `{\n${top.join(",\n")},\n  "barred": {\n${lines(barred)}\n  },\n  "plain": {\n${lines(plain)}\n  }\n}`;
}

/** Ten digits of a figure, two of a doubt: all that means anything. */
function figureText(x: unknown): string {
  const digits = (n: unknown, count: number): number => Number((n as number).toPrecision(count));
  return JSON.stringify(Array.isArray(x) ? [digits(x[0], 10), digits(x[1], 2)] : digits(x, 7));
}
