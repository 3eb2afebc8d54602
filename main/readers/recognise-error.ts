import { textAttribute } from "./attributes";
import type { Container, VariableInfo } from "./container";
import { baseName } from "./container";
import { heightByStandardName } from "./height-names";
import type { Recognised } from "./recognise";
import { isOnGridOf } from "./same-grid";
import { metresPerUnit } from "./units";

/** The standard error of the heights that a file supplies beside them. Plain data. */
export interface SuppliedError {
  readonly name: string;
  readonly foundBy: "standard name" | "ancillary variables" | "name";
}

const errorWord = /(^|[_ ])(err|error|errors|uncertainty|std_?err)([_ ]|$)/i;

/**
 * Finds the standard error of the file's height, a length on the height's grid: by the height's standard name with CF's
 * modifier "standard_error" (Appendix C), then among the height's ancillary_variables (CF 3.4) one that calls itself an error, then by
 * such a name, one that also names the height first ("err_sla"). Variances and errors in per cent are no lengths and are not taken. null
 * where there is none.
 */
export function recogniseHeightError(container: Container, recognised: Recognised): SuppliedError | null {
  const { height } = recognised;
  const text = (variable: VariableInfo, name: string) => textAttribute(variable.attributes, name);
  const lengths = container.variables.filter(
    (variable) =>
      metresPerUnit(text(variable, "units")) !== null &&
      variable.type !== "string" &&
      isOnGridOf(container, recognised, variable),
  );
  const byStandardName = lengths.find((variable) => {
    const [name, modifier] = text(variable, "standard_name").toLowerCase().split(/\s+/);
    if (modifier !== "standard_error") return false;
    const isOwn = name === text(height, "standard_name").toLowerCase();
    return isOwn || heightByStandardName(name)?.reference === recognised.reference;
  });
  if (byStandardName) return { name: byStandardName.name, foundBy: "standard name" };
  const called = lengths.filter(
    (variable) =>
      text(variable, "standard_name") === "" &&
      errorWord.test(`${baseName(variable.name)} ${text(variable, "long_name")}`),
  );
  const listed = text(height, "ancillary_variables").split(/\s+/);
  const ancillary = called.find(({ name }) => listed.includes(baseName(name)));
  if (ancillary) return { name: ancillary.name, foundBy: "ancillary variables" };
  const heightName = baseName(height.name).toLowerCase();
  const namesHeight = ({ name }: VariableInfo) => baseName(name).toLowerCase().split("_").includes(heightName);
  const named = called.find(namesHeight) ?? called.find((variable) => !namesAnother(container, variable, heightName));
  return named ? { name: named.name, foundBy: "name" } : null;
}

/** Whether the error's name holds the name of another variable of the file: it is that one's error. */
function namesAnother(container: Container, error: VariableInfo, heightName: string): boolean {
  const words = baseName(error.name).toLowerCase().split("_");
  return container.variables.some((other) => {
    const name = baseName(other.name).toLowerCase();
    return other !== error && name !== heightName && words.includes(name);
  });
}
