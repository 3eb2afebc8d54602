import { describe, test } from "vitest";
import { errorPlanes } from "../../../../core/ocean/errors/error-planes";
import { geostrophicVelocity } from "../../../../core/ocean/geostrophy";
import { gridGeometry } from "../../../../core/ocean/grid-geometry";
import { relativeVorticity } from "../../../../core/ocean/vorticity";
import { expectClose } from "../../../expect-close";
import { evenAxes, sphere } from "../grids";

const draws = 5000;
const [rows, columns] = [9, 10];
const size = rows * columns;
const axes = evenAxes({ west: 200, south: 30, step: 0.5, columns, rows });
const geometry = gridGeometry(axes, { ...sphere, stencil: 5 }, "test");
const sigmaMetres = Float64Array.from({ length: size }, (_, i) => 0.01 + 0.002 * (i % 7));
const gap = 34;

/** Standard normal numbers: Park and Miller's generator through Box and Muller's transform. */
function normals(seed: number): () => number {
  let state = seed;
  const uniform = () => {
    state = (state * 48271) % 2147483647;
    return state / 2147483647;
  };
  return () => Math.sqrt(-2 * Math.log(uniform())) * Math.cos(2 * Math.PI * uniform());
}

/** Lower triangle L with L L' = the covariance of the height errors, the distance by the law of cosines. */
function triangleOf(correlationKm: number): Float64Array[] {
  const place = (cell: number) =>
    [axes.latitude.values[Math.floor(cell / columns)], axes.longitude.values[cell % columns]].map(
      (degrees) => (degrees * Math.PI) / 180,
    );
  const covariance = (a: number, b: number) => {
    if (a === b) return sigmaMetres[a] ** 2 * (1 + 1e-12);
    if (correlationKm === 0) return 0;
    const [[phiA, lambdaA], [phiB, lambdaB]] = [place(a), place(b)];
    const cosine = Math.sin(phiA) * Math.sin(phiB) + Math.cos(phiA) * Math.cos(phiB) * Math.cos(lambdaA - lambdaB);
    const distance = 6371 * Math.acos(Math.min(1, cosine));
    return sigmaMetres[a] * sigmaMetres[b] * Math.exp(-(distance ** 2) / (2 * correlationKm ** 2));
  };
  const triangle = Array.from({ length: size }, () => new Float64Array(size));
  for (let i = 0; i < size; i++) {
    for (let j = 0; j <= i; j++) {
      let rest = covariance(i, j);
      for (let k = 0; k < j; k++) rest -= triangle[i][k] * triangle[j][k];
      triangle[i][j] = i === j ? Math.sqrt(rest) : rest / triangle[j][j];
    }
  }
  return triangle;
}

describe.each([0, 70])("over 5000 random height errors correlated over %i km", (correlationKm) => {
  const triangle = triangleOf(correlationKm);
  const normal = normals(20240705);
  const squares = {
    u: new Float64Array(size),
    v: new Float64Array(size),
    vorticity: new Float64Array(size),
  };
  for (let draw = 0; draw < draws; draw++) {
    const noise = Float64Array.from({ length: size }, normal);
    const height = Float64Array.from(triangle, (line, i) => {
      let sum = 0;
      for (let j = 0; j <= i; j++) sum += line[j] * noise[j];
      return sum;
    });
    height[gap] = Number.NaN;
    const velocity = geostrophicVelocity(height, geometry);
    const vorticity = relativeVorticity(velocity, geometry);
    const fields = { ...velocity, vorticity };
    for (const name of ["u", "v", "vorticity"] as const) {
      fields[name].forEach((value, i) => {
        squares[name][i] += value * value;
      });
    }
  }
  const height = new Float64Array(size);
  height[gap] = Number.NaN;
  const errors = errorPlanes(height, axes, geometry, { sigmaMetres, correlationKm });

  test.each(["u", "v", "vorticity"] as const)("the spread of %s is the propagated error at every cell", (name) => {
    for (let cell = 0; cell < size; cell++) {
      const because =
        "a deviation from 5000 draws is known to 1/√10000 = 1 %; 5 % leaves room for the worst of 500 cells";
      expectClose(Math.sqrt(squares[name][cell] / draws), errors[name][cell], { relative: 0.05, because }, `${cell}`);
    }
  });
});
