import { sinc } from "../lanczos";
import { FilterRefusal } from "./refusal";

/** Where the cells of a plane lie, in metres along the surface. Planes are row-major, `values[row * columns + column]`. */
export interface PlaneGeometry {
  readonly rows: number;
  readonly columns: number;
  /** Position of each row along a meridian, strictly rising or falling; even or not. */
  readonly northMetres: Float64Array;
  /** Spacing of the columns along each row's parallel, above zero away from the poles. */
  readonly eastSpacingMetres: Float64Array;
  /** The last column neighbours the first. */
  readonly periodic: boolean;
}

/** Cut-off wavelengths in kilometres; null leaves that side open. */
export interface WavelengthBand {
  readonly shortestKilometres: number | null;
  readonly longestKilometres: number | null;
}

export interface FilteredPlane {
  readonly values: Float64Array;
  /** Share of each low-pass's weight that lay on data, the smaller of the two, by cell. */
  readonly share: Float64Array;
}

/** A Lanczos low-pass of distance; its weight is kernel times the width of a cell. */
export interface DistanceKernel {
  readonly cutoffMetres: number;
  readonly reachMetres: number;
}

/**
 * The band as two low-passes, each weighing to one; null where a side is open. Both reach as far as the longest cut-off, or
 * twice the shortest for a low-pass, as in time. Errors (FilterRefusal): cut-offs not positive or out of order.
 */
export function bandKernels({ shortestKilometres, longestKilometres }: WavelengthBand): {
  readonly fast: DistanceKernel | null;
  readonly slow: DistanceKernel | null;
} {
  const [shortest, longest] = [shortestKilometres, longestKilometres].map((km) => (km === null ? null : km * 1000));
  for (const metres of [shortest, longest]) {
    if (metres !== null && !(metres > 0 && Number.isFinite(metres))) {
      throw new FilterRefusal(
        "band",
        "cut-off wavelengths above zero",
        `${metres / 1000} km`,
        "choose a longer wavelength",
      );
    }
  }
  if (shortest !== null && longest !== null && longest <= shortest) {
    throw new FilterRefusal(
      "band",
      `a longest wavelength above the shortest of ${shortest / 1000} km`,
      `${longest / 1000} km`,
      "choose a longer wavelength for the long edge",
    );
  }
  const reachMetres = longest ?? 2 * (shortest ?? 0);
  return {
    fast: shortest === null ? null : { cutoffMetres: shortest, reachMetres },
    slow: longest === null ? null : { cutoffMetres: longest, reachMetres },
  };
}

/** Lanczos weight per metre at a distance: 2 fc sinc(2 fc d) sinc(d / reach), 0 from the reach on. Ref: Duchon 1979. */
export function kernelAt({ cutoffMetres, reachMetres }: DistanceKernel, distanceMetres: number): number {
  if (Math.abs(distanceMetres) >= reachMetres) return 0;
  return (2 / cutoffMetres) * sinc((2 * distanceMetres) / cutoffMetres) * sinc(distanceMetres / reachMetres);
}

/** Refuses a shortest wavelength under two cells: the grid cannot tell it from a longer one. */
export function checkResolved(fast: DistanceKernel | null, spacingMetres: number, along: string): void {
  if (fast === null || fast.cutoffMetres >= 2 * spacingMetres * (1 - 1e-9)) return;
  const km = (metres: number) => `${Number((metres / 1000).toFixed(3))} km`;
  throw new FilterRefusal(
    "band",
    `a shortest wavelength of at least two cells ${along} (${km(2 * spacingMetres)})`,
    km(fast.cutoffMetres),
    "choose a longer shortest wavelength",
  );
}
