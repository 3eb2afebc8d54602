/** Complex planes are two Float64Arrays (real, imaginary), row-major size × size. */
export interface SquareFourier {
  readonly size: number;
  /**
   * Physical [y][x] to coefficients [kx][ky] (note the order), in place, divided by size² so that a coefficient is an
   * amplitude: f(x, y) = sum over k of f̂(k) exp(i (kx x + ky y)).
   */
  toCoefficients(real: Float64Array, imaginary: Float64Array): void;
  /** Coefficients [kx][ky] to physical [y][x], in place. */
  toPhysical(real: Float64Array, imaginary: Float64Array): void;
}

interface Stage {
  readonly radix: 2 | 3 | 4;
  readonly length: number;
}

function stagesOf(size: number): readonly Stage[] {
  const stages: Stage[] = [];
  let length = size;
  for (const radix of [3, 4, 2] as const) {
    while (length % radix === 0 && length > 1) {
      stages.push({ radix, length });
      length /= radix;
    }
  }
  if (length !== 1) throw new RangeError(`transform size ${size}: expected a product of 2s and 3s`);
  return stages;
}

/**
 * Transforms every column of a size × batch array at once: Stockham's self-sorting algorithm, radices 3, 4 and 2
 * (Stockham 1966; Van Loan 1992, "Computational Frameworks for the Fast Fourier Transform", section 1.7). The innermost
 * loop runs along contiguous memory with a constant twiddle. Exponent sign −1, not scaled.
 */
export function columnTransform(
  size: number,
  batch: number,
): (real: Float64Array, imaginary: Float64Array, spareReal: Float64Array, spareImaginary: Float64Array) => void {
  const stages = stagesOf(size);
  return (real, imaginary, spareReal, spareImaginary) => {
    let fromReal = real;
    let fromImaginary = imaginary;
    let toReal = spareReal;
    let toImaginary = spareImaginary;
    let stride = batch;
    for (const { radix, length } of stages) {
      const butterfly = radix === 4 ? radix4 : radix === 3 ? radix3 : radix2;
      butterfly(length, stride, fromReal, fromImaginary, toReal, toImaginary);
      [fromReal, toReal] = [toReal, fromReal];
      [fromImaginary, toImaginary] = [toImaginary, fromImaginary];
      stride *= radix;
    }
    if (fromReal !== real) {
      real.set(fromReal);
      imaginary.set(fromImaginary);
    }
  };
}

function radix2(
  length: number,
  stride: number,
  ar: Float64Array,
  ai: Float64Array,
  br: Float64Array,
  bi: Float64Array,
): void {
  const half = length / 2;
  for (let p = 0; p < half; p++) {
    const wr = Math.cos((2 * Math.PI * p) / length);
    const wi = -Math.sin((2 * Math.PI * p) / length);
    const from0 = stride * p;
    const from1 = stride * (p + half);
    const to = stride * 2 * p;
    for (let q = 0; q < stride; q++) {
      const xr = ar[from0 + q];
      const xi = ai[from0 + q];
      const yr = ar[from1 + q];
      const yi = ai[from1 + q];
      br[to + q] = xr + yr;
      bi[to + q] = xi + yi;
      const dr = xr - yr;
      const di = xi - yi;
      br[to + stride + q] = dr * wr - di * wi;
      bi[to + stride + q] = dr * wi + di * wr;
    }
  }
}

function radix3(
  length: number,
  stride: number,
  ar: Float64Array,
  ai: Float64Array,
  br: Float64Array,
  bi: Float64Array,
): void {
  const third = length / 3;
  const sine = Math.sqrt(3) / 2;
  for (let p = 0; p < third; p++) {
    const angle = (2 * Math.PI * p) / length;
    const w1r = Math.cos(angle);
    const w1i = -Math.sin(angle);
    const w2r = Math.cos(2 * angle);
    const w2i = -Math.sin(2 * angle);
    const from0 = stride * p;
    const from1 = stride * (p + third);
    const from2 = stride * (p + 2 * third);
    const to = stride * 3 * p;
    for (let q = 0; q < stride; q++) {
      const xr = ar[from0 + q];
      const xi = ai[from0 + q];
      const sumR = ar[from1 + q] + ar[from2 + q];
      const sumI = ai[from1 + q] + ai[from2 + q];
      const differenceR = sine * (ar[from1 + q] - ar[from2 + q]);
      const differenceI = sine * (ai[from1 + q] - ai[from2 + q]);
      const middleR = xr - 0.5 * sumR;
      const middleI = xi - 0.5 * sumI;
      br[to + q] = xr + sumR;
      bi[to + q] = xi + sumI;
      const y1r = middleR + differenceI;
      const y1i = middleI - differenceR;
      const y2r = middleR - differenceI;
      const y2i = middleI + differenceR;
      br[to + stride + q] = y1r * w1r - y1i * w1i;
      bi[to + stride + q] = y1r * w1i + y1i * w1r;
      br[to + 2 * stride + q] = y2r * w2r - y2i * w2i;
      bi[to + 2 * stride + q] = y2r * w2i + y2i * w2r;
    }
  }
}

