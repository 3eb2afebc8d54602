/** Metres in one of the unit, by the names that files use. */
const metresPer = new Map<string, number>();
for (const [metres, names] of [
  [1, "m meter meters metre metres"],
  [0.01, "cm centimeter centimeters centimetre centimetres"],
  [0.001, "mm millimeter millimeters millimetre millimetres"],
  [0.1, "dm decimeter decimeters decimetre decimetres"],
  [1000, "km kilometer kilometers kilometre kilometres"],
  [0.3048, "ft foot feet"],
] as const) {
  for (const name of names.split(" ")) metresPer.set(name, metres);
}

/** How many metres one unit of length is; null for what is not a length ("MM" is no millimetre, "Meters" is a metre). */
export function metresPerUnit(units: string): number | null {
  const text = units.trim();
  return metresPer.get(text) ?? (text.length > 2 ? metresPer.get(text.toLowerCase()) : undefined) ?? null;
}

const northUnits = /^degrees?_?(north|n)$/i;
const eastUnits = /^degrees?_?(east|e)$/i;

/** CF-1.11 section 4.1: degrees_north and its spellings. */
export function isLatitudeUnit(units: string): boolean {
  return northUnits.test(units.trim());
}

/** CF-1.11 section 4.2: degrees_east and its spellings. */
export function isLongitudeUnit(units: string): boolean {
  return eastUnits.test(units.trim());
}

/** Any "<unit> since <reference>", understood or not. */
export function isTimeUnit(units: string): boolean {
  return /^\s*[a-z]+\s+since\s+\S/i.test(units);
}
