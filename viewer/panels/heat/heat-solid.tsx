/** The cut-away solid: turned, looked into and read by pointer, touch and keys; without WebGL the flat map stands in for it. */
import { useCallback, useEffect, useMemo, useRef, useState } from "preact/hooks";
import { boundsOf, type Heat } from "../../heat.ts";
import type { Boundary } from "../../scene/boundary.ts";
import { atFirst, cameraOf, closer, type Orbit, rayAt, turned } from "../../scene/orbit.ts";
import { paintOf } from "../../scene/paint.ts";
import { meet } from "../../scene/pick.ts";
import { SolidLink, type Trouble } from "../../scene/solid-link.ts";
import { HeatFlat, type HeatProps } from "./heat-flat.tsx";
import type { Seen } from "./seen.ts";
import { ratioNow, useSize } from "./size.ts";
import { Stage } from "./stage.tsx";
import { useInks } from "./tokens.ts";

export interface HeatSolidProps extends HeatProps {
  /** Turns the whole view to the flat map, where the solid cannot be shown. */
  readonly onFlat: () => void;
}

export function HeatSolid({ onFlat, ...props }: HeatSolidProps) {
  const [trouble, setTrouble] = useState<Trouble | null>(null);
  if (trouble === null) return <Turnable {...props} onTrouble={setTrouble} />;
  return (
    <div class="heat-lost">
      <p role="alert">
        {trouble === "missing"
          ? "This browser cannot draw the cut-away body: it has no WebGL, or it is switched off. The flat map shows the same heat. "
          : "The browser took the graphics away from the cut-away body. The flat map shows the same heat. "}
        <button type="button" onClick={() => setTrouble(null)}>
          try again
        </button>{" "}
        <button type="button" onClick={onFlat}>
          stay with the flat map
        </button>
      </p>
      <HeatFlat {...props} />
    </div>
  );
}

/** rad a px dragged, and a press of an arrow key. */
const turn = { px: 0.009, key: 0.12 };

interface TurnableProps extends HeatProps {
  readonly onTrouble: (trouble: Trouble) => void;
}

function Turnable({ heat, scale, onTrouble }: TurnableProps) {
  const canvas = useRef<HTMLCanvasElement>(null);
  const box = useSize(canvas);
  const inks = useInks();
  const [orbit, setOrbit] = useState<Orbit>(atFirst);
  const [moving, setMoving] = useState(false);
  const bounds = useMemo(() => boundsOf(heat.outlines), [heat]);
  const paint = useMemo(() => paintOf(heat, scale, inks.palette), [heat, scale, inks]);
  const camera = useMemo(
    () => cameraOf(orbit, bounds, box.width / Math.max(1, box.height)),
    [orbit, bounds, box],
  );
  const solid = useSolid(canvas, onTrouble);
  // What was built last: drawn when it is there, and read from while it is of this very heat.
  const [built, setBuilt] = useState<{ readonly of: Heat; readonly surface: Boundary } | null>(null);

  useEffect(() => {
    solid?.show({ heat, paint, paper: inks.paper, ink: inks.ink }, (surface) =>
      setBuilt({ of: heat, surface }),
    );
  }, [solid, heat, paint, inks]);
  useEffect(() => {
    if (solid === null || built === null || box.width === 0) return;
    const frame = requestAnimationFrame(() => {
      solid.resize(box.width, box.height, moving ? 1 : ratioNow());
      solid.draw(camera, moving);
    });
    return () => cancelAnimationFrame(frame);
  }, [solid, built, camera, moving, box]);

  const zoom = useCallback(
    (factor: number, at: readonly [number, number] | null) =>
      setOrbit((now) => closer(now, factor, at === null ? [0, 0] : sharesAt(at, box))),
    [box],
  );
  const rotate = (dx: number, dy: number): void => setOrbit((now) => turned(now, dx, dy));
  const read = (x: number, y: number): Seen | null => {
    if (built?.of !== heat) return null;
    const { from, along } = rayAt(camera, (2 * x) / box.width - 1, 1 - (2 * y) / box.height);
    const met = meet(heat, built.surface, { from, along });
    return met === null ? null : { ...met, outside: met.on === "surface" };
  };

  return (
    <Stage
      label="Heat, cut away: coil and parts with a quarter taken out"
      heat={heat}
      canvas={canvas}
      verb="turn it"
      whole="as at first"
      waiting={built === null}
      read={read}
      moves={[
        { words: "turn left", act: () => rotate(-2 * turn.key, 0) },
        { words: "turn right", act: () => rotate(2 * turn.key, 0) },
      ]}
      gestures={{
        drag: (dx, dy) => rotate(dx * turn.px, dy * turn.px),
        zoom,
        arrow: (dx, dy) => rotate(dx * turn.key, dy * turn.key),
        whole: () => setOrbit(atFirst),
        busy: setMoving,
      }}
    />
  );
}

/** A place in px as shares of the picture's height from its middle, upwards. */
const sharesAt = (
  [x, y]: readonly [number, number],
  { width, height }: { readonly width: number; readonly height: number },
): [number, number] => [(x - width / 2) / height, (height / 2 - y) / height];

/** The thread that draws on the canvas; null before there is one. It starts when it is first needed, and ends on leaving. */
function useSolid(
  canvas: { readonly current: HTMLCanvasElement | null },
  onTrouble: (trouble: Trouble) => void,
): SolidLink | null {
  const [solid, setSolid] = useState<SolidLink | null>(null);
  useEffect(() => {
    if (canvas.current === null) return;
    const made = new SolidLink(canvas.current, onTrouble);
    setSolid(made);
    return () => made.close();
  }, [canvas, onTrouble]);
  return solid;
}
