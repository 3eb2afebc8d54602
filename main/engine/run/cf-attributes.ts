import { formatDay } from "../../../core/model/calendar";
import type { HeightReference } from "../../../core/model/source";
import type { Quantity } from "../../../core/ocean/quantities/define";
import type { AttributeValue } from "../../writers/netcdf4";
import type { Analysis } from "./analysis";
import { version } from "./version";

type Attributes = Record<string, AttributeValue>;

const heightNames: Readonly<Record<HeightReference, string>> = {
  geoid: "sea_surface_height_above_geoid",
  "mean-sea-level": "sea_surface_height_above_mean_sea_level",
  ellipsoid: "sea_surface_height_above_reference_ellipsoid",
  unknown: "",
};

/** Attributes of a variable by CF-1.11: units, standard name where CF has one, long name, and more as given. */
export function variableAttributes(quantity: Quantity, reference: HeightReference, more: Attributes): Attributes {
  const standardName = standardNameOf(quantity, reference);
  return {
    long_name: quantity.title.toLowerCase(),
    ...(standardName ? { standard_name: standardName } : {}),
    units: quantity.units,
    ...more,
  };
}

function standardNameOf(quantity: Quantity, reference: HeightReference): string {
  if (quantity.id === "height") return heightNames[reference];
  // From heights above mean sea level come velocities that take mean sea level for the geoid.
  if (reference === "mean-sea-level" && quantity.standardName.startsWith("surface_geostrophic")) {
    return `${quantity.standardName}_assuming_mean_sea_level_for_geoid`;
  }
  return quantity.standardName;
}

export const latitudeAttributes: Attributes = {
  standard_name: "latitude",
  long_name: "latitude",
  units: "degrees_north",
  axis: "Y",
};

export const longitudeAttributes: Attributes = {
  standard_name: "longitude",
  long_name: "longitude",
  units: "degrees_east",
  axis: "X",
};

/** Days since 1970 in the record's own calendar. */
export function timeAttributes(analysis: Analysis): Attributes {
  return {
    standard_name: "time",
    long_name: "time",
    units: "days since 1970-01-01 00:00:00",
    calendar: analysis.stages.record.time.calendar,
    axis: "T",
  };
}

/** Global attributes; the settings go into `history`, without a date of making so that equal studies give equal files. */
export function globalAttributes(analysis: Analysis, title: string): Attributes {
  const { study } = analysis.open;
  const { time } = analysis.stages.record;
  const { geostrophy, background, space, band, errors } = study;
  const from = formatDay(time.calendar, time.values[0]);
  const to = formatDay(time.calendar, time.values[time.values.length - 1]);
  return {
    Conventions: "CF-1.11",
    title: `${title}${study.title ? `: ${study.title}` : ""}`,
    source: `heights of grid ${analysis.grid}: ${analysis.loaded.index.files.length} files, variable ${analysis.loaded.index.height.name}`,
    history: `strake ${version} run; ${from} to ${to}; geostrophy ${JSON.stringify(geostrophy)}; background ${JSON.stringify(background)}; space ${JSON.stringify(space)}; band ${JSON.stringify(band)}; errors ${JSON.stringify(errors)}`,
    comment: "Geostrophic part only. Not for navigation or operations at sea.",
  };
}
