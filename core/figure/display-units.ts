/** How a quantity stored in SI units is shown: shown = stored × scale, followed by `units`. */
export interface DisplayUnits {
  readonly scale: number;
  /** With real superscripts, "cm s⁻¹"; empty for a ratio. */
  readonly units: string;
  /** Units of the quantity's square, for variances. */
  readonly squared: string;
}

const known: Readonly<Record<string, DisplayUnits>> = {
  "m s-1": { scale: 100, units: "cm s⁻¹", squared: "cm² s⁻²" },
  m: { scale: 100, units: "cm", squared: "cm²" },
  "s-1": { scale: 1e6, units: "10⁻⁶ s⁻¹", squared: "10⁻¹² s⁻²" },
  "s-2": { scale: 1e12, units: "10⁻¹² s⁻²", squared: "10⁻²⁴ s⁻⁴" },
  "m-1": { scale: 1e12, units: "10⁻¹² m⁻¹", squared: "10⁻²⁴ m⁻²" },
  "m-1 s-1": { scale: 1e12, units: "10⁻¹² m⁻¹ s⁻¹", squared: "10⁻²⁴ m⁻² s⁻²" },
  "m2 s-2": { scale: 1e4, units: "cm² s⁻²", squared: "cm⁴ s⁻⁴" },
  "1": { scale: 1, units: "", squared: "" },
};

/** Display units of SI units written as CF does ("m s-1"). Units it does not know are shown as they stand. */
export function displayUnits(siUnits: string): DisplayUnits {
  const units = siUnits.trim();
  const found = known[units];
  if (found) return found;
  const raised = withSuperscripts(units);
  return { scale: 1, units: raised, squared: units === "" ? "" : `(${raised})²` };
}

/** Exponents written as CF does become superscripts: "kg m-3" gives "kg m⁻³". */
export function withSuperscripts(units: string): string {
  return units.replace(/([A-Za-z])(-?\d+)/g, (_, letter: string, power: string) => letter + superscript(power));
}

function superscript(power: string): string {
  return [...power].map((character) => (character === "-" ? "⁻" : "⁰¹²³⁴⁵⁶⁷⁸⁹"[Number(character)])).join("");
}
