/** Pointer, touch, wheel and keys on a picture, told as what they mean. */
import { useEffect, useRef } from "preact/hooks";

/** What a picture does about them; positions in px from the picture's top left corner. */
export interface Gestures {
  /** One finger or the mouse held down moved by so much. */
  readonly drag: (dx: number, dy: number) => void;
  /** So many times as large, about a place; null: about the middle. */
  readonly zoom: (factor: number, at: readonly [number, number] | null) => void;
  /** An arrow key: (±1, 0) or (0, ±1), y downwards. */
  readonly arrow: (dx: number, dy: number) => void;
  readonly whole: () => void;
  /** The pointer rests or moves over it; null: it left. */
  readonly point: (at: readonly [number, number] | null) => void;
  /** Shift and an arrow key: the cross-hair is moved; Escape: null, it is put away. */
  readonly cross: (by: readonly [number, number] | null, far: boolean) => void;
  /** A drag, pinch or held key begins or ends. */
  readonly busy: (busy: boolean) => void;
}

const arrows: Readonly<Record<string, readonly [number, number]>> = {
  ArrowLeft: [-1, 0],
  ArrowRight: [1, 0],
  ArrowUp: [0, -1],
  ArrowDown: [0, 1],
};

/** How much one press of + or one notch of the wheel enlarges. */
export const zoomStep = 1.3;

/** After so long without a further turn of the wheel or key a movement has ended, ms. */
const rest = 180;

/** Listens on the element while it is mounted; the newest `gestures` are always the ones asked. */
export function useGestures(element: { readonly current: HTMLElement | null }, gestures: Gestures): void {
  const newest = useRef(gestures);
  newest.current = gestures;
  useEffect(() => (element.current === null ? undefined : listen(element.current, newest)), [element]);
}

function listen(element: HTMLElement, newest: { readonly current: Gestures }): () => void {
  const stop = new AbortController();
  const { signal } = stop;
  const fingers = new Map<number, readonly [number, number]>();
  let resting: ReturnType<typeof setTimeout> | undefined;
  const place = (event: MouseEvent): readonly [number, number] => {
    const box = element.getBoundingClientRect();
    return [event.clientX - box.left, event.clientY - box.top];
  };
  /** Movement by wheel and keys has no end of its own. */
  const brieflyBusy = (): void => {
    newest.current.busy(true);
    clearTimeout(resting);
    resting = setTimeout(() => fingers.size === 0 && newest.current.busy(false), rest);
  };
  element.addEventListener(
    "pointerdown",
    (event) => {
      if (event.button !== 0) return;
      element.setPointerCapture(event.pointerId);
      fingers.set(event.pointerId, place(event));
      newest.current.busy(true);
    },
    { signal },
  );
  element.addEventListener(
    "pointermove",
    (event) => {
      const now = place(event);
      const before = fingers.get(event.pointerId);
      if (before !== undefined) {
        moved(fingers, event.pointerId, now, newest.current);
        fingers.set(event.pointerId, now);
      }
      newest.current.point(now);
    },
    { signal },
  );
  const lift = (event: PointerEvent): void => {
    if (!fingers.delete(event.pointerId) || fingers.size > 0) return;
    newest.current.busy(false);
    if (event.pointerType === "touch") newest.current.point(place(event));
  };
  element.addEventListener("pointerup", lift, { signal });
  element.addEventListener("pointercancel", lift, { signal });
  element.addEventListener(
    "pointerleave",
    (event) => event.pointerType === "touch" || newest.current.point(null),
    { signal },
  );
  element.addEventListener(
    "wheel",
    (event) => {
      event.preventDefault();
      const notches = -event.deltaY / (event.deltaMode === WheelEvent.DOM_DELTA_PIXEL ? 100 : 3);
      brieflyBusy();
      newest.current.zoom(zoomStep ** Math.max(-3, Math.min(3, notches)), place(event));
    },
    { signal, passive: false },
  );
  element.addEventListener(
    "keydown",
    (event) => {
      if (event.ctrlKey || event.metaKey || event.altKey || !keyed(event, newest.current)) return;
      event.preventDefault();
      if (!event.shiftKey) brieflyBusy();
    },
    { signal },
  );
  return () => {
    clearTimeout(resting);
    stop.abort();
  };
}

/** One finger drags; of two, the distance zooms and the middle drags. */
function moved(
  fingers: ReadonlyMap<number, readonly [number, number]>,
  id: number,
  now: readonly [number, number],
  gestures: Gestures,
): void {
  const before = fingers.get(id)!;
  const other = [...fingers].find(([finger]) => finger !== id)?.[1];
  const share = other === undefined ? 1 : 0.5;
  gestures.drag((now[0] - before[0]) * share, (now[1] - before[1]) * share);
  if (other === undefined) return;
  const apart = (p: readonly [number, number]): number =>
    Math.max(1, Math.hypot(p[0] - other[0], p[1] - other[1]));
  gestures.zoom(apart(now) / apart(before), [(now[0] + other[0]) / 2, (now[1] + other[1]) / 2]);
}

/** Whether the key meant something here. */
function keyed(event: KeyboardEvent, gestures: Gestures): boolean {
  const arrow = arrows[event.key];
  if (arrow !== undefined) {
    if (event.shiftKey) gestures.cross(arrow, event.repeat);
    else gestures.arrow(...arrow);
    return true;
  }
  switch (event.key) {
    case "+":
    case "=":
      gestures.zoom(zoomStep, null);
      return true;
    case "-":
    case "_":
      gestures.zoom(1 / zoomStep, null);
      return true;
    case "Home":
    case "0":
      gestures.whole();
      return true;
    case "Escape":
      gestures.cross(null, false);
      return true;
    default:
      return false;
  }
}
