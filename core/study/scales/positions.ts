/** Positions along a line: degrees as they are, metres from the first. */
export interface Positions {
  readonly degrees: Float64Array;
  readonly metres: Float64Array;
}

const degree = Math.PI / 180;

/** Longitudes along a parallel of so many metres a radian. */
export function longitudePositions(longitudes: Float64Array, metresPerRadian: number): Positions {
  return {
    degrees: longitudes,
    metres: longitudes.map((value) => (value - longitudes[0]) * degree * metresPerRadian),
  };
}

/** Latitudes along a meridian, metres a radian by latitude, by the trapezoidal rule. */
export function latitudePositions(latitudes: Float64Array, metresPerRadian: Float64Array): Positions {
  const metres = new Float64Array(latitudes.length);
  for (let row = 1; row < metres.length; row++) {
    const step = (latitudes[row] - latitudes[row - 1]) * degree;
    metres[row] = metres[row - 1] + (step * (metresPerRadian[row] + metresPerRadian[row - 1])) / 2;
  }
  return { degrees: latitudes, metres };
}
