/** Which elements are neighbours: those that alone share an unknown, as the middle of an edge is shared by two nine-node cells. */
import type { ElementStructure } from "./structure.ts";

/** A graph: element e's neighbours are list[start[e]] … list[start[e + 1] − 1]; one listed twice weighs two. */
export interface Graph {
  readonly start: Int32Array;
  readonly list: Int32Array;
}

/** The graph of elements that share unknowns no third element has. */
export function neighboursOf(structure: ElementStructure): Graph {
  const { start, ids, unknowns } = structure;
  const elements = start.length - 1;
  const first = new Int32Array(unknowns).fill(-1);
  const second = new Int32Array(unknowns).fill(-1);
  for (let e = 0; e < elements; e++) {
    for (let i = start[e]; i < start[e + 1]; i++) {
      const v = ids[i];
      if (first[v] < 0) first[v] = e;
      else second[v] = second[v] === -1 ? e : MANY;
    }
  }
  const graphStart = new Int32Array(elements + 1);
  for (let v = 0; v < unknowns; v++) {
    if (second[v] < 0) continue;
    graphStart[first[v] + 1]++;
    graphStart[second[v] + 1]++;
  }
  for (let e = 0; e < elements; e++) graphStart[e + 1] += graphStart[e];
  const next = graphStart.slice(0, elements);
  const list = new Int32Array(graphStart[elements]);
  for (let v = 0; v < unknowns; v++) {
    if (second[v] < 0) continue;
    list[next[first[v]]++] = second[v];
    list[next[second[v]]++] = first[v];
  }
  return { start: graphStart, list };
}

/** Mark of an unknown with more than two elements. */
const MANY = -2;
