import { type RefObject, useLayoutEffect, useState } from "react";

/** @returns the width of an element in px, followed as it changes, so that a chart's type stays at the size of the page's. */
export function useWidth(element: RefObject<HTMLElement | null>, before: number): number {
  const [width, setWidth] = useState(before);
  useLayoutEffect(() => {
    const measured = element.current;
    if (measured === null) return;
    const observer = new ResizeObserver(() => setWidth(Math.max(240, Math.round(measured.clientWidth))));
    observer.observe(measured);
    return () => observer.disconnect();
  }, [element]);
  return width;
}
