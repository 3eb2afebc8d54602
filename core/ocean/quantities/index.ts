import { cyclogeostrophicEastwardVelocity } from "./cyclogeostrophic-eastward-velocity";
import { cyclogeostrophicNorthwardVelocity } from "./cyclogeostrophic-northward-velocity";
import { cyclogeostrophicSpeed } from "./cyclogeostrophic-speed";
import { cyclogeostrophicStatus } from "./cyclogeostrophic-status";
import type { Quantity } from "./define";
import { divergence } from "./divergence";
import { eastwardVelocity } from "./eastward-velocity";
import { eddyKineticEnergy } from "./eddy-kinetic-energy";
import { height } from "./height";
import { heightLaplacian } from "./height-laplacian";
import { kineticEnergy } from "./kinetic-energy";
import { normalStrain } from "./normal-strain";
import { northwardVelocity } from "./northward-velocity";
import { okuboWeiss } from "./okubo-weiss";
import { potentialVorticityGradient } from "./potential-vorticity-gradient";
import { vorticity } from "./relative-vorticity";
import { rossbyNumber } from "./rossby-number";
import { shearStrain } from "./shear-strain";
import { speed } from "./speed";
import { strainRate } from "./strain-rate";

/** Every quantity Strake derives, in the order menus show them. */
export const quantities: readonly Quantity[] = [
  height,
  eastwardVelocity,
  northwardVelocity,
  speed,
  vorticity,
  rossbyNumber,
  divergence,
  normalStrain,
  shearStrain,
  strainRate,
  okuboWeiss,
  kineticEnergy,
  eddyKineticEnergy,
  heightLaplacian,
  potentialVorticityGradient,
  cyclogeostrophicEastwardVelocity,
  cyclogeostrophicNorthwardVelocity,
  cyclogeostrophicSpeed,
  cyclogeostrophicStatus,
];
