/** Cells of one colour joined into as few closed curves as their shared edges allow: keeps pictures small. */

/** A directed edge between two points, both as "x,y" in whole drawing steps. */
type Edges = Map<string, string[]>;

/** Adds an edge, or takes away the same edge run through backwards: what two cells share is inside. */
function addEdge(edges: Edges, from: string, to: string): void {
  if (from === to) return;
  const back = edges.get(to);
  const at = back?.indexOf(from) ?? -1;
  if (back !== undefined && at >= 0) {
    back.splice(at, 1);
    if (back.length === 0) edges.delete(to);
    return;
  }
  const ahead = edges.get(from);
  if (ahead === undefined) edges.set(from, [to]);
  else ahead.push(to);
}

/** Takes one closed curve out of the edges, as its corners. */
function takeLoop(edges: Edges, start: string): string[] {
  const loop: string[] = [];
  let here = start;
  do {
    loop.push(here);
    const ahead = edges.get(here)!;
    const next = ahead.pop()!;
    if (ahead.length === 0) edges.delete(here);
    here = next;
  } while (here !== start);
  return loop;
}

type Step = readonly [number, number];

/** Leaves out corners that lie on the straight line between their neighbours. */
function straighten(loop: readonly Step[]): Step[] {
  return loop.filter(([x, y], k) => {
    const [px, py] = loop[(k + loop.length - 1) % loop.length]!;
    const [nx, ny] = loop[(k + 1) % loop.length]!;
    return (x - px) * (ny - y) !== (y - py) * (nx - x);
  });
}

/** SVG path data in whole steps, relative. */
function pathOf(loop: readonly Step[]): string {
  let data = "";
  let before: Step = [0, 0];
  loop.forEach(([x, y], k) => {
    const dx = x - before[0];
    const dy = y - before[1];
    data += k === 0 ? `M${x} ${y}l` : `${k > 1 && dx >= 0 ? " " : ""}${dx}${dy < 0 ? "" : " "}${dy}`;
    before = [x, y];
  });
  return `${data}z`;
}

/**
 * Path data around all given cells, each a list of corners in whole drawing steps, all turning the same way.
 * Cells that became lines or points by rounding vanish.
 */
export function joinCells(cells: readonly (readonly Step[])[]): string {
  const edges: Edges = new Map();
  for (const cell of cells) {
    cell.forEach(([x, y], k) => {
      const [nx, ny] = cell[(k + 1) % cell.length]!;
      addEdge(edges, `${x},${y}`, `${nx},${ny}`);
    });
  }
  let data = "";
  for (let start = edges.keys().next(); !start.done; start = edges.keys().next()) {
    const loop = takeLoop(edges, start.value).map((key) => key.split(",").map(Number) as [number, number]);
    const corners = straighten(loop);
    if (corners.length >= 3) data += pathOf(corners);
  }
  return data;
}
