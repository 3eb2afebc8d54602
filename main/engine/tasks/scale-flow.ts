import { eddyMomentumFlux } from "../../../core/jets/forcing/momentum-flux";
import { columnWeights, leastZonalCoverage } from "../../../core/study/reduction";
import type { JobFlags } from "../job";
import { type FieldArguments, fieldSource } from "./field";
import type { Moments } from "./moments";

/** Where a pass over the record leaves what is kept of every date; shared by the workers, each writes its own dates. */
export interface FlowTarget {
  /** Zonal mean of u'v' about the date's own zonal mean, `flux[row * dates + date]`, m2 s-2. */
  readonly flux: Float64Array;
  /** v along one row, `alongRow[column * dates + date]`, m s-1. */
  readonly row: number;
  readonly alongRow: Float64Array;
  /** Cells whose v is kept whole, `samples[cell * dates + date]`, m s-1. */
  readonly sampleCells: Int32Array;
  readonly samples: Float32Array;
}

/** One pass over a range of dates: moments of u and v, the momentum flux, v along a row and in sampled cells. Counts one a date. */
export function scaleFlowTask(
  args: FieldArguments & { readonly dates: readonly [number, number]; readonly target: FlowTarget },
  job: JobFlags,
): Moments {
  const { record, target } = args;
  const source = fieldSource(args);
  const { dates, rows, columns } = record.cube;
  const cells = rows * columns;
  const weights = columnWeights(record);
  const shape = { rows, columns, ocean: record.ocean, weights, leastShare: leastZonalCoverage };
  const sum = [new Float64Array(cells), new Float64Array(cells)];
  const squares = [new Float64Array(cells), new Float64Array(cells)];
  const count = [new Int32Array(cells), new Int32Array(cells)];
  for (let date = args.dates[0]; date < args.dates[1]; date++) {
    job.poll();
    job.count();
    const planes = source.on(date);
    const [u, v] = [planes("u"), planes("v")];
    [u, v].forEach((plane, q) => {
      for (let cell = 0; cell < cells; cell++) {
        const value = plane[cell];
        if (Number.isNaN(value)) continue;
        sum[q][cell] += value;
        squares[q][cell] += value * value;
        count[q][cell]++;
      }
    });
    eddyMomentumFlux({ u, v }, "zonal mean", shape).forEach((value, row) => {
      target.flux[row * dates + date] = value;
    });
    for (let column = 0; column < columns; column++) {
      target.alongRow[column * dates + date] = v[target.row * columns + column];
    }
    target.sampleCells.forEach((cell, i) => {
      target.samples[i * dates + date] = v[cell];
    });
  }
  return { sum, squares, count };
}
