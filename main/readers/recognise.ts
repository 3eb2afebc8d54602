import type { Fault } from "../../core/model/errors";
import type { HeightReference } from "../../core/model/source";
import { textAttribute } from "./attributes";
import type { Container, VariableInfo } from "./container";
import { baseName } from "./container";
import type { Coordinates } from "./coordinates";
import { coordinatesOf, isCoordinate } from "./coordinates";
import { fileFault, listNames } from "./faults";
import { heightByCustomaryName, heightByStandardName, isNoHeight } from "./height-names";
import { metresPerUnit } from "./units";

export interface Recognised {
  /** "track" where latitude, longitude and time share the height's one dimension. */
  readonly kind: "grid" | "track";
  readonly height: VariableInfo;
  readonly foundBy: "standard name" | "units" | "shape" | "named in the study";
  readonly reference: HeightReference;
  readonly latitude: VariableInfo;
  readonly longitude: VariableInfo;
  readonly time: VariableInfo;
  readonly notes: readonly string[];
}

interface Candidate {
  readonly variable: VariableInfo;
  readonly foundBy: Recognised["foundBy"];
  readonly reference: HeightReference;
  /** Lower is better. */
  readonly score: number;
}

/**
 * Finds the height and its coordinates. A `forced` name wins. Otherwise, in this order: a CF standard name (above the
 * geoid before above mean sea level before above the ellipsoid); a length as unit on a variable over latitude and
 * longitude that has no other standard name; such a shape without units. Within the last two a customary name (adt, sla,
 * ssh …) goes first, and several variables without one are refused. Among equals the file's order decides; the others are listed in `notes`.
 * Uncertainties and flags are never taken. Throws a Fault (tag "file") that lists the file's variables.
 */
export function recognise(container: Container, forced = "auto"): Recognised {
  const chosen = forced === "auto" ? findHeight(container) : forcedHeight(container, forced);
  const { variable, foundBy, reference } = chosen.candidate;
  const { latitude, longitude, time } = requireCoordinates(container, variable);
  const isTrack = shareOneDimension(variable, [latitude, longitude, time]);
  const kind = isTrack ? "track" : "grid";
  return { kind, height: variable, foundBy, reference, latitude, longitude, time, notes: chosen.notes };
}

function findHeight(container: Container): { candidate: Candidate; notes: string[] } {
  const candidates = container.variables
    .map((variable) => asCandidate(container, variable))
    .filter((candidate) => candidate !== null)
    .sort((a, b) => a.score - b.score);
  if (candidates.length === 0) throw noHeight(container);
  const [best, ...others] = candidates;
  const rivals = others.filter(({ foundBy }) => foundBy === best.foundBy);
  if (best.foundBy !== "standard name" && rivals.some(({ score }) => score === best.score)) {
    const names = [best, ...rivals].map(({ variable }) => variable.name);
    const advice = 'name one as "height" in the study';
    throw fileFault(container.path, "one variable that is the height", `several: ${listNames(names)}`, advice);
  }
  if (rivals.length === 0) return { candidate: best, notes: [] };
  const names = rivals.map(({ variable }) => variable.name);
  return { candidate: best, notes: [`height is ${best.variable.name}; the file also has ${listNames(names)}`] };
}

function asCandidate(container: Container, variable: VariableInfo): Candidate | null {
  if (variable.type === "string" || variable.type === "char" || variable.shape.length === 0) return null;
  const { attributes } = variable;
  const name = baseName(variable.name);
  const standardName = textAttribute(attributes, "standard_name");
  const known = heightByStandardName(standardName);
  const isUncertain = isNoHeight(name, textAttribute(attributes, "long_name"));
  if (known) {
    const score = known.rank + (isUncertain ? 50 : 0);
    return { variable, foundBy: "standard name", reference: known.reference, score };
  }
  if (standardName !== "" || isUncertain || isCoordinate(variable)) return null;
  const { latitude, longitude } = coordinatesOf(container, variable);
  if (!latitude || !longitude || variable.shape.length < 1) return null;
  const units = textAttribute(attributes, "units");
  const isLength = metresPerUnit(units) !== null;
  if (!isLength && units !== "") return null;
  const customary = heightByCustomaryName(name);
  const score = (isLength ? 100 : 200) + (customary?.rank ?? 50);
  return { variable, foundBy: isLength ? "units" : "shape", reference: customary?.reference ?? "unknown", score };
}

function forcedHeight(container: Container, forced: string): { candidate: Candidate; notes: string[] } {
  const variable =
    container.variables.find(({ name }) => name === forced) ??
    container.variables.find(({ name }) => baseName(name) === forced);
  if (!variable) {
    const got = `no such variable; it has ${listNames(dataVariables(container))}`;
    throw fileFault(container.path, `a variable ${forced}`, got, 'correct "height" in the study or leave it at "auto"');
  }
  const standardName = textAttribute(variable.attributes, "standard_name");
  const known = heightByStandardName(standardName) ?? heightByCustomaryName(baseName(variable.name));
  const candidate: Candidate = {
    variable,
    foundBy: "named in the study",
    reference: known?.reference ?? "unknown",
    score: 0,
  };
  return { candidate, notes: [] };
}

function requireCoordinates(container: Container, variable: VariableInfo): Required<NonNullableCoordinates> {
  const { latitude, longitude, time } = coordinatesOf(container, variable);
  const missing = !latitude ? "latitude" : !longitude ? "longitude" : !time ? "time" : null;
  if (latitude && longitude && time) return { latitude, longitude, time };
  const where = `${container.path}: ${variable.name}`;
  const expected = `a ${missing} variable over its dimensions (${variable.dimensions.join(", ")})`;
  const got = `none among ${listNames(container.variables.map(({ name }) => name))}`;
  const advice =
    missing === "time" ? "add a time variable, scalar or over a dimension, with units and calendar" : `give it units`;
  throw fileFault(where, expected, got, advice);
}

type NonNullableCoordinates = { [kind in keyof Coordinates]: VariableInfo };

function shareOneDimension(height: VariableInfo, coordinates: readonly VariableInfo[]): boolean {
  const long = height.dimensions.filter((_, i) => height.shape[i] !== 1 || height.shape.length === 1);
  return (
    long.length === 1 && coordinates.every(({ dimensions }) => dimensions.length === 1 && dimensions[0] === long[0])
  );
}

function dataVariables(container: Container): string[] {
  return container.variables.filter((variable) => !isCoordinate(variable)).map(({ name }) => name);
}

function noHeight(container: Container): Fault {
  const expected = "a sea-surface height (by standard name, or a length over latitude and longitude)";
  const got = `variables ${listNames(container.variables.map(({ name }) => name))}`;
  return fileFault(container.path, expected, got, 'name the height as "height" in the study, or choose another file');
}
