import { describe, expect, test } from "vitest";
import { defaultFollowSettings } from "../../../../core/jets/follow/follow-jets";
import { followJets } from "../../../../core/jets/follow/jet-lines";
import type { Extreme } from "../../../../core/jets/ridges/find-extremes";
import type { RidgeDate } from "../../../../core/jets/ridges/find-ridges";
import { sphere } from "../earths";

const latitude = Float64Array.from({ length: 81 }, (_, i) => 20 + i * 0.25);
const settings = { ...defaultFollowSettings(0.25), longestGapDates: 2 };

type Core = readonly [latitude: number, speed: number, widthKm?: number];

/** Dates a week apart with the cores given; null for a date without data. */
function ridges(cores: readonly (readonly Core[] | null)[]): RidgeDate[] {
  return cores.map((each, i) => ({
    day: 7 * i,
    observed: new Uint8Array(latitude.length).fill(each ? 1 : 0),
    extremes: (each ?? []).map(
      ([at, speed, widthKm = 150]): Extreme => ({
        sign: speed > 0 ? 1 : -1,
        row: Math.round((at - 20) / 0.25),
        latitude: at,
        speed,
        prominence: Math.abs(speed),
        widthKm,
      }),
    ),
  }));
}

function follow(cores: readonly (readonly Core[] | null)[]) {
  return followJets(ridges(cores), latitude, settings, sphere);
}

describe("following", () => {
  test("two jets of one sign keep apart while both drift", () => {
    const jets = follow([0, 1, 2, 3, 4, 5].map((t) => [[25 + 0.2 * t, 0.1] as const, [26 + 0.2 * t, 0.1] as const]));
    expect(jets.map(({ latitudes }) => [...latitudes])).toEqual([
      [25, 25.2, 25.4, 25.6, 25.8, 26],
      [26, 26.2, 26.4, 26.6, 26.8, 27],
    ]);
  });

  test("an eastward jet is never continued by a westward one", () => {
    const jets = follow([[[25, 0.1]], [[25, -0.1]]]);
    expect(jets.map(({ sign, dates }) => [sign, dates.length])).toEqual([
      [1, 1],
      [-1, 1],
    ]);
  });

  test("a jump beyond half a width, or beyond the fastest migration, starts another jet", () => {
    expect(follow([[[25, 0.1]], [[25.7, 0.1]]])).toHaveLength(2);
    expect(follow([[[25, 0.1, 800]], [[25.55, 0.1, 800]]])).toHaveLength(1);
    expect(follow([[[25, 0.1, 800]], [[25.65, 0.1, 800]]])).toHaveLength(2);
  });

  test("a jet that fades by more than the largest ratio is not continued by what is left", () => {
    expect(follow([[[25, 0.1]], [[25, 0.04]]])).toHaveLength(1);
    expect(follow([[[25, 0.1]], [[25, 0.02]]])).toHaveLength(2);
  });

  test("gaps up to the length set are bridged, longer ones are not", () => {
    const core: readonly Core[] = [[25, 0.1]];
    expect(follow([core, [], [], core])).toHaveLength(1);
    expect(follow([core, [], [], [], core])).toHaveLength(2);
  });

  test("dates without data do not count against a jet", () => {
    const [jet, ...others] = follow([[[25, 0.1]], null, null, null, null, null, [], [[25, 0.1]]]);
    expect(others).toEqual([]);
    expect([...jet.dates]).toEqual([0, 7]);
    expect([...jet.days]).toEqual([0, 49]);
  });
});

describe("births, ends, mergers and splits", () => {
  test("a jet there from the first to the last date with data neither begins nor ends", () => {
    const [jet] = follow([null, [[25, 0.1]], [[25, 0.1]], null]);
    expect(jet.beginning).toEqual({ kind: "record start" });
    expect(jet.ending).toEqual({ kind: "record end" });
  });

  test("a jet alone is born and ends", () => {
    const [jet] = follow([[], [[25, 0.1]], [[25, 0.1]], []]);
    expect(jet.beginning).toEqual({ kind: "birth" });
    expect(jet.ending).toEqual({ kind: "end" });
  });

  test("a jet that ends within half a width of a living one has merged into it", () => {
    const [south, north] = follow([
      [
        [25, 0.1],
        [25.9, 0.08],
      ],
      [
        [25.1, 0.1],
        [25.7, 0.08],
      ],
      [[25.3, 0.11]],
      [[25.3, 0.11]],
    ]);
    expect(north.ending).toEqual({ kind: "merger", into: south.id });
    expect(south.ending).toEqual({ kind: "record end" });
  });

  test("a jet that begins within half a width of a living one has split from it", () => {
    const [parent, child] = follow([
      [[25, 0.1]],
      [[25, 0.1]],
      [
        [25, 0.1],
        [25.5, 0.08],
      ],
      [
        [25, 0.1],
        [25.8, 0.08],
      ],
    ]);
    expect(child.beginning).toEqual({ kind: "split", from: parent.id });
  });

  test("a jet that begins where another one stands too far off is born", () => {
    const [, child] = follow([
      [[25, 0.1]],
      [
        [25, 0.1],
        [26.2, 0.08],
      ],
    ]);
    expect(child.beginning).toEqual({ kind: "birth" });
  });
});
