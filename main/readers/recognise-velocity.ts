import type { HeightReference } from "../../core/model/source";
import { textAttribute } from "./attributes";
import type { Container, VariableInfo } from "./container";
import { baseName } from "./container";
import { isNoHeight } from "./height-names";
import type { Recognised } from "./recognise";
import { isOnGridOf } from "./same-grid";
import { metresPerSecond } from "./velocity-units";

/** The geostrophic velocity that a file supplies beside its heights. Plain data: names of variables. */
export interface SuppliedVelocity {
  readonly eastward: string;
  readonly northward: string;
  /** What the velocity's height is measured from: "geoid" for absolute currents, "mean-sea-level" for anomalies. */
  readonly reference: HeightReference;
  /** Whether that is what the file's height is measured from; null where either is not known. */
  readonly matchesHeight: boolean | null;
  readonly foundBy: "standard name" | "description";
  /** A time-mean velocity of the same standard name, where the file has one: absolute less mean is the anomaly. */
  readonly mean: { readonly eastward: string; readonly northward: string } | null;
  readonly notes: readonly string[];
}

interface Component {
  readonly name: string;
  readonly direction: "eastward" | "northward";
  readonly reference: HeightReference;
  readonly foundBy: SuppliedVelocity["foundBy"];
  readonly isMean: boolean;
}

/** CF standard names and their older aliases; without a suffix the velocity is absolute. */
const geostrophicName =
  /^surface_(?:geostrophic_(eastward|northward)|(eastward|northward)_geostrophic)_sea_water_velocity(_assuming_(?:mean_)?sea_level_for_geoid)?$/;
/** Names of any current: geostrophic only where a description says so. */
const anyName = /^(?:surface_)?(eastward|northward)_sea_water_velocity$/;

/**
 * Finds eastward and northward geostrophic velocity on the height's grid, in a unit of speed: by CF standard name, or by a
 * general velocity name where the variable's long name or the file's title says "geostrophic". Preferred is the pair of the
 * height's own reference, then by standard name, then the file's order; time means, uncertainties and flags are not taken as the velocity.
 * null where there is no pair.
 */
export function recogniseVelocity(container: Container, recognised: Recognised): SuppliedVelocity | null {
  const components = container.variables
    .filter((variable) => isOnGridOf(container, recognised, variable))
    .map((variable) => asComponent(container, variable))
    .filter((component) => component !== null);
  const pairs = pairsOf(components);
  const height = recognised.reference;
  const cost = ({ reference, foundBy }: Pair) =>
    (reference === height ? 0 : reference === "unknown" || height === "unknown" ? 2 : 4) +
    (foundBy === "standard name" ? 0 : 1);
  const [best, ...others] = pairs.filter(({ isMean }) => !isMean).sort((a, b) => cost(a) - cost(b));
  if (!best) return null;
  const { eastward, northward, reference, foundBy } = best;
  const matchesHeight = reference === "unknown" || height === "unknown" ? null : reference === height;
  const mean = pairs.find((pair) => pair.isMean && pair.reference === reference);
  const notes = others.map((pair) => `the file also has ${pair.eastward} and ${pair.northward}`);
  if (matchesHeight === false) {
    notes.push(`${eastward} is of a height above ${reference}, ${recognised.height.name} is above ${height}`);
  }
  return {
    eastward,
    northward,
    reference,
    matchesHeight,
    foundBy,
    mean: mean ? { eastward: mean.eastward, northward: mean.northward } : null,
    notes,
  };
}

interface Pair extends Pick<Component, "reference" | "foundBy" | "isMean"> {
  readonly eastward: string;
  readonly northward: string;
}

/** Each eastward component with the first northward one of its kind that is not yet taken. */
function pairsOf(components: readonly Component[]): Pair[] {
  const free = components.filter(({ direction }) => direction === "northward");
  return components.flatMap((eastward) => {
    if (eastward.direction !== "eastward") return [];
    const { reference, foundBy, isMean } = eastward;
    const at = free.findIndex(
      (other) => other.reference === reference && other.foundBy === foundBy && other.isMean === isMean,
    );
    if (at < 0) return [];
    const [northward] = free.splice(at, 1);
    return [{ eastward: eastward.name, northward: northward.name, reference, foundBy, isMean }];
  });
}

function asComponent(container: Container, variable: VariableInfo): Component | null {
  const { attributes } = variable;
  if (variable.type === "string" || variable.type === "char") return null;
  if (metresPerSecond(textAttribute(attributes, "units")) === null) return null;
  const standardName = textAttribute(attributes, "standard_name").toLowerCase();
  const longName = textAttribute(attributes, "long_name");
  const name = baseName(variable.name);
  if (isNoHeight(name, longName)) return null;
  // "above mean sea level" names a reference and no average.
  const description = `${name} ${longName}`.replace(/mean[ _]sea[ _](level|surface)/gi, "");
  const isMean = /(^|[ _])(mean|climatolog\w*|time-mean)([ _]|$)/i.test(description);
  const own = { name: variable.name, isMean };
  const geostrophic = geostrophicName.exec(standardName);
  if (geostrophic) {
    const direction = (geostrophic[1] ?? geostrophic[2]) as Component["direction"];
    return { ...own, direction, reference: geostrophic[3] ? "mean-sea-level" : "geoid", foundBy: "standard name" };
  }
  const any = anyName.exec(standardName);
  const saysSo = /geostroph/i.test(`${longName} ${textAttribute(container.attributes, "title")}`);
  if (!any || !saysSo || /ageostroph/i.test(longName)) return null;
  const reference = /anomal/i.test(longName)
    ? "mean-sea-level"
    : /absolute|total/i.test(longName)
      ? "geoid"
      : "unknown";
  return { ...own, direction: any[1] as Component["direction"], reference, foundBy: "description" };
}
