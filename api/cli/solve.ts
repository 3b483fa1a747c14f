/** `emberturn solve`: one design in; a table or the result document out; a heat picture where asked for. */
import { constants } from "node:fs";
import { access, stat, writeFile } from "node:fs/promises";
import { dirname } from "node:path";
import { checkDesign } from "../../meshes/check.ts";
import { readJson } from "../../meshes/json.ts";
import { demandNumbers } from "../engine/finite.ts";
import type { Solve } from "../engine/thread.ts";
import { exitStatus, UsageError } from "../errors.ts";
import { plain } from "../format/figures.ts";
import { captionOf } from "./caption.ts";
import { readText } from "./input.ts";
import { renderPicture } from "./picture.ts";
import { progressLine } from "./progress.ts";
import { renderTable } from "./table.ts";

export interface SolveOptions {
  readonly json?: boolean;
  readonly picture?: string;
}

/** Solves the document at `path` ("-" = standard input) and prints; sets the exit status. Throws what the mapper understands. */
export async function solveCommand(path: string, options: SolveOptions, solve: Solve): Promise<void> {
  if (options.picture !== undefined) await checkWritable(options.picture);
  const design = checkDesign(readJson(await readText(path, process.stdin)));
  const line = progressLine(process.stderr);
  const { result, heat } = await solve(design, line.report).finally(line.close);
  demandNumbers(result);
  if (options.json) {
    process.stdout.write(`${JSON.stringify(result, null, 2)}\n`);
  } else {
    const colour = process.stdout.isTTY === true && process.env["NO_COLOR"] === undefined;
    process.stdout.write(renderTable(result, { colour }));
  }
  if (!result.numerics.accuracyMet) {
    process.exitCode = exitStatus.shortOfAccuracy;
    process.stderr.write(
      `Solved, but short of the asked ${plain(result.design.accuracyPercent)} %: go by the bars.\n`,
    );
  }
  if (options.picture !== undefined) {
    await writeFile(options.picture, renderPicture(heat, captionOf(result)));
    (options.json ? process.stderr : process.stdout).write(`\nHeat picture: ${options.picture}\n`);
  }
}

/** Asks before the work, not after it, whether the picture can be written. */
async function checkWritable(path: string): Promise<void> {
  const there = await stat(path).catch(() => null);
  if (there?.isDirectory()) throw new UsageError(`--picture: ${path} is a folder`);
  try {
    await access(there === null ? dirname(path) : path, constants.W_OK);
  } catch {
    throw new UsageError(`--picture: ${path} cannot be written`);
  }
}
