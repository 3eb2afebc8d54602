const minus = "\u2212";

/** Degrees wrapped to [-180, 180). */
function wrapped(longitude: number): number {
  return longitude - 360 * Math.floor((longitude + 180) / 360);
}

/**
 * A number with `digits` decimals, a real minus sign and no sign on a rounded zero. Independent of locale. NaN and
 * infinities give an en dash.
 */
export function formatNumber(value: number, digits: number): string {
  if (!Number.isFinite(value)) return "–";
  const text = Math.abs(value).toFixed(digits);
  return value < 0 && Number(text) !== 0 ? minus + text : text;
}

/** A number rounded to `significant` digits, written without exponent and without trailing zeros after the point. */
export function formatSignificant(value: number, significant: number): string {
  if (!Number.isFinite(value) || value === 0) return formatNumber(value, 0);
  const rounded = Number(value.toPrecision(significant));
  return formatNumber(rounded, decimalsOf(rounded, significant));
}

/** Fewest decimals (at most 12) that show `value`, known to carry at most `significant` digits, in full. */
function decimalsOf(value: number, significant: number): number {
  for (let decimals = 0; decimals < 12; decimals++) {
    if (Number(value.toFixed(decimals)) === value) return decimals;
  }
  return Math.min(12, significant);
}

/** Decimals that multiples of `step` need: 0.25 gives 2, 20 gives 0. */
export function decimalsForStep(step: number): number {
  const size = Math.abs(step);
  for (let decimals = 0; decimals < 12; decimals++) {
    const scaled = size * 10 ** decimals;
    if (Math.abs(scaled - Math.round(scaled)) < 1e-6 * Math.max(1, scaled)) return decimals;
  }
  return 12;
}

/** "150° W", "0°", "180°": any turn of the longitude is brought to [-180, 180]. */
export function formatLongitude(longitude: number, digits: number): string {
  const degrees = wrapped(longitude);
  const text = Math.abs(degrees).toFixed(digits);
  const size = Number(text);
  if (size === 0 || size === 180) return `${text}°`;
  return `${text}° ${degrees < 0 ? "W" : "E"}`;
}

/** "20° N", "0°", "20° S". */
export function formatLatitude(latitude: number, digits: number): string {
  const text = Math.abs(latitude).toFixed(digits);
  if (Number(text) === 0) return `${text}°`;
  return `${text}° ${latitude < 0 ? "S" : "N"}`;
}

/** "150–125° W", "20° W–10° E"; a whole turn is "all longitudes". Edges are rounded to hundredths of a degree. */
export function formatLongitudeRange(west: number, east: number): string {
  if (Math.abs(east - west) >= 360 - 1e-6) return "all longitudes";
  return joinedRange(formatLongitude(west, degreeDigits(west)), formatLongitude(east, degreeDigits(east)));
}

/** "20–41° N", "10° S–5° N". Edges are rounded to hundredths of a degree. */
export function formatLatitudeRange(south: number, north: number): string {
  return joinedRange(formatLatitude(south, degreeDigits(south)), formatLatitude(north, degreeDigits(north)));
}

function degreeDigits(degrees: number): number {
  return decimalsForStep(Math.round(degrees * 100) / 100);
}

/** Both ends with the hemisphere named once where they share it. */
function joinedRange(first: string, second: string): string {
  const [number, hemisphere] = first.split("° ");
  if (hemisphere && second.endsWith(` ${hemisphere}`)) return `${number}–${second}`;
  return `${first}–${second}`;
}

/** A number with its noun, in the singular where the number reads "1": "1 day", "0.5 days". A text stands as it is. */
export function counted(count: number | string, one: string, many = `${one}s`): string {
  const text = typeof count === "string" ? count : formatCount(count);
  return `${text} ${text === "1" ? one : many}`;
}

/** Whole numbers with a no-break space between thousands: "41 312". */
export function formatCount(count: number): string {
  return Math.round(count)
    .toString()
    .replace(/\B(?=(\d{3})+$)/g, "\u00a0");
}
