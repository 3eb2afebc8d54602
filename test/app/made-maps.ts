import { writeClassic } from "../main/readers/write-classic";

const gravity = 9.81;
const radiusMetres = 6_371_000;
const rotation = 7.292115e-5;
const radians = Math.PI / 180;

/** Half-degree maps of a wavy sea. `dates` maps three days apart, with velocities by 3-point differences on a sphere. */
export function writeMadeMaps(path: string, dates: number, withVelocities: boolean): void {
  const [rows, columns] = [24, 30];
  const latitude = Float64Array.from({ length: rows }, (_, row) => 24 + 0.5 * row);
  const longitude = Float64Array.from({ length: columns }, (_, column) => -150 + 0.5 * column);
  const height = (date: number, row: number, column: number): number =>
    0.1 * Math.sin(row / 2.1 + 0.3 * Math.sin(date / 9)) + 0.04 * Math.sin(column / 3 - date / 7 + row / 5);
  const plane = (value: (date: number, row: number, column: number) => number): Float32Array =>
    Float32Array.from({ length: dates * rows * columns }, (_, cell) =>
      value(Math.floor(cell / (rows * columns)), Math.floor(cell / columns) % rows, cell % columns),
    );
  const overF = (row: number): number => gravity / (2 * rotation * Math.sin(latitude[row] * radians));
  const step = 0.5 * radians * radiusMetres;
  const u = plane(
    (date, row, column) => (-overF(row) * (height(date, row + 1, column) - height(date, row - 1, column))) / (2 * step),
  );
  const v = plane(
    (date, row, column) =>
      (overF(row) * (height(date, row, column + 1) - height(date, row, column - 1))) /
      (2 * step * Math.cos(latitude[row] * radians)),
  );
  const dimensions = ["time", "latitude", "longitude"];
  const speed = (component: string) => ({
    standard_name: `surface_geostrophic_${component}_sea_water_velocity`,
    units: "m s-1",
  });
  writeClassic(path, {
    dimensions: { time: dates, latitude: rows, longitude: columns },
    variables: [
      {
        name: "time",
        dimensions: ["time"],
        attributes: { standard_name: "time", units: "days since 2031-01-01" },
        values: Float64Array.from({ length: dates }, (_, date) => 3 * date),
      },
      {
        name: "latitude",
        dimensions: ["latitude"],
        attributes: { standard_name: "latitude", units: "degrees_north" },
        values: latitude,
      },
      {
        name: "longitude",
        dimensions: ["longitude"],
        attributes: { standard_name: "longitude", units: "degrees_east" },
        values: longitude,
      },
      {
        name: "adt",
        dimensions,
        attributes: { standard_name: "sea_surface_height_above_geoid", units: "m" },
        values: plane(height),
      },
      ...(withVelocities
        ? [
            { name: "ugos", dimensions, attributes: speed("eastward"), values: u },
            { name: "vgos", dimensions, attributes: speed("northward"), values: v },
          ]
        : []),
    ],
  });
}
