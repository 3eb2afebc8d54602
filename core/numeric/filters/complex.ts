export interface Complex {
  readonly real: number;
  readonly imaginary: number;
}

/** The square root with real part >= 0, without cancellation. */
export function complexSquareRoot({ real, imaginary }: Complex): Complex {
  const size = Math.hypot(real, imaginary);
  if (size === 0) return { real: 0, imaginary: 0 };
  const larger = Math.sqrt((size + Math.abs(real)) / 2);
  const smaller = Math.abs(imaginary) / (2 * larger);
  const [re, im] = real >= 0 ? [larger, smaller] : [smaller, larger];
  return { real: re, imaginary: imaginary < 0 ? -im : im };
}
