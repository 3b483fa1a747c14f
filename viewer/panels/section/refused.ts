/** What of the drawing is refused, and what is drawn while a blank is half typed. */
import type { Layout, Placed } from "../../../meshes/layout.ts";
import type { Fault } from "../../../meshes/refusal.ts";
import { valueAt } from "../../pointer.ts";

export interface Refused {
  /** Whether turn k is refused. */
  readonly turn: (k: number) => boolean;
  readonly bodies: ReadonlySet<string>;
}

/** A part or guide, and of its keys those that say where it is. */
const bodyPlace =
  /^(\/(?:parts|guides)\/\d+)(?:\/of)?(?:\/(?:shape|diameterMm|lengthMm|boreDiameterMm|centreZMm|pointsMm|count|gapMm)(?:\/.*)?)?$/;
const coilPlace = /^\/coil\/(?:winding|conductor\/(?:section|\w+Mm))(?:\/|$)/;

export function refusedOf(faults: readonly Fault[]): Refused {
  const turns = new Set<number>();
  const bodies = new Set<string>();
  let all = false;
  for (const { pointer } of faults) {
    const body = bodyPlace.exec(pointer)?.[1];
    if (body !== undefined) bodies.add(body);
    const ring = /^\/coil\/winding\/(?:centresMm|sense)\/(\d+)/.exec(pointer)?.[1];
    const step = /^\/coil\/winding\/pitchMm\/(\d+)/.exec(pointer)?.[1];
    if (ring !== undefined) turns.add(Number(ring));
    else if (step !== undefined) turns.add(Number(step)).add(Number(step) + 1);
    else if (coilPlace.test(pointer)) all = true;
  }
  return { turn: (k) => all || turns.has(k), bodies };
}

/** A document and where everything in it was drawn. */
export interface Drawn {
  readonly document: unknown;
  readonly layout: Layout;
}

/** A layout in which what cannot be drawn at the moment stays as it was drawn last: copper, and bodies still in their list.
 * Another name says it is another design, of which nothing stays. */
export function steadied(
  now: Layout,
  { layout: before, document: former }: Drawn,
  document: unknown,
): Layout {
  if (valueAt(document, "/name") !== valueAt(former, "/name")) return now;
  const listed = ["parts", "guides"].flatMap((list) => {
    const items = valueAt(document, `/${list}`);
    return Array.isArray(items) ? items.map((_, i) => `/${list}/${i}`) : [];
  });
  const find = (layout: Layout, pointer: string): Placed | undefined =>
    layout.bodies.find((b) => b.pointer === pointer);
  const bodies = listed.flatMap((pointer) => find(now, pointer) ?? find(before, pointer) ?? []);
  return { copper: now.copper ?? before.copper, bodies };
}
