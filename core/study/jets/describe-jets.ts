import { describeJet } from "../../jets/describe-jet";
import type { FollowedJet } from "../../jets/follow/jet-lines";
import type { ExtremeSettings } from "../../jets/ridges/find-extremes";
import type { RidgeDate } from "../../jets/ridges/find-ridges";
import type { Sectors } from "../../jets/ridges/sectors";
import { findSectorExtremes, type ZonalExtent, zonalExtent } from "../../jets/ridges/zonal-extent";
import type { TimeAxis } from "../../model/axis";
import type { JetRow } from "../../model/jets-result";
import { yearLengthDays } from "../../model/year-length";
import type { EarthSettings } from "../../ocean/earth";

/** Sector means in the field's own band on some dates: `means[(i * sectors + s) * rows + row]` for the i-th of `dates`. */
export interface SectorRecord {
  readonly sectors: Sectors;
  readonly dates: Int32Array;
  readonly means: Float64Array;
}

/** The table of jets, from south to north: each line summarised, its extent and tilt taken from the sectors' dates. */
export function describeJets(
  lines: readonly FollowedJet[],
  record: { readonly latitude: Float64Array; readonly time: TimeAxis; readonly hasData: Uint8Array },
  ridges: readonly RidgeDate[],
  sectorRecord: SectorRecord,
  extreme: ExtremeSettings,
  earth: EarthSettings,
): JetRow[] {
  const datesWithData = record.hasData.reduce((sum, flag) => sum + flag, 0);
  const extents = extentsByLine(lines, record.latitude, ridges, sectorRecord, extreme, earth);
  const rows = lines.map((line): JetRow => {
    const {
      latitudeMemory,
      speedMemory: _,
      tiltDegreesPerDegree: __,
      ...summary
    } = describeJet(line, {
      hasData: record.hasData,
      stepDays: record.time.step,
      yearDays: yearLengthDays(record.time.calendar),
      earth,
      extents: extents.get(line.id) ?? [],
    });
    return {
      ...summary,
      shareOfRecord: line.dates.length / datesWithData,
      ...latitudeMemory,
      beginning: line.beginning.kind === "split" ? `split from ${line.beginning.from}` : line.beginning.kind,
      ending: line.ending.kind === "merger" ? `merger into ${line.ending.into}` : line.ending.kind,
      dates: line.dates,
      latitudes: line.latitudes,
    };
  });
  return rows.sort((a, b) => a.meanLatitude - b.meanLatitude);
}

function extentsByLine(
  lines: readonly FollowedJet[],
  latitude: Float64Array,
  ridges: readonly RidgeDate[],
  { sectors, dates, means }: SectorRecord,
  extreme: ExtremeSettings,
  earth: EarthSettings,
): Map<number, ZonalExtent[]> {
  const found = new Map<number, ZonalExtent[]>(lines.map(({ id }) => [id, []]));
  const perDate = sectors.middle.length * latitude.length;
  dates.forEach((date, i) => {
    const own = means.subarray(i * perDate, (i + 1) * perDate);
    const extremes = findSectorExtremes(own, latitude, extreme, earth);
    for (const line of lines) {
      const at = line.dates.indexOf(date);
      if (at < 0) continue;
      const core = ridges[date].extremes.find(
        ({ sign, latitude: where }) => sign === line.sign && Math.abs(where - line.latitudes[at]) < 1e-9,
      );
      if (core) found.get(line.id)?.push(zonalExtent(core, sectors, own, extremes, earth));
    }
  });
  return found;
}
