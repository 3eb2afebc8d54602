import { useStore } from "zustand";
import { useBench } from "../../app/bench-context";
import type { ScalesState } from "../../state/scales";

/** One part of the scales' state; the component draws again only when that part changes. */
export function useScalesState<Part>(select: (state: ScalesState) => Part): Part {
  return useStore(useBench().scales.store, select);
}
