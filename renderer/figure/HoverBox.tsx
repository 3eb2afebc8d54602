import { useLayoutEffect, useRef, useState } from "react";
import { Units } from "../text/Units";
import type { Size } from "./use-size";

interface HoverBoxProps {
  readonly x: number;
  readonly y: number;
  readonly value: string;
  readonly place: string;
  readonly bounds: Size;
}

const distance = 14;

/** The value under the pointer, beside it on whichever side has room. */
export function HoverBox({ x, y, value, place, bounds }: HoverBoxProps) {
  const box = useRef<HTMLDivElement>(null);
  const [size, setSize] = useState<Size>({ width: 150, height: 46 });
  useLayoutEffect(() => {
    if (!box.current) return;
    const { offsetWidth: width, offsetHeight: height } = box.current;
    setSize((old) => (old.width === width && old.height === height ? old : { width, height }));
  });
  const left = x + distance + size.width > bounds.width ? x - distance - size.width : x + distance;
  const top = y - distance - size.height < 0 ? y + distance : y - distance - size.height;
  return (
    <div ref={box} className="hover" style={{ transform: `translate(${Math.round(left)}px, ${Math.round(top)}px)` }}>
      <strong>
        <Units text={value} />
      </strong>
      <span className="place">{place}</span>
    </div>
  );
}
