import { createContext, useContext } from "react";
import { useStore } from "zustand";
import type { Bench } from "../state/bench";
import type { BenchState } from "../state/bench-state";

export const BenchContext = createContext<Bench | null>(null);

export function useBench(): Bench {
  const bench = useContext(BenchContext);
  if (!bench) throw new Error("a component that needs the bench stands outside of it");
  return bench;
}

/** One part of the state; the component draws again only when that part changes. */
export function useBenchState<Part>(select: (state: BenchState) => Part): Part {
  return useStore(useBench().store, select);
}