function radix4(
  length: number,
  stride: number,
  ar: Float64Array,
  ai: Float64Array,
  br: Float64Array,
  bi: Float64Array,
): void {
  const quarter = length / 4;
  for (let p = 0; p < quarter; p++) {
    const angle = (2 * Math.PI * p) / length;
    const w1r = Math.cos(angle);
    const w1i = -Math.sin(angle);
    const w2r = Math.cos(2 * angle);
    const w2i = -Math.sin(2 * angle);
    const w3r = Math.cos(3 * angle);
    const w3i = -Math.sin(3 * angle);
    const from0 = stride * p;
    const from1 = stride * (p + quarter);
    const from2 = stride * (p + 2 * quarter);
    const from3 = stride * (p + 3 * quarter);
    const to = stride * 4 * p;
    for (let q = 0; q < stride; q++) {
      const evenSumR = ar[from0 + q] + ar[from2 + q];
      const evenSumI = ai[from0 + q] + ai[from2 + q];
      const evenDifferenceR = ar[from0 + q] - ar[from2 + q];
      const evenDifferenceI = ai[from0 + q] - ai[from2 + q];
      const oddSumR = ar[from1 + q] + ar[from3 + q];
      const oddSumI = ai[from1 + q] + ai[from3 + q];
      const oddDifferenceR = ar[from1 + q] - ar[from3 + q];
      const oddDifferenceI = ai[from1 + q] - ai[from3 + q];
      br[to + q] = evenSumR + oddSumR;
      bi[to + q] = evenSumI + oddSumI;
      const y1r = evenDifferenceR + oddDifferenceI;
      const y1i = evenDifferenceI - oddDifferenceR;
      const y2r = evenSumR - oddSumR;
      const y2i = evenSumI - oddSumI;
      const y3r = evenDifferenceR - oddDifferenceI;
      const y3i = evenDifferenceI + oddDifferenceR;
      br[to + stride + q] = y1r * w1r - y1i * w1i;
      bi[to + stride + q] = y1r * w1i + y1i * w1r;
      br[to + 2 * stride + q] = y2r * w2r - y2i * w2i;
      bi[to + 2 * stride + q] = y2r * w2i + y2i * w2r;
      br[to + 3 * stride + q] = y3r * w3r - y3i * w3i;
      bi[to + 3 * stride + q] = y3r * w3i + y3i * w3r;
    }
  }
}

function transpose(size: number, from: Float64Array, to: Float64Array): void {
  for (let row = 0; row < size; row++) {
    for (let column = 0; column < size; column++) to[column * size + row] = from[row * size + column];
  }
}

/** Two-dimensional transforms of size × size planes; size is a product of 2s and 3s. */
export function squareFourier(size: number): SquareFourier {
  const count = size * size;
  const spareReal = new Float64Array(count);
  const spareImaginary = new Float64Array(count);
  const columns = columnTransform(size, size);

  const bothAxes = (real: Float64Array, imaginary: Float64Array): void => {
    columns(real, imaginary, spareReal, spareImaginary);
    transpose(size, real, spareReal);
    real.set(spareReal);
    transpose(size, imaginary, spareImaginary);
    imaginary.set(spareImaginary);
    columns(real, imaginary, spareReal, spareImaginary);
  };

  return {
    size,
    toCoefficients(real, imaginary) {
      bothAxes(real, imaginary);
      const scale = 1 / count;
      for (let i = 0; i < count; i++) {
        real[i] *= scale;
        imaginary[i] *= scale;
      }
    },
    // Swapping the parts conjugates in and out, which turns the forward transform into the inverse.
    toPhysical(real, imaginary) {
      bothAxes(imaginary, real);
    },
  };
}
