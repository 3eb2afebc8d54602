import { describe, expect, test } from "vitest";
import { draftOf, type ExtentDraft, readExtent } from "../../renderer/views/sources/extent-draft";

const region = { west: -150, east: -125, south: 20, north: 41 };
const period = { from: "2031-03-01", to: "2033-08-18" };
const good = draftOf(region, period);
const withField = (change: Partial<ExtentDraft>) => readExtent({ ...good, ...change });

describe("region and period as typed", () => {
  test("a study's own region and period read back as they are", () => {
    expect(readExtent(good)).toEqual({ region, period, faults: {} });
  });

  test("all fields blank means all there is", () => {
    expect(readExtent(draftOf(undefined, undefined))).toEqual({ region: undefined, period: undefined, faults: {} });
  });

  test("a region that is only half given is at fault where it is blank", () => {
    expect(Object.keys(withField({ west: "" }).faults)).toEqual(["west"]);
    expect(Object.keys(withField({ to: " " }).faults)).toEqual(["to"]);
  });

  test("numbers may carry a typographic minus or a decimal comma", () => {
    expect(withField({ west: "−150,5" }).region?.west).toBe(-150.5);
  });

  test("what is no number, out of range, the wrong way round or no date is told field by field", () => {
    expect(Object.keys(withField({ west: "abc" }).faults)).toEqual(["west"]);
    expect(Object.keys(withField({ north: "91" }).faults)).toEqual(["north"]);
    expect(Object.keys(withField({ north: "20" }).faults)).toEqual(["north"]);
    expect(Object.keys(withField({ east: "-150" }).faults)).toEqual(["east"]);
    expect(Object.keys(withField({ from: "2031-3-1" }).faults)).toEqual(["from"]);
    expect(Object.keys(withField({ from: "2031-13-01" }).faults)).toEqual(["from"]);
    expect(Object.keys(withField({ to: "2031-03-01" }).faults)).toEqual(["to"]);
    expect(withField({ west: "1e999" }).faults.west).toBeDefined();
  });

  test("a region across the date line may have its east below its west", () => {
    expect(withField({ west: "170", east: "-170" }).faults).toEqual({});
  });
});
