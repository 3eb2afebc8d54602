import { readFileSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import type { OpenStudy } from "../../../core/contract/engine";
import type { Fault } from "../../../core/model/errors";
import type { Plane } from "../../../core/model/results";
import type { ScalesResult } from "../../../core/model/scales-result";
import { createEngine } from "../../../main/engine/engine";
import { expectClose } from "../../expect-close";
import { line, studyOf, writeMadeGrid } from "../../properties/made-grid";
import { sampleStudy, smallCut } from "../../sample";
import { temporaryFolder } from "../../temporary-folder";

const temporary = temporaryFolder();
const engine = createEngine({ workers: 2 });
afterAll(() => engine.close());

const radian = Math.PI / 180;
const kilometresPerDegree = 6371 * radian;
const sphere = { earth: "sphere", gravity: 9.81 };

/** Every picture of a result, by name. */
function pictures(result: ScalesResult): [string, Plane | undefined][] {
  return [
    ["energy", result.plane?.density],
    ["frequency and wavenumber", result.frequencyWavenumber?.density],
    ["drift along", result.drift.alongLatitude?.picture],
    ["drift across", result.drift.acrossLatitudes?.picture],
    ["forcing", result.forcing.latitudeTime],
    ["share", result.persistence.share],
    ["longest", result.persistence.longestDays],
  ];
}

function expectPicturesToShow(result: ScalesResult): void {
  for (const [name, plane] of pictures(result)) {
    if (!plane) continue;
    expect(plane.values.length, name).toBe(plane.rows * plane.columns);
    expect(plane.values.some(Number.isFinite), name).toBe(true);
  }
}

describe("a plane wave of 1000 km by 300 km about 30 degrees north that moves west at 10 cm/s", () => {
  const [zonalDegrees, meridionalDegrees] = [
    1000 / (kilometresPerDegree * Math.cos(30 * radian)),
    300 / kilometresPerDegree,
  ];
  const amplitude = 0.05;
  let result: ScalesResult;

  beforeAll(async () => {
    // Two waves along, four across, a whole number of cells each.
    const file = await writeMadeGrid(join(temporary, "wave.nc"), {
      latitudes: line(30 - 2 * meridionalDegrees, meridionalDegrees / 11, 45),
      longitudes: line(-140, zonalDegrees / 40, 80),
      days: line(20_000, 3, 240),
      height: (day, latitude, longitude) =>
        amplitude *
        Math.cos(
          2 * Math.PI * ((longitude + 140) / zonalDegrees + (latitude - 30) / meridionalDegrees) +
            (2 * Math.PI * 0.1 * (day - 20_000) * 86_400) / 1e6,
        ),
    });
    result = await engine.scales({ open: studyOf([file], { geostrophy: sphere }), grid: "A", latitude: 30 });
  });

  test("has a zonality of .83486 whatever the averaging", () => {
    const because = "a wavelength in degrees is not one length on a sphere, and averages of few blocks";
    expect(result.zonality.days[0]).toBe(3);
    expectClose(result.zonality.zonality[0], 0.83486, { absolute: 0.01, because });
    expectClose(result.zonality.zonality[1], 0.83486, { absolute: 0.01, because });
  });

  test("shows its wavelengths in the spectra of maps and of the longitude-time picture", () => {
    expectClose(result.lengths.peakWavelength.value, 300_000, {
      relative: 0.03,
      because: "four waves under a Hann window",
    });
    expectClose(result.waves.zonalWavelength, 1e6, { relative: 0.1, because: "two waves under a Hann window" });
    const { frequencyWavenumber: spectrum } = result;
    if (!spectrum) throw new Error("no spectrum");
    const best = spectrum.density.values.reduce((top, value, i, all) => (value > all[top] ? i : top), 0);
    const { wavenumber, frequency } = spectrum;
    expect(Math.abs(wavenumber[best % wavenumber.length] + 1e-6)).toBeLessThan(0.3e-6);
    expect(Math.abs(frequency[Math.floor(best / wavenumber.length)] - 0.00864)).toBeLessThan(frequency[1]);
  });

  test("drifts west at its speed along 30 degrees", () => {
    expect(result.alongLatitude).toBeCloseTo(30, 9);
    const { drift } = result;
    expectClose(drift.alongLatitude?.speed.value ?? 0, -0.1, {
      relative: 0.02,
      because: "a fraction of an angle step",
    });
    expect(drift.alongLatitude?.share).toBeGreaterThan(0.9);
  });

  test("carries the momentum flux of its tilt and has the speed of its amplitude", () => {
    const row = result.latitude.length >> 1;
    const f = 2 * 7.292115e-5 * Math.sin(30 * radian);
    const [k, l] = [(2 * Math.PI) / 1e6, (2 * Math.PI) / 3e5];
    const because = "a mean over whole waves, but for the cell that closes the circle";
    expectClose(result.forcing.flux[row], (-k * l * ((9.81 / f) * amplitude) ** 2) / 2, { relative: 0.03, because });
    expectClose(result.byLatitude.eddySpeed[row], (Math.hypot(k, l) * 9.81 * amplitude) / f / Math.SQRT2, {
      relative: 0.03,
      because,
    });
  });

  test("keeps neither sign: about half of the dates, for half a period at most", () => {
    const { share, longestDays } = result.persistence;
    const middle = (share.rows >> 1) * share.columns + (share.columns >> 1);
    expect(share.values[middle]).toBeLessThan(0.56);
    expect(longestDays.values[middle]).toBeLessThanOrEqual(1e6 / 0.1 / 86_400 / 2 + 3);
  });
});

describe("standing jets 400 km apart with land", () => {
  const landRow = 8;
  const open = async (): Promise<OpenStudy> => {
    const latitudes = line(20, 0.25, 81);
    const file = await writeMadeGrid(join(temporary, "jets.nc"), {
      latitudes,
      longitudes: line(-150, 0.25, 60),
      days: line(20_000, 5, 80),
      height: (day, latitude, longitude) => {
        if (latitude === latitudes[landRow] || longitude > -138) return Number.NaN;
        const north = latitude * kilometresPerDegree;
        const flicker = 0.002 * Math.sin(longitude * 2 + day / 9) * Math.sin(latitude * 3 - day / 7);
        return 0.05 * Math.sin((2 * Math.PI * north) / 400) * Math.sin(latitude * radian) + flicker;
      },
    });
    return studyOf([file], { geostrophy: sphere });
  };

  test("have their spacing, keep their sign all the time, and stand still", async () => {
    const result = await engine.scales({ open: await open(), grid: "A" });
    expectClose(result.lengths.meanSpacing, 400_000, { relative: 0.02, because: "a land row cuts one of five waves" });
    expectClose(result.lengths.timeMeanPeakWavelength, 400_000, { relative: 0.06, because: "bins of five waves" });
    const { share, longestDays } = result.persistence;
    const shares = Array.from(share.values).filter(Number.isFinite);
    expect(shares.filter((value) => value === 1).length / shares.length).toBeGreaterThan(0.7);
    expect(Math.max(...longestDays.values.filter(Number.isFinite))).toBe(400);
    expect(share.values[landRow * share.columns]).toBeNaN();
    expectPicturesToShow(result);
  });

  test("along a row of land there is neither drift nor wave, and a note says so", async () => {
    const result = await engine.scales({ open: await open(), grid: "A", latitude: 22 });
    expect(result.alongLatitude).toBe(22);
    expect(result.drift.alongLatitude).toBeNull();
    expect(result.frequencyWavenumber).toBeNull();
    expect(result.notes.join(" ")).toMatch(/No drift along 22\.00° N/);
    expectPicturesToShow(result);
  });

  test("a latitude outside the region is refused", async () => {
    await expect(engine.scales({ open: await open(), grid: "A", latitude: 50 })).rejects.toThrow(
      /latitude: expected a latitude from 20 to 40, got 50/,
    );
  });
});

describe("the sample", () => {
  let result: ScalesResult;
  beforeAll(async () => {
    result = await engine.scales({ open: sampleStudy(), grid: "A" });
  });

  test("has jets about 480 km apart, and the Rhines scale 2 pi sqrt(2U/beta) of the whole flow is of that size", () => {
    const { meanSpacing, timeMeanPeakWavelength, rhines } = result.lengths;
    const because = "five pairs that wander, of which the region holds a part";
    expectClose(meanSpacing, 480_000, { relative: 0.1, because });
    expectClose(timeMeanPeakWavelength, 480_000, { relative: 0.1, because });
    expect(rhines["root-two-wavelength"].total / meanSpacing).toBeGreaterThan(0.7);
    expect(rhines["root-two-wavelength"].total / meanSpacing).toBeLessThan(1.4);
  });

  test("becomes more zonal the longer it is averaged", () => {
    const { days, zonality } = result.zonality;
    expect(Array.from(days)).toEqual([3, 9, 30, 90, 180, 450]);
    for (let i = 1; i < zonality.length; i++) expect(zonality[i]).toBeGreaterThan(zonality[i - 1]);
  });

  test("has finite, plausible numbers", () => {
    const { energy, plane, lengths, waves, forcing } = result;
    const shares = [energy?.weeksShare, energy?.monthsShare, energy?.longerShare, plane?.shareInside];
    for (const share of shares) {
      expect(share).toBeGreaterThan(0);
      expect(share).toBeLessThan(1);
    }
    expect(lengths.totalSpeed).toBeGreaterThan(lengths.eddySpeed);
    expect(lengths.totalSpeed).toBeLessThan(0.2);
    expect(waves.longWave).toBeLessThan(-0.01);
    expect(waves.longWave).toBeGreaterThan(-0.05);
    for (const { halfWavelength } of lengths.ruler) {
      expect(halfWavelength.value).toBeGreaterThan(10_000);
      expect(halfWavelength.value).toBeLessThan(600_000);
    }
    expect(forcing.gradient.filter(Number.isFinite).every((value) => Math.abs(value) < 1e-10)).toBe(true);
    expect(result.notes).toEqual([
      expect.stringMatching(/built-in table/),
      expect.stringMatching(/first baroclinic mode's/),
    ]);
    expectPicturesToShow(result);
  });

  test("a free barotropic sea drifts west along its middle, faster than waves of the deformation radius", () => {
    const { speed } = result.drift.alongLatitude ?? { speed: { value: 0, low95: 0, high95: 0 } };
    expect(speed.high95).toBeLessThan(result.waves.longWave);
  });
});

test("one and two workers find the same bits", async () => {
  const found: ScalesResult[] = [];
  for (const workers of [1, 2]) {
    const own = createEngine({ workers });
    found.push(await own.scales({ open: sampleStudy(smallCut), grid: "A" }));
    await own.close();
  }
  expect(found[1]).toEqual(found[0]);
});

test("a cancel ends the work, and the same work can be done afterwards", async () => {
  const own = createEngine({ workers: 2 });
  for (const wait of [50, 1500, 4000]) {
    const stop = new AbortController();
    const running = own.scales({ open: sampleStudy(), grid: "A" }, { signal: stop.signal }).then(
      () => "done",
      (error: Fault) => error.tag,
    );
    await new Promise((done) => setTimeout(done, wait));
    stop.abort();
    expect(["cancelled", wait === 4000 ? "done" : "cancelled"]).toContain(await running);
  }
  expect((await own.scales({ open: sampleStudy(smallCut), grid: "A" })).lengths.totalSpeed).toBeGreaterThan(0);
  await own.close();
});

describe("little data", () => {
  const none = { mean: false, trend: false, annual: false, semiannual: false };
  const plain = { band: { filter: "none" }, background: none, region: smallCut.region };

  test.each([
    ["three dates", { from: "2031-03-03", to: "2031-03-10" }, 3],
    ["one date", { from: "2031-03-03", to: "2031-03-04" }, 1],
  ])("%s leave lengths, and lines that say what is missing", async (_, period, dates) => {
    const result = await engine.scales({ open: sampleStudy({ ...plain, period }), grid: "A" });
    expect(result.mapDates.length).toBe(dates);
    expect([result.period, result.energy, result.frequencyWavenumber]).toEqual([null, null, null]);
    expect(result.lengths.totalSpeed).toBeGreaterThan(0);
    expect(result.lengths.peakWavelength.low95).toBeNaN();
    expect(result.notes.join(" ")).toMatch(/No spectrum by period: fewer than 16 dates/);
    expect(Number.isNaN(result.lengths.eddySpeed)).toBe(dates < 2);
    expect(/rests on the speed of the eddies, which is unknown/.test(result.notes.join(" "))).toBe(dates < 2);
    expect(result.notes.join(" ")).not.toMatch(/on half its cells/);
    expectPicturesToShow(result);
  });

  test("two rows are refused with one line", async () => {
    const region = { west: -150, east: -125, south: 20, north: 20.5 };
    await expect(engine.scales({ open: sampleStudy({ region }), grid: "A" })).rejects.toThrow(/at least 3 latitudes/);
  });
});

test("across the blanked equator the belt is blank, the rest is not, and the middle row's absence is said", async () => {
  const file = await writeMadeGrid(join(temporary, "equator.nc"), {
    latitudes: line(-10, 0.5, 41),
    longitudes: line(-150, 0.5, 40),
    days: line(20_000, 5, 60),
    height: (day, latitude, longitude) => 0.05 * Math.sin(latitude * 2 + day / 9) * Math.cos(longitude / 2 + day / 20),
  });
  const open = studyOf([file], { geostrophy: sphere });
  const result = await engine.scales({ open, grid: "A" });
  expect(result.middleLatitude).toBe(0);
  expect(result.byLatitude.totalSpeed[20]).toBeNaN();
  expect(result.byLatitude.totalSpeed[2]).toBeGreaterThan(0);
  expect(result.drift.alongLatitude).toBeNull();
  expect(result.notes.join(" ")).toMatch(/No drift along 0\.00°/);
  expectPicturesToShow(result);
  const { cautions } = await engine.load({ open, grid: "A" });
  expect(cautions.find(({ id }) => id === "equator")?.text).toMatch(/19 rows within 5° of the equator are blank/);
});

test("the sample's maps are alike from end to end: no caution on their data, one on tides in the band", async () => {
  const { cautions } = await engine.load({ open: sampleStudy(), grid: "A" });
  const ids = cautions.map(({ id }) => id);
  expect(ids).not.toContain("unlikeMaps");
  expect(ids).toContain("tides");
});

describe("deformation radius", () => {
  const withRadius = (deformation: unknown) => sampleStudy({ ...smallCut, scales: { deformation } });

  test("comes from a file beside the study, or from a wave speed", async () => {
    const file = join(temporary, "radius.csv");
    writeFileSync(file, "latitude,km\n20,60\n40,20\n");
    const fromFile = await engine.scales({ open: withRadius({ file }), grid: "A" });
    const { latitude, byLatitude, lengths } = fromFile;
    expect(lengths.deformationSource).toBe("file");
    expectClose(byLatitude.deformationRadius[0], (60 - 2 * (latitude[0] - 20)) * 1000, {
      relative: 1e-12,
      because: "a straight line between two entries",
    });
    const fromSpeed = await engine.scales({ open: withRadius({ waveSpeed: 2.7 }), grid: "A" });
    const f = 2 * 7.292115e-5 * Math.sin(fromSpeed.middleLatitude * radian);
    expectClose(fromSpeed.lengths.deformationRadius, 2.7 / f, { relative: 1e-9, because: "c / f" });
    const saved = join(temporary, "moved.study.json");
    await engine.save({ open: withRadius({ file }), path: saved });
    expect(JSON.parse(readFileSync(saved, "utf8")).scales.deformation.file).toBe("radius.csv");
  });

  test.each([
    ["no-such.csv", /no-such\.csv: expected a text file.*got no such file/],
    [".", /got a folder/],
  ])("a file that cannot be read (%s) is named", async (file, pattern) => {
    await expect(engine.scales({ open: withRadius({ file }), grid: "A" })).rejects.toThrow(pattern);
  });
});

test("a run writes scales.csv and spectra.csv with units, and headline numbers that are the engine's", async () => {
  const folder = join(temporary, "run");
  const open = sampleStudy({ ...smallCut, outputs: { fields: "none", figures: [] } });
  const { files } = await engine.run({ open, folder, overwrite: false });
  expect(files).toEqual(expect.arrayContaining(["scales.csv", "spectra.csv"]));
  const result = await engine.scales({ open, grid: "A" });
  const table = (name: string) =>
    readFileSync(join(folder, name), "utf8")
      .trim()
      .split("\n")
      .map((each) => each.split(","));
  const scales = table("scales.csv");
  expect(scales.length).toBe(1 + result.latitude.length);
  expect(scales[0].every((title) => /\[.+\]$/.test(title))).toBe(true);
  expect(scales.every((row) => row.length === scales[0].length)).toBe(true);
  expect(scales[0][2]).toBe("rms eddy speed [m s-1]");
  expect(Number(scales[3][2])).toBe(result.byLatitude.eddySpeed[2]);
  const spectra = table("spectra.csv");
  expect(spectra.every((row) => row.length === spectra[0].length)).toBe(true);
  const kinds = new Set(spectra.slice(1).map(([kind]) => kind));
  expect([...kinds]).toEqual([
    "period",
    "zonal of each map",
    "zonal of the time mean",
    "zonal in the band",
    "meridional of each map",
    "meridional of the time mean",
    "meridional in the band",
  ]);
  const summary = JSON.parse(readFileSync(join(folder, "summary.json"), "utf8"));
  expect(summary.scales.rmsEddySpeed).toEqual({ value: result.lengths.eddySpeed, unit: "m s-1" });
  expect(summary.scales.energyToMeanFlow.unit).toBe("W kg-1");
  expect(readFileSync(join(folder, "methods.md"), "utf8")).toMatch(/the Rhines scale takes|The Rhines scale takes/i);
});
