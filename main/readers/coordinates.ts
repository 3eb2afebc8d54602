import { textAttribute } from "./attributes";
import type { Container, VariableInfo } from "./container";
import { baseName } from "./container";
import { isLatitudeUnit, isLongitudeUnit, isTimeUnit } from "./units";

/** The coordinate variables that go with one variable; undefined where there is none. */
export interface Coordinates {
  readonly latitude: VariableInfo | undefined;
  readonly longitude: VariableInfo | undefined;
  readonly time: VariableInfo | undefined;
}

interface CoordinateKind {
  readonly standardName: string;
  readonly axis: string;
  readonly names: RegExp;
  readonly hasUnit: (units: string) => boolean;
}

const kinds: Record<keyof Coordinates, CoordinateKind> = {
  latitude: { standardName: "latitude", axis: "Y", names: /^(lat|latitude|nav_lat)$/i, hasUnit: isLatitudeUnit },
  longitude: {
    standardName: "longitude",
    axis: "X",
    names: /^(lon|long|longitude|nav_lon)$/i,
    hasUnit: isLongitudeUnit,
  },
  time: { standardName: "time", axis: "T", names: /^time$/i, hasUnit: isTimeUnit },
};

/**
 * Latitude, longitude and time of `variable`: by standard name, then units (CF-1.11 sections 4.1, 4.2, 4.4), then axis attribute,
 * then name. Only variables over the variable's own dimensions are taken; a time may also be a single value beside it.
 * Among equals, the one named in the `coordinates` attribute, then the one named as its dimension, then the file's order.
 */
export function coordinatesOf(container: Container, variable: VariableInfo): Coordinates {
  const find = (kind: keyof Coordinates) => bestCoordinate(container, variable, kind);
  return { latitude: find("latitude"), longitude: find("longitude"), time: find("time") };
}

/** Whether the variable is itself a coordinate (or its bounds) and so no candidate for a height. */
export function isCoordinate(variable: VariableInfo): boolean {
  const standardName = textAttribute(variable.attributes, "standard_name").toLowerCase();
  const ownDimension = variable.dimensions.length === 1 && variable.dimensions[0] === baseName(variable.name);
  if (ownDimension || /(^|_)(bounds|bnds|vertices)$/i.test(variable.name)) return true;
  return Object.values(kinds).some((kind) => kind.standardName === standardName || rank(variable, kind) < 2);
}

function bestCoordinate(container: Container, variable: VariableInfo, kindName: keyof Coordinates) {
  const kind = kinds[kindName];
  const listed = textAttribute(variable.attributes, "coordinates").split(/\s+/);
  let best: VariableInfo | undefined;
  let bestScore = Number.POSITIVE_INFINITY;
  for (const candidate of container.variables) {
    if (candidate === variable || !belongs(candidate, variable, kindName)) continue;
    const order = rank(candidate, kind);
    if (order === Number.POSITIVE_INFINITY) continue;
    const isListed = listed.includes(baseName(candidate.name));
    const isOwnDimension = candidate.dimensions.length === 1 && candidate.dimensions[0] === baseName(candidate.name);
    const score = order * 10 + (isListed ? 0 : 4) + (isOwnDimension ? 0 : 2);
    if (score < bestScore) [best, bestScore] = [candidate, score];
  }
  return best;
}

/** 0 by standard name, 1 by units, 2 by axis, 3 by name; infinite for none of them. */
function rank(candidate: VariableInfo, kind: CoordinateKind): number {
  if (candidate.type === "string" || candidate.type === "char") return Number.POSITIVE_INFINITY;
  const standardName = textAttribute(candidate.attributes, "standard_name").toLowerCase();
  if (standardName === kind.standardName) return 0;
  if (standardName !== "") return Number.POSITIVE_INFINITY;
  if (kind.hasUnit(textAttribute(candidate.attributes, "units"))) return 1;
  if (textAttribute(candidate.attributes, "axis").toUpperCase() === kind.axis) return 2;
  return kind.names.test(baseName(candidate.name)) ? 3 : Number.POSITIVE_INFINITY;
}

function belongs(candidate: VariableInfo, variable: VariableInfo, kind: keyof Coordinates): boolean {
  if (candidate.dimensions.every((name) => variable.dimensions.includes(name)) && candidate.shape.length > 0)
    return true;
  const isSingle = candidate.shape.every((length) => length === 1);
  return kind === "time" && isSingle;
}
