import { type RefObject, useLayoutEffect, useState } from "react";

export interface Size {
  readonly width: number;
  readonly height: number;
}

/** Inner size of an element in whole CSS pixels; null before it is laid out. */
export function useSize(element: RefObject<HTMLElement | null>): Size | null {
  const [size, setSize] = useState<Size | null>(null);
  useLayoutEffect(() => {
    const target = element.current;
    if (!target) return;
    const measure = (): void => {
      const width = Math.floor(target.clientWidth);
      const height = Math.floor(target.clientHeight);
      setSize((old) => (old && old.width === width && old.height === height ? old : { width, height }));
    };
    measure();
    const observer = new ResizeObserver(measure);
    observer.observe(target);
    return () => observer.disconnect();
  }, [element]);
  return size;
}
