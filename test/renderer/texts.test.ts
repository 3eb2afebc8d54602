import { describe, expect, test } from "vitest";
import { makeAxis, makeTimeAxis } from "../../core/model/axis";
import { joinPath, pathsFromText } from "../../renderer/state/paths";
import { bytesText, datesText, periodText, recordText } from "../../renderer/text/record";
import { spokenCursor } from "../../renderer/text/spoken";
import { doubtText, intervalText, valueStyle, valueText } from "../../renderer/text/values";
import { coverageBars } from "../../renderer/views/sources/CoverageBar";
import { shortened } from "../../renderer/views/sources/Facts";

describe("values in words", () => {
  const style = valueStyle("m s-1", 0.22);

  test("velocities show in cm per second with a real minus sign and steady decimals", () => {
    expect(valueText(style, -0.0123)).toBe("−1.2 cm s⁻¹");
    expect(valueText(style, 0.2)).toBe("20.0 cm s⁻¹");
  });

  test("a missing value says so and is never a number", () => {
    expect(valueText(style, Number.NaN)).toBe("no data");
    expect(intervalText(style, Number.NaN, 0.1)).toBe("no data");
    expect(intervalText(style, 0.1, Number.NaN)).toBe("10.0 ± – cm s⁻¹");
  });

  test("a value with a known error shows what 95 % of such errors lie within", () => {
    expect(doubtText(style, 0.1, 0.01)).toBe("10.0 ± 2.0 cm s⁻¹");
    expect(doubtText(style, 0.1, undefined)).toBe("10.0 cm s⁻¹");
    expect(doubtText(style, 0.1, Number.NaN)).toBe("10.0 cm s⁻¹");
    expect(doubtText(style, Number.NaN, 0.01)).toBe("no data");
  });

  test("a record of one date lasts a day, not days", () => {
    const [latitude, longitude] = [makeAxis("latitude", [20, 21], ""), makeAxis("longitude", [0, 1], "")];
    const lasting = (days: number[]) => recordText({ latitude, longitude, time: makeTimeAxis(days, "standard", "") });
    expect(lasting([100])).toMatch(/ · 1 day$/);
    expect(lasting([100, 103])).toMatch(/ · 6 days$/);
  });

  test("a limit of zero or none still gives a style", () => {
    for (const limit of [0, Number.NaN, Number.POSITIVE_INFINITY])
      expect(valueText(valueStyle("1", limit), 0.5)).toBe("0.50");
  });

  test("a screen reader hears words for signs and units", () => {
    expect(spokenCursor("31.40° N", "24 May 2032", valueText(style, -0.0123))).toBe(
      "31.40 degrees north, 24 May 2032: minus 1.2 centimetres per second",
    );
    expect(spokenCursor("0°", "1 June 2032", "no data")).toBe("0 degrees, 1 June 2032: no data");
  });

  test("bytes show in the largest unit that leaves a number of one or more", () => {
    expect([0, 999, 20_600_000, 3e12].map(bytesText)).toEqual(["0 bytes", "999 bytes", "20.6 MB", "3.0 TB"]);
  });
});

describe("paths in text", () => {
  test("one path a line, quotes and blank lines dropped", () => {
    expect(pathsFromText('  "/a b/c.nc"\r\n\n/d.nc ')).toEqual(["/a b/c.nc", "/d.nc"]);
  });

  test("a path joins its folder unless it stands by itself", () => {
    expect(joinPath("/data", "grid/*.nc")).toBe("/data/grid/*.nc");
    expect(joinPath("/data", "/other/x.nc")).toBe("/other/x.nc");
    expect(joinPath("C:\\data", "x.nc")).toBe("C:\\data\\x.nc");
    expect(joinPath("/data", "C:\\x.nc")).toBe("C:\\x.nc");
  });
});

describe("long things are shown short", () => {
  test("a text of a megabyte is cut", () => {
    expect(shortened("x".repeat(2 ** 20)).length).toBeLessThan(500);
    expect(shortened("short")).toBe("short");
  });

  test("thinning the coverage hides no gap", () => {
    const coverage = new Float64Array(10_000).fill(1);
    coverage[7777] = 0;
    expect(coverageBars(coverage, 600).filter((share) => share === 0)).toHaveLength(1);
    expect(coverageBars([1, 0.5], 600)).toEqual([1, 0.5]);
  });
});

test("a record of one date says so once, and longer ones count their dates", () => {
  const axisOf = (...days: readonly number[]) => makeTimeAxis(days, "standard", "made up");
  expect(datesText(axisOf(9000))).toBe("one date");
  expect(periodText(axisOf(9000))).not.toContain(" to ");
  expect(datesText(axisOf(9000, 9001))).toBe("2 dates, daily");
  expect(datesText(axisOf(9000, 9007, 9014))).toBe("3 dates, every 7 days");
});
