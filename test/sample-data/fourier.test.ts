import { describe, expect, test } from "vitest";
import { columnTransform, squareFourier } from "../../sample-data/model/fourier";
import { seededRandom } from "../../sample-data/model/random";
import { expectAllClose } from "../expect-close";

const rounding = { relative: 1e-12, because: "rounding of some hundred additions of order one" };

function noise(count: number, seed: number): Float64Array {
  const random = seededRandom(seed);
  return Float64Array.from({ length: count }, () => random.normal());
}

describe("the column transform", () => {
  test.each([1, 2, 3, 4, 6, 12, 18, 64, 96, 192])("of %i points equals the sum that defines it", (size) => {
    const batch = 3;
    const real = noise(size * batch, 1);
    const imaginary = noise(size * batch, 2);
    const wantedReal = new Float64Array(size * batch);
    const wantedImaginary = new Float64Array(size * batch);
    for (let k = 0; k < size; k++) {
      for (let column = 0; column < batch; column++) {
        for (let n = 0; n < size; n++) {
          const angle = (-2 * Math.PI * ((k * n) % size)) / size;
          const re = real[n * batch + column];
          const im = imaginary[n * batch + column];
          wantedReal[k * batch + column] += re * Math.cos(angle) - im * Math.sin(angle);
          wantedImaginary[k * batch + column] += re * Math.sin(angle) + im * Math.cos(angle);
        }
      }
    }
    const count = size * batch;
    columnTransform(size, batch)(real, imaginary, new Float64Array(count), new Float64Array(count));
    expectAllClose(real, wantedReal, rounding, "real part");
    expectAllClose(imaginary, wantedImaginary, rounding, "imaginary part");
  });

  test("refuses a size with another factor than 2 and 3", () => {
    expect(() => columnTransform(20, 1)).toThrow("20");
  });
});

describe("the transform of a square", () => {
  test("gives a plane wave one coefficient, at [kx][ky], equal to its amplitude", () => {
    const size = 12;
    const real = new Float64Array(size * size);
    const imaginary = new Float64Array(size * size);
    for (let y = 0; y < size; y++) {
      for (let x = 0; x < size; x++) {
        const angle = (2 * Math.PI * (2 * x - 3 * y)) / size;
        real[y * size + x] = 0.7 * Math.cos(angle);
        imaginary[y * size + x] = 0.7 * Math.sin(angle);
      }
    }
    squareFourier(size).toCoefficients(real, imaginary);
    const wanted = new Float64Array(size * size);
    wanted[2 * size + (size - 3)] = 0.7;
    expectAllClose(real, wanted, rounding);
    expectAllClose(imaginary, new Float64Array(size * size), { absolute: 1e-12, because: "rounding" });
  });

  test("is undone by its inverse", () => {
    const size = 48;
    const real = noise(size * size, 3);
    const imaginary = noise(size * size, 4);
    const [keptReal, keptImaginary] = [real.slice(), imaginary.slice()];
    const fourier = squareFourier(size);
    fourier.toCoefficients(real, imaginary);
    fourier.toPhysical(real, imaginary);
    expectAllClose(real, keptReal, rounding);
    expectAllClose(imaginary, keptImaginary, rounding);
  });
});

describe("the random source", () => {
  test("gives the same numbers for the same seed and others for another", () => {
    expect([...noise(5, 9)]).toEqual([...noise(5, 9)]);
    expect([...noise(5, 9)]).not.toEqual([...noise(5, 10)]);
  });

  test("has normal deviates of mean 0, variance 1 and kurtosis 3", () => {
    const values = noise(200_000, 5);
    const moment = (power: number) => values.reduce((sum, value) => sum + value ** power, 0) / values.length;
    // Standard errors for n = 200,000: 0.0022, 0.0032, 0.022; four of each allowed.
    expect(Math.abs(moment(1))).toBeLessThan(0.009);
    expect(Math.abs(moment(2) - 1)).toBeLessThan(0.013);
    expect(Math.abs(moment(4) - 3)).toBeLessThan(0.09);
  });
});
