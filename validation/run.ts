/**
 * `npm run validate`: runs every check, writes REPORT.md beside this folder's files, exit status 1 when a row is red.
 * With `--all` also the battery of whole designs (battery/REPORT.md), with `--battery` that alone; `--make-truth [id …]` makes the battery's truths.
 */
import { writeFileSync } from "node:fs";
import { makeTruths } from "./battery/make.ts";
import { runBattery } from "./battery/run.ts";
import { CHECKS } from "./cases/index.ts";
import { rowsOf, TRUE } from "./check.ts";
import { reportOf } from "./report.ts";

const REPORT = "validation/REPORT.md";

/** All checks; true when every figure agrees. */
function runChecks(): boolean {
  const sections = CHECKS.map((check) => {
    process.stderr.write(`${check.title} … `);
    const rows = rowsOf(check, TRUE);
    const red = rows.filter((row) => !row.passed).length;
    process.stderr.write(
      red === 0 ? `${rows.length} figures agree\n` : `${red} of ${rows.length} figures are off\n`,
    );
    return { check, rows };
  });
  writeFileSync(REPORT, reportOf(sections));
  const red = sections.flatMap((s) => s.rows).filter((row) => !row.passed);
  const all = sections.reduce((sum, s) => sum + s.rows.length, 0);
  for (const row of red) process.stderr.write(`off: ${row.name}: ${row.computed} against ${row.expected}\n`);
  process.stdout.write(`${all - red.length} of ${all} figures agree; see ${REPORT}\n`);
  return red.length === 0;
}

/** What the command line asks for; every asked run is made, whatever came of the one before. */
function run([door, ...rest]: readonly string[]): boolean {
  if (door === "--make-truth") return makeTruths(rest) === 0;
  if (door === "--battery") return runBattery();
  const agree = runChecks();
  return door === "--all" ? runBattery() && agree : agree;
}

process.exitCode = run(process.argv.slice(2)) ? 0 : 1;
