/** Where each refusal is told: at the nearest blank, else at the line it belongs to, else at the end. None is lost. */
import type { Fault } from "../../../meshes/refusal.ts";
import { type Line, placesOf } from "./phrases.ts";

export interface FaultPlaces {
  /** By the pointer of the blank or choice (its `at`). */
  readonly blanks: ReadonlyMap<string, readonly Fault[]>;
  /** By the line's `at`. */
  readonly lines: ReadonlyMap<string, readonly Fault[]>;
  /** What belongs to no line. */
  readonly rest: readonly Fault[];
}

export function placeFaults(faults: readonly Fault[], lines: readonly Line[]): FaultPlaces {
  const blankAt = new Map<string, string>();
  const lineAt = new Map<string, string>();
  for (const line of lines) {
    for (const place of [line.at, ...(line.owns ?? [])]) lineAt.set(place, line.at);
    for (const phrase of [...line.phrases, ...line.also]) {
      for (const place of placesOf(phrase)) blankAt.set(place, placesOf(phrase)[0]!);
    }
  }
  const places = {
    blanks: new Map<string, Fault[]>(),
    lines: new Map<string, Fault[]>(),
    rest: [] as Fault[],
  };
  for (const fault of faults) {
    // An exact blank first; of those further out the innermost, a blank before a line of the same pointer.
    const place = outward(fault.pointer).find((p) => blankAt.has(p) || lineAt.has(p));
    if (place === undefined) places.rest.push(fault);
    else if (blankAt.has(place)) push(places.blanks, blankAt.get(place)!, fault);
    else push(places.lines, lineAt.get(place)!, fault);
  }
  return places;
}

/** A pointer and those around it, innermost first, without the whole document. */
function outward(pointer: string): string[] {
  const places: string[] = [];
  for (let p = pointer; p !== ""; p = p.slice(0, p.lastIndexOf("/"))) places.push(p);
  return places;
}

function push(map: Map<string, Fault[]>, key: string, fault: Fault): void {
  const list = map.get(key);
  if (list === undefined) map.set(key, [fault]);
  else list.push(fault);
}
