/** Lines and columns of plain text, 80 wide. */

export const lineWidth = 80;

/** Breaks words into lines of at most `width` columns; every line after the first starts with `hang`. */
export function wrap(text: string, first = "", hang = first, width = lineWidth): string[] {
  const lines: string[] = [];
  let line = first;
  let empty = true;
  for (const word of text.split(/\s+/).filter((w) => w !== "")) {
    if (!empty && line.length + 1 + word.length > width) {
      lines.push(line);
      line = hang;
      empty = true;
    }
    line += empty ? word : ` ${word}`;
    empty = false;
  }
  return [...lines, line];
}

/** How a column is set: to the left, to the right, or with its decimal points under each other. */
export type Alignment = "left" | "right" | "decimal";

function pointAt(text: string): number {
  const at = text.search(/[^\d-]/);
  return at < 0 ? text.length : at;
}

function align(cells: readonly string[], how: Alignment): string[] {
  if (how === "decimal") {
    const before = Math.max(...cells.map(pointAt));
    const moved = cells.map((cell) => " ".repeat(before - pointAt(cell)) + cell);
    return align(moved, "left");
  }
  const width = Math.max(...cells.map((cell) => cell.length));
  return cells.map((cell) => (how === "left" ? cell.padEnd(width) : cell.padStart(width)));
}

/** Sets rows of cells in columns two blanks apart and two in, under a head where there is one; no blanks at line ends. */
export function columns(
  rows: readonly (readonly string[])[],
  how: readonly Alignment[],
  head: readonly string[] = [],
): string[] {
  const set = how.map((alignment, i) => {
    const cells = align(
      rows.map((row) => row[i] ?? ""),
      alignment,
    );
    const width = Math.max(head[i]?.length ?? 0, cells[0]?.length ?? 0);
    const pad = (cell: string): string => (alignment === "left" ? cell.padEnd(width) : cell.padStart(width));
    return head.length === 0 ? cells : [pad(head[i] ?? ""), ...cells.map(pad)];
  });
  const lines = set[0] ?? [];
  return lines.map((_, k) => `  ${set.map((column) => column[k]).join("  ")}`.trimEnd());
}
