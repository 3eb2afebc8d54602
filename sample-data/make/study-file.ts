import { writeFileWhole } from "../../main/writers/atomic-file";
import type { Scenario } from "./scenario";

/** The study that opens the sample data; settings it leaves out stand at their defaults. */
export async function writeStudy(scenario: Scenario, path: string): Promise<string> {
  const lastDay = (scenario.gridA.dates - 1) * scenario.gridA.everyDays;
  const lastDate = new Date(Date.parse(scenario.firstDate) + lastDay * 86400e3).toISOString().slice(0, 10);
  const study = {
    strake: 1,
    title: "Halcyon Basin, first look (simulated)",
    grids: [
      { id: "A", label: "Halcyon maps A (simulated)", files: ["grid/halcyon-a-*.nc"], height: "auto" },
      { id: "B", label: "Halcyon maps B (simulated)", files: ["grid/halcyon-b.nc"], height: "auto" },
    ],
    tracks: [
      { id: "P", label: "Plover (simulated)", files: ["tracks/plover.nc"], height: "auto" },
      { id: "D", label: "Dunlin (simulated)", files: ["tracks/dunlin.nc"], height: "auto" },
    ],
    region: { west: -150, east: -125, south: 20, north: 41.5 },
    period: { from: scenario.firstDate, to: lastDate },
    // Standing jets lie in the mean: it stays, and the band is open towards long periods.
    background: { mean: false, trend: false, annual: true, semiannual: true },
    band: { shortestDays: 90, longestDays: null },
  };
  // Lists of one stay on their line, as the formatter of this repository has them.
  const text = JSON.stringify(study, null, 2).replace(/\[\n\s+("[^"]+")\n\s+\]/g, "[$1]");
  await writeFileWhole(path, `${text}\n`);
  return path;
}
