/** The size of what is drawn on, as it changes. */
import { useEffect, useState } from "preact/hooks";

export interface Box {
  /** px. */
  readonly width: number;
  readonly height: number;
}

/** The size of the element's parent; 0 × 0 before it is known. */
export function useSize(element: { readonly current: Element | null }): Box {
  const [box, setBox] = useState<Box>({ width: 0, height: 0 });
  useEffect(() => {
    const parent = element.current?.parentElement;
    if (!parent) return;
    const watch = new ResizeObserver(() => {
      const { clientWidth: width, clientHeight: height } = parent;
      setBox((now) => (now.width === width && now.height === height ? now : { width, height }));
    });
    watch.observe(parent);
    return () => watch.disconnect();
  }, [element]);
  return box;
}

/** Device pixels to draw for a px; more than two cost time and show nothing. */
export const ratioNow = (): number => Math.min(2, devicePixelRatio);
