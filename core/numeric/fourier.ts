import FFT from "fft.js";

/** Discrete Fourier transform of a complex sequence; exp(-2 pi i jk / n), no scaling. */
export interface ComplexSequence {
  readonly real: Float64Array;
  readonly imaginary: Float64Array;
}

type Transform = (real: Float64Array, imaginary: Float64Array) => ComplexSequence;

const planned = new Map<number, Transform>();

/** Forward transform of any length: powers of two directly, others by Bluestein's chirp (Bluestein 1970, IEEE Trans. AU-18). */
export function fourierTransform(real: Float64Array, imaginary?: Float64Array): ComplexSequence {
  const length = real.length;
  let transform = planned.get(length);
  if (!transform) {
    transform = isPowerOfTwo(length) ? powerOfTwoTransform(length) : chirpTransform(length);
    planned.set(length, transform);
  }
  return transform(real, imaginary ?? new Float64Array(length));
}

/** Inverse of `fourierTransform`: exp(+2 pi i jk / n), divided by n. */
export function inverseFourierTransform(real: Float64Array, imaginary: Float64Array): ComplexSequence {
  // Swapping the parts before and after turns the forward transform into its conjugate.
  const swapped = fourierTransform(imaginary, real);
  const scale = 1 / real.length;
  return { real: swapped.imaginary.map((v) => v * scale), imaginary: swapped.real.map((v) => v * scale) };
}

/** Forward transform of a real row-major plane along both axes; exp(-2 pi i (row l / rows + column k / columns)), no scaling. */
export function planeTransform(plane: Float64Array, rows: number, columns: number): ComplexSequence {
  const real = new Float64Array(plane.length);
  const imaginary = new Float64Array(plane.length);
  for (let row = 0; row < rows; row++) {
    const line = fourierTransform(plane.slice(row * columns, (row + 1) * columns));
    real.set(line.real, row * columns);
    imaginary.set(line.imaginary, row * columns);
  }
  const lineReal = new Float64Array(rows);
  const lineImaginary = new Float64Array(rows);
  for (let column = 0; column < columns; column++) {
    for (let row = 0; row < rows; row++) {
      lineReal[row] = real[row * columns + column];
      lineImaginary[row] = imaginary[row * columns + column];
    }
    const line = fourierTransform(lineReal, lineImaginary);
    for (let row = 0; row < rows; row++) {
      real[row * columns + column] = line.real[row];
      imaginary[row * columns + column] = line.imaginary[row];
    }
  }
  return { real, imaginary };
}

function isPowerOfTwo(length: number): boolean {
  return length > 1 && (length & (length - 1)) === 0;
}

function powerOfTwoTransform(length: number): Transform {
  const fft = new FFT(length);
  const input = new Float64Array(2 * length);
  const output = new Float64Array(2 * length);
  return (real, imaginary) => {
    interleave(real, imaginary, input);
    fft.transform(output, input);
    return separate(output, length);
  };
}

function chirpTransform(length: number): Transform {
  if (length === 1) return (real, imaginary) => ({ real: real.slice(), imaginary: imaginary.slice() });
  let padded = 2;
  while (padded < 2 * length - 1) padded *= 2;
  const fft = new FFT(padded);
  const cosine = new Float64Array(length);
  const sine = new Float64Array(length);
  for (let k = 0; k < length; k++) {
    // k² taken modulo 2n before scaling keeps the phase exact for long records.
    const phase = (Math.PI * ((k * k) % (2 * length))) / length;
    cosine[k] = Math.cos(phase);
    sine[k] = Math.sin(phase);
  }
  const chirp = new Float64Array(2 * padded);
  for (let k = 0; k < length; k++) {
    for (const place of k === 0 ? [0] : [k, padded - k]) {
      chirp[2 * place] = cosine[k];
      chirp[2 * place + 1] = sine[k];
    }
  }
  const chirpSpectrum = new Float64Array(2 * padded);
  fft.transform(chirpSpectrum, chirp);
  const work = new Float64Array(2 * padded);
  const spectrum = new Float64Array(2 * padded);
  return (real, imaginary) => {
    work.fill(0);
    for (let k = 0; k < length; k++) {
      work[2 * k] = real[k] * cosine[k] + imaginary[k] * sine[k];
      work[2 * k + 1] = imaginary[k] * cosine[k] - real[k] * sine[k];
    }
    fft.transform(spectrum, work);
    for (let k = 0; k < padded; k++) {
      const a = spectrum[2 * k];
      const b = spectrum[2 * k + 1];
      const c = chirpSpectrum[2 * k];
      const d = chirpSpectrum[2 * k + 1];
      spectrum[2 * k] = a * c - b * d;
      spectrum[2 * k + 1] = a * d + b * c;
    }
    fft.inverseTransform(work, spectrum);
    const outReal = new Float64Array(length);
    const outImaginary = new Float64Array(length);
    for (let k = 0; k < length; k++) {
      const a = work[2 * k];
      const b = work[2 * k + 1];
      outReal[k] = a * cosine[k] + b * sine[k];
      outImaginary[k] = b * cosine[k] - a * sine[k];
    }
    return { real: outReal, imaginary: outImaginary };
  };
}

function interleave(real: Float64Array, imaginary: Float64Array, into: Float64Array): void {
  for (let k = 0; k < real.length; k++) {
    into[2 * k] = real[k];
    into[2 * k + 1] = imaginary[k];
  }
}

function separate(interleaved: Float64Array, length: number): ComplexSequence {
  const real = new Float64Array(length);
  const imaginary = new Float64Array(length);
  for (let k = 0; k < length; k++) {
    real[k] = interleaved[2 * k];
    imaginary[k] = interleaved[2 * k + 1];
  }
  return { real, imaginary };
}
