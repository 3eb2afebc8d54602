import { useEffect, useState } from "react";

/** The screen's device pixels per CSS pixel; follows zoom and a window moved to another screen. */
export function usePixelRatio(): number {
  const [ratio, setRatio] = useState(window.devicePixelRatio);
  useEffect(() => {
    // The query names one ratio, so it fires once and is made anew for the next.
    const query = window.matchMedia(`(resolution: ${ratio}dppx)`);
    const update = (): void => setRatio(window.devicePixelRatio);
    query.addEventListener("change", update);
    return () => query.removeEventListener("change", update);
  }, [ratio]);
  return ratio;
}
