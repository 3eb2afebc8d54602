import { join } from "node:path";
import { type NetcdfVariable, writeNetcdf4 } from "../../main/writers/netcdf4";
import type { TrackSamples } from "./along-track";
import type { Scenario } from "./scenario";
import { simulatedNotice } from "./wording";

/** One file a mission: a plain row of observations with pass and cycle numbers; packed integers. */
export async function writeTracks(
  scenario: Scenario,
  tracks: readonly TrackSamples[],
  folder: string,
): Promise<string[]> {
  const files: string[] = [];
  for (const samples of tracks) {
    const path = join(folder, `${samples.points.mission.name.toLowerCase()}.nc`);
    await writeTrack(path, scenario, samples);
    files.push(path);
  }
  return files;
}

async function writeTrack(path: string, scenario: Scenario, { points, height }: TrackSamples): Promise<void> {
  const { mission, count } = points;
  // Whole milliseconds: finer than the sampling by a thousand and smaller once packed.
  const seconds = points.days.map((value) => Math.round(value * 86400e3) / 1e3);
  const common = { dimensions: ["obs"], chunks: [Math.min(count, 16384)], gzipLevel: 9 };
  const variables: NetcdfVariable[] = [
    {
      ...common,
      name: "time",
      type: "float64",
      values: seconds,
      attributes: {
        standard_name: "time",
        long_name: "time of the observation",
        units: `seconds since ${scenario.firstDate} 00:00:00`,
        calendar: "standard",
      },
    },
    {
      ...common,
      name: "latitude",
      type: "int32",
      values: Int32Array.from(points.latitude, (value) => Math.round(value * 1e6)),
      attributes: { standard_name: "latitude", units: "degrees_north", scale_factor: 1e-6, add_offset: 0 },
    },
    {
      ...common,
      name: "longitude",
      type: "int32",
      values: Int32Array.from(points.longitude, (value) => Math.round(value * 1e6)),
      attributes: { standard_name: "longitude", units: "degrees_east", scale_factor: 1e-6, add_offset: 0 },
    },
    {
      ...common,
      name: "cycle",
      type: "int16",
      values: points.cycle,
      attributes: { long_name: "cycle number", units: "1" },
    },
    {
      ...common,
      name: "pass",
      type: "int16",
      values: points.pass,
      attributes: { long_name: "half revolution within the cycle, odd ones ascending", units: "1" },
    },
    {
      ...common,
      name: "adt",
      type: "int16",
      values: Int16Array.from(height, (value) => Math.round(value / 1e-3)),
      fillValue: -32767,
      attributes: {
        standard_name: "sea_surface_height_above_geoid",
        long_name: "simulated height of the sea surface above the geoid",
        units: "m",
        scale_factor: 1e-3,
        add_offset: 0,
        coordinates: "time latitude longitude",
      },
    },
  ];
  await writeNetcdf4(path, {
    dimensions: { obs: count },
    attributes: {
      ...simulatedNotice(`Simulated along-track sea-surface height of the invented mission ${mission.name}`),
      platform: `${mission.name} (invented)`,
      comment: `Circular orbit, inclination ${mission.inclinationDegrees} degrees, ${mission.revolutions} revolutions in ${mission.repeatDays} days; white noise of ${mission.noiseMetres * 100} cm added; points on land left out.`,
      inclination_degrees: mission.inclinationDegrees,
      repeat_days: mission.repeatDays,
      revolutions_per_cycle: mission.revolutions,
      nodal_days_per_cycle: mission.nodalDays,
    },
    variables,
  });
}
