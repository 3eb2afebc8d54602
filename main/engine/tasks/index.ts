import type { JobFlags } from "../job";
import { backgroundTask } from "./background";
import { eddyOceansTask } from "./eddy-oceans";
import { eddyPopulationTask } from "./eddy-population";
import { errorPlanesTask } from "./error-planes";
import { fieldPlanesTask } from "./field-planes";
import { jetsTask } from "./jets";
import { limitsTask } from "./limits";
import { mapTask } from "./map";
import { momentsTask } from "./moments";
import { pictureTask } from "./picture";
import { readTask } from "./read";
import { reduceTask } from "./reduce";
import { rmsPlaneTask } from "./rms-plane";
import { scaleAlongTask } from "./scale-along";
import { scaleDriftTask } from "./scale-drift";
import { scaleFlowTask } from "./scale-flow";
import { scaleForcingTask } from "./scale-forcing";
import { scaleMapsTask } from "./scale-maps";
import { scaleMeanTask } from "./scale-mean";
import { scalePersistenceTask } from "./scale-persistence";
import { scaleSeriesTask } from "./scale-series";
import { scaleSignsTask } from "./scale-signs";
import { sectorSeriesTask } from "./sector-series";
import { spectrumTask } from "./spectrum";
import { velocitiesTask } from "./velocities";
import { zonalBandTask } from "./zonal-band";

/** Everything a worker can be asked to do: one file a task, one line here. */
export const tasks = {
  read: readTask,
  background: backgroundTask,
  reduce: reduceTask,
  map: mapTask,
  picture: pictureTask,
  zonalBand: zonalBandTask,
  limits: limitsTask,
  spectrum: spectrumTask,
  moments: momentsTask,
  fieldPlanes: fieldPlanesTask,
  sectorSeries: sectorSeriesTask,
  jets: jetsTask,
  eddyPopulation: eddyPopulationTask,
  eddyOceans: eddyOceansTask,
  scaleFlow: scaleFlowTask,
  scaleMaps: scaleMapsTask,
  scaleMean: scaleMeanTask,
  scaleSigns: scaleSignsTask,
  scalePersistence: scalePersistenceTask,
  scaleSeries: scaleSeriesTask,
  scaleAlong: scaleAlongTask,
  scaleDrift: scaleDriftTask,
  scaleForcing: scaleForcingTask,
  errorPlanes: errorPlanesTask,
  rmsPlane: rmsPlaneTask,
  velocities: velocitiesTask,
} satisfies Record<string, (args: never, job: JobFlags) => unknown>;

export type TaskName = keyof typeof tasks;
export type TaskArguments<N extends TaskName> = Parameters<(typeof tasks)[N]>[0];
export type TaskResult<N extends TaskName> = Awaited<ReturnType<(typeof tasks)[N]>>;
