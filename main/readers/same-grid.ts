import type { Container, VariableInfo } from "./container";
import { coordinatesOf } from "./coordinates";
import type { Recognised } from "./recognise";

/** Whether another variable lies on the height's latitudes and longitudes; it may do without time. */
export function isOnGridOf(container: Container, recognised: Recognised, variable: VariableInfo): boolean {
  if (variable === recognised.height || variable.shape.length < 2) return false;
  const { latitude, longitude } = coordinatesOf(container, variable);
  return latitude === recognised.latitude && longitude === recognised.longitude;
}
