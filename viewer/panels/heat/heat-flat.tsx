/** The flat section map: the cut along the axis, both halves, to scale; it needs no WebGL. */
import { useCallback, useEffect, useMemo, useRef, useState } from "preact/hooks";
import type { HeatScale } from "../../../api/format/heat-scale.ts";
import { boundsOf, cellAt, type Heat } from "../../heat.ts";
import { type FlatView, panned, sectionAt, wholeView, zoomed } from "../../scene/flat-view.ts";
import { paintOf } from "../../scene/paint.ts";
import { type Buffers, drawFlat, plotSize, room } from "./draw-flat.ts";
import type { Seen } from "./seen.ts";
import { ratioNow, useSize } from "./size.ts";
import { Stage } from "./stage.tsx";
import { useInks } from "./tokens.ts";

export interface HeatProps {
  readonly heat: Heat;
  /** null: nothing is heated. */
  readonly scale: HeatScale | null;
}

/** px an arrow key moves the picture. */
const keyStep = 40;

export function HeatFlat({ heat, scale }: HeatProps) {
  const canvas = useRef<HTMLCanvasElement>(null);
  const buffers = useRef<Buffers>({ image: null });
  const box = useSize(canvas);
  const size = useMemo(() => plotSize(box.width, box.height), [box]);
  const inks = useInks();
  const bounds = useMemo(() => boundsOf(heat.outlines), [heat]);
  const paint = useMemo(() => paintOf(heat, scale, inks.palette), [heat, scale, inks]);
  const whole = useMemo(() => wholeView(bounds, size), [bounds, size]);
  // null: the whole, whatever the size; so a picture never touched stays whole when the window changes.
  const [chosen, setChosen] = useState<FlatView | null>(null);
  const view = chosen ?? whole;

  useEffect(() => setChosen(null), [heat.outlines]);
  useEffect(() => {
    const frame = requestAnimationFrame(() => {
      const element = canvas.current;
      const context = element?.getContext("2d", { alpha: false });
      if (!element || !context || box.width === 0) return;
      const ratio = ratioNow();
      const [width, height] = [Math.round(box.width * ratio), Math.round(box.height * ratio)];
      if (element.width !== width || element.height !== height) Object.assign(element, { width, height });
      drawFlat(context, heat, paint, { view, size, ratio, inks }, buffers.current);
    });
    return () => cancelAnimationFrame(frame);
  }, [heat, paint, view, size, box, inks]);

  const zoom = useCallback(
    (factor: number, at: readonly [number, number] | null) =>
      setChosen((now) => {
        const place = at === null ? ([size.width / 2, size.height / 2] as const) : inPlot(at);
        return zoomed(now ?? whole, size, factor, place, whole);
      }),
    [size, whole],
  );
  const pan = (dx: number, dy: number): void => setChosen((now) => panned(now ?? whole, dx, dy, bounds));
  const read = (x: number, y: number): Seen | null => {
    const [px, py] = inPlot([x, y]);
    if (px < 0 || py < 0 || px > size.width || py > size.height) return null;
    const [r, z] = sectionAt(view, size, px, py);
    return { r: Math.abs(r), z, cell: cellAt(heat, Math.abs(r), z) };
  };

  return (
    <Stage
      label="Heat, flat: the cut along the axis"
      heat={heat}
      canvas={canvas}
      verb="move it"
      whole="whole"
      read={read}
      gestures={{
        drag: pan,
        zoom,
        arrow: (dx, dy) => pan(-dx * keyStep, -dy * keyStep),
        whole: () => setChosen(null),
        busy: () => undefined,
      }}
    />
  );
}

/** From the picture's corner to the plot's. */
const inPlot = ([x, y]: readonly [number, number]): [number, number] => [x - room.left, y - room.top];
