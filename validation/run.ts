/** `npm run validate`: runs every check, writes REPORT.md beside this folder's files, exit status 1 when a row is red. */
import { writeFileSync } from "node:fs";
import { CHECKS } from "./cases/index.ts";
import { rowsOf, TRUE } from "./check.ts";
import { reportOf } from "./report.ts";

const REPORT = "validation/REPORT.md";

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
process.exitCode = red.length === 0 ? 0 : 1;
