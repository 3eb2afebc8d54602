import type { FoundJet, JetChain } from "../../../../core/jets/eddy-test/found-jet";

/**
 * A plain finder for the trials: jets are the extremes in latitude of the time-mean current, at least `apart` rows from a
 * stronger one of their direction; present on the dates on which the current has their direction.
 */
export function meanJets(latitudes: Float64Array, dates: number, apart: number): JetChain {
  return (zonal) => {
    const rows = latitudes.length;
    const mean = Float64Array.from({ length: rows }, (_, row) => {
      let sum = 0;
      for (let t = 0; t < dates; t++) sum += zonal[row * dates + t];
      return sum / dates;
    });
    const jets: FoundJet[] = [];
    for (let row = 1; row < rows - 1; row++) {
      const direction = mean[row] > 0 ? 1 : -1;
      let strongest = true;
      for (let other = Math.max(0, row - apart); other <= Math.min(rows - 1, row + apart); other++) {
        if (direction * mean[other] > direction * mean[row]) strongest = false;
      }
      if (!strongest) continue;
      let present = 0;
      for (let t = 0; t < dates; t++) if (direction * zonal[row * dates + t] > 0) present++;
      jets.push({
        latitudeDegrees: latitudes[row],
        direction,
        speedMetresPerSecond: Math.abs(mean[row]),
        shareOfDates: present / dates,
      });
    }
    return jets;
  };
}
