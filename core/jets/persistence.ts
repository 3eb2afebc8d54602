/** How lastingly the flow keeps its sign, one entry a cell. */
export interface Persistence {
  /** The sign found on more valid dates: 1, -1, or 0 where they are equal or there is none. */
  readonly prevailingSign: Int8Array;
  /** Share of the valid dates on which the flow has its prevailing sign; NaN where no date is valid. */
  readonly share: Float64Array;
  /** Longest unbroken run of either sign, in days, both ends included; 0 for none. */
  readonly longestDays: Float64Array;
  /** Sign of that run, the earlier one of two equally long. */
  readonly longestSign: Int8Array;
  readonly validDates: Int32Array;
}

/** Takes the planes of a record one date after the other. */
export interface PersistenceCount {
  /** Next date's values, NaN where missing; as many as there are cells. A date without data must be added too, all NaN. */
  add(plane: Float64Array): void;
  result(): Persistence;
}

/**
 * Counts persistence over dates `stepDays` apart. A run is a row of dates on which the flow has one sign; zero ends it.
 * Missing dates end it too, unless at most `bridgedDates` follow one another and the sign is the same on both sides: then
 * they count as part of the run (but not of the share).
 */
export function countPersistence(cells: number, stepDays: number, bridgedDates: number): PersistenceCount {
  const eastward = new Int32Array(cells);
  const westward = new Int32Array(cells);
  const valid = new Int32Array(cells);
  const sign = new Int8Array(cells);
  const run = new Int32Array(cells);
  const missing = new Int32Array(cells);
  const longest = new Int32Array(cells);
  const longestSign = new Int8Array(cells);

  const addCell = (cell: number, value: number): void => {
    if (Number.isNaN(value)) {
      missing[cell]++;
      return;
    }
    valid[cell]++;
    if (value > 0) eastward[cell]++;
    else if (value < 0) westward[cell]++;
    const now = Math.sign(value);
    const goesOn = now === sign[cell] && missing[cell] <= bridgedDates;
    run[cell] = goesOn ? run[cell] + missing[cell] + 1 : 1;
    missing[cell] = 0;
    sign[cell] = now;
    if (now !== 0 && run[cell] > longest[cell]) {
      longest[cell] = run[cell];
      longestSign[cell] = now;
    }
  };

  return {
    add: (plane) => {
      for (let cell = 0; cell < cells; cell++) addCell(cell, plane[cell]);
    },
    result: () => ({
      prevailingSign: Int8Array.from(eastward, (count, cell) => Math.sign(count - westward[cell])),
      share: Float64Array.from(valid, (count, cell) => Math.max(eastward[cell], westward[cell]) / count),
      longestDays: Float64Array.from(longest, (dates) => dates * stepDays),
      longestSign: longestSign.slice(),
      validDates: valid.slice(),
    }),
  };
}

/** Persistence of each row of a latitude-time matrix, `matrix[row * dates + date]`. */
export function persistenceByLatitude(
  matrix: Float64Array,
  rows: number,
  stepDays: number,
  bridgedDates: number,
): Persistence {
  const dates = matrix.length / rows;
  const count = countPersistence(rows, stepDays, bridgedDates);
  const plane = new Float64Array(rows);
  for (let date = 0; date < dates; date++) {
    for (let row = 0; row < rows; row++) plane[row] = matrix[row * dates + date];
    count.add(plane);
  }
  return count.result();
}
