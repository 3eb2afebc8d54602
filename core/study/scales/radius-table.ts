import type { RadiusTable } from "../../jets/scales/deformation-radius";
import { Fault } from "../../model/errors";

/**
 * A person's own table of deformation radii: lines of latitude in degrees north and radius in kilometres, a comma between,
 * latitudes rising or falling, a header line and empty lines allowed, lines that begin with # left out. Errors: Fault "file"
 * that names the line.
 */
export function parseRadiusTable(text: string, where: string): RadiusTable {
  const pairs: [latitude: number, radiusKm: number][] = [];
  text
    .replace(/^\uFEFF/, "")
    .split(/\r\n|\n|\r/)
    .forEach((line, i) => {
      if (line.trim() === "" || line.trimStart().startsWith("#")) return;
      const parts = line.split(",").map((part) => (part.trim() === "" ? Number.NaN : Number(part)));
      const isHeader = pairs.length === 0 && parts.every(Number.isNaN);
      if (isHeader) return;
      const [latitude, radiusKm] = parts;
      if (parts.length !== 2 || !(Math.abs(latitude) <= 90) || !(radiusKm > 0 && radiusKm <= 1000)) {
        throw tableFault(
          `${where}, line ${i + 1}`,
          "a latitude from -90 to 90 and a radius from 0 to 1000 km",
          line.trim(),
        );
      }
      pairs.push([latitude, radiusKm]);
    });
  if (pairs.length < 2) throw tableFault(where, "at least two lines of latitude, km", `${pairs.length}`);
  pairs.sort(([a], [b]) => a - b);
  const twice = pairs.findIndex(([latitude], i) => i > 0 && latitude === pairs[i - 1][0]);
  if (twice > 0) throw tableFault(where, "every latitude once", `${pairs[twice][0]} twice`);
  return {
    latitude: pairs.map(([latitude]) => latitude),
    radiusKm: pairs.map(([, radiusKm]) => radiusKm),
    symmetric: false,
  };
}

function tableFault(where: string, expected: string, got: string): Fault {
  return new Fault({
    tag: "file",
    where,
    expected,
    got: got.slice(0, 80),
    advice: 'mend the file, or set scales.deformation to "table"',
  });
}
