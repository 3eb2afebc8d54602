/**
 * Where the coefficients of a real field live: kx ≥ 0 only, index = kxWaves * size + (kyWaves mod size), for kxWaves from
 * 0 to the truncation. The other half follows by conjugation.
 */
export interface HalfPlane {
  readonly size: number;
  readonly lengthMetres: number;
  readonly count: number;
  /** Highest kept wavenumber, waves along a side. */
  readonly truncation: number;
  /** Wavenumbers in rad m^-1, by index. */
  readonly waveX: Float64Array;
  readonly waveY: Float64Array;
  /** kx² + ky², by index. */
  readonly squared: Float64Array;
  /** 1 where the coefficient is kept: inside the circular truncation, the mean left out. */
  readonly kept: Uint8Array;
  readonly keptIndices: readonly number[];
  /** Makes the kx = 0 coefficients conjugate-symmetric in ky, against the drift of rounding. */
  mirrorZonalMean(real: Float64Array, imaginary: Float64Array): void;
}

export function halfPlane(size: number, lengthMetres: number): HalfPlane {
  const truncation = Math.floor((size - 1) / 3);
  const unit = (2 * Math.PI) / lengthMetres;
  const count = (truncation + 1) * size;
  const waveX = new Float64Array(count);
  const waveY = new Float64Array(count);
  const squared = new Float64Array(count);
  const kept = new Uint8Array(count);
  const keptIndices: number[] = [];
  for (let x = 0; x <= truncation; x++) {
    for (let column = 0; column < size; column++) {
      const y = column <= size / 2 ? column : column - size;
      const index = x * size + column;
      waveX[index] = unit * x;
      waveY[index] = unit * y;
      squared[index] = unit * unit * (x * x + y * y);
      const waves = x * x + y * y;
      if (waves > 0 && waves <= truncation * truncation) {
        kept[index] = 1;
        keptIndices.push(index);
      }
    }
  }
  const mirrorZonalMean = (real: Float64Array, imaginary: Float64Array): void => {
    for (let y = 1; y <= truncation; y++) {
      const mirror = size - y;
      const re = 0.5 * (real[y] + real[mirror]);
      const im = 0.5 * (imaginary[y] - imaginary[mirror]);
      real[y] = re;
      real[mirror] = re;
      imaginary[y] = im;
      imaginary[mirror] = -im;
    }
  };
  return { size, lengthMetres, count, truncation, waveX, waveY, squared, kept, keptIndices, mirrorZonalMean };
}

/**
 * Packs two real fields as one complex plane, first + i second, ready for `toPhysical`: the coefficients of each are the
 * given multiples of `real` + i `imaginary`, so that one transform yields both.
 */
function packPair(
  plane: HalfPlane,
  coefficient: (index: number) => readonly [number, number, number, number],
  pairReal: Float64Array,
  pairImaginary: Float64Array,
): void {
  const { size, keptIndices } = plane;
  pairReal.fill(0);
  pairImaginary.fill(0);
  for (const index of keptIndices) {
    const [firstReal, firstImaginary, secondReal, secondImaginary] = coefficient(index);
    pairReal[index] = firstReal - secondImaginary;
    pairImaginary[index] = firstImaginary + secondReal;
    const x = Math.floor(index / size);
    if (x === 0) continue;
    const column = index % size;
    const mirror = (size - x) * size + (column === 0 ? 0 : size - column);
    pairReal[mirror] = firstReal + secondImaginary;
    pairImaginary[mirror] = secondReal - firstImaginary;
  }
}

/** Coefficients of u + i v (m s^-1) from those of vorticity: ψ̂ = −ζ̂/k², û = −i ky ψ̂, v̂ = i kx ψ̂. */
export function velocityPair(
  plane: HalfPlane,
  vorticityReal: Float64Array,
  vorticityImaginary: Float64Array,
  pairReal: Float64Array,
  pairImaginary: Float64Array,
): void {
  const { waveX, waveY, squared } = plane;
  packPair(
    plane,
    (index) => {
      const streamReal = -vorticityReal[index] / squared[index];
      const streamImaginary = -vorticityImaginary[index] / squared[index];
      const ky = waveY[index];
      const kx = waveX[index];
      return [ky * streamImaginary, -ky * streamReal, -kx * streamImaginary, kx * streamReal];
    },
    pairReal,
    pairImaginary,
  );
}

/** Packs two fields given by their own coefficients. */
export function fieldPair(
  plane: HalfPlane,
  first: { readonly re: Float64Array; readonly im: Float64Array },
  second: { readonly re: Float64Array; readonly im: Float64Array },
  pairReal: Float64Array,
  pairImaginary: Float64Array,
): void {
  packPair(
    plane,
    (index) => [first.re[index], first.im[index], second.re[index], second.im[index]],
    pairReal,
    pairImaginary,
  );
}

/** The reverse: coefficients of the two real fields in a transformed complex plane. Writes kept coefficients only. */
export function unpackPair(
  plane: HalfPlane,
  pairReal: Float64Array,
  pairImaginary: Float64Array,
  firstReal: Float64Array,
  firstImaginary: Float64Array,
  secondReal: Float64Array,
  secondImaginary: Float64Array,
): void {
  const { size, keptIndices } = plane;
  for (const index of keptIndices) {
    const x = Math.floor(index / size);
    const column = index % size;
    const mirror = (x === 0 ? 0 : size - x) * size + (column === 0 ? 0 : size - column);
    firstReal[index] = 0.5 * (pairReal[index] + pairReal[mirror]);
    firstImaginary[index] = 0.5 * (pairImaginary[index] - pairImaginary[mirror]);
    secondReal[index] = 0.5 * (pairImaginary[index] + pairImaginary[mirror]);
    secondImaginary[index] = 0.5 * (pairReal[mirror] - pairReal[index]);
  }
}
