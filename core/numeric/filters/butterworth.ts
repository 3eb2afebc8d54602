import { type Complex, complexSquareRoot } from "./complex";
import { FilterRefusal } from "./refusal";

/** A digital filter as second-order sections, each with its own gain. */
export interface Sections {
  readonly count: number;
  /** b0, b1, b2, a1, a2 of each section; a0 is 1. */
  readonly coefficients: Float64Array;
  /** Samples of odd extension at each end that the forward-and-back filter adds. */
  readonly padSamples: number;
}

export interface ButterworthSettings {
  /** Order of the low-pass prototype; a band-pass has twice as many poles. */
  readonly order: number;
  /** Cut-off at the short periods, in samples; null leaves them in (high-pass). */
  readonly shortestSamples: number | null;
  /** Cut-off at the long periods, in samples; null leaves them in (low-pass). */
  readonly longestSamples: number | null;
  /**
   * What the named periods are in the forward-and-back result: "half-amplitude" (0.5, -6 dB, the plain design) or
   * "half-power" (sqrt(1/2), -3 dB, cut-offs moved outwards by (sqrt2 - 1)^(-1/(2 order)) before the bilinear transform).
   */
  readonly cut: "half-amplitude" | "half-power";
}

/** A pole pair of the analogue filter, conjugates or two real ones; `second` null for a single real pole. */
interface PolePair {
  readonly first: Complex;
  readonly second: Complex | null;
}

/** Twice the sampling frequency in the bilinear transform when frequencies are given in units of Nyquist's. */
const doubledRate = 4;

/**
 * Butterworth low-, high- or band-pass by the bilinear transform with prewarped cut-offs, poles paired with their
 * conjugates and one zero pair a section, so that narrow bands stay finite. Padding: three times the number of
 * coefficients, less shared zeros at the origin, i.e. 3 (order + 1), 3 (2 order + 1) for a band-pass (the convention of
 * scipy.signal.sosfiltfilt). Errors (FilterRefusal): no cut-off, an order that is no whole number from 1 to 12, cut-offs not
 * above two samples or out of order. Ref: Butterworth 1930, Exp. Wireless 7, 536 [from memory]; bilinear transform textbook.
 */
export function butterworthSections(settings: ButterworthSettings): Sections {
  checkSettings(settings);
  const { order, shortestSamples, longestSamples } = settings;
  const widening = settings.cut === "half-power" ? (Math.SQRT2 - 1) ** (-1 / (2 * order)) : 1;
  const high = shortestSamples === null ? null : prewarped(shortestSamples);
  const low = longestSamples === null ? null : prewarped(longestSamples);
  const prototype = prototypePoles(order);
  if (high !== null && low !== null) {
    const width = (high - low) * widening;
    const pairs = prototype.flatMap((pole) => bandPassPairs(pole, width, low * high));
    return assemble(
      pairs.map((pair) => bandSection(pair, width)),
      3 * (2 * order + 1),
    );
  }
  if (high !== null) {
    const pairs = prototype.map((pair) => mapPair(pair, (pole) => scaled(pole, high * widening)));
    return assemble(
      pairs.map((pair) => edgeSection(pair, 1)),
      3 * (order + 1),
    );
  }
  const pairs = prototype.map((pair) => mapPair(pair, (pole) => reciprocal(pole, (low ?? 0) / widening)));
  return assemble(
    pairs.map((pair) => edgeSection(pair, -1)),
    3 * (order + 1),
  );
}

/** Amplitude response of the filter run forward and back, |H|^2, at a frequency in cycles a sample. */
export function zeroPhaseResponse(sections: Sections, frequencyPerSample: number): number {
  const phase = 2 * Math.PI * frequencyPerSample;
  const [cosine, sine] = [Math.cos(phase), Math.sin(phase)];
  const [cosine2, sine2] = [Math.cos(2 * phase), Math.sin(2 * phase)];
  let power = 1;
  for (let s = 0; s < sections.count; s++) {
    const [b0, b1, b2, a1, a2] = sections.coefficients.subarray(5 * s, 5 * s + 5);
    const top = (b0 + b1 * cosine + b2 * cosine2) ** 2 + (b1 * sine + b2 * sine2) ** 2;
    power *= top / ((1 + a1 * cosine + a2 * cosine2) ** 2 + (a1 * sine + a2 * sine2) ** 2);
  }
  return power;
}

function checkSettings({ order, shortestSamples, longestSamples }: ButterworthSettings): void {
  if (!Number.isInteger(order) || order < 1 || order > 12) {
    throw new FilterRefusal("band.order", "a whole number from 1 to 12", `${order}`, "choose 2, 3 or 4");
  }
  if (shortestSamples === null && longestSamples === null) {
    throw new FilterRefusal("band", "at least one cut-off", "none", "name a shortest or a longest period");
  }
  for (const samples of [shortestSamples, longestSamples]) {
    if (samples !== null && !(samples > 2 && Number.isFinite(samples))) {
      throw new FilterRefusal(
        "band",
        "cut-offs longer than two samples",
        `${samples} samples`,
        "choose a longer period",
      );
    }
  }
  if (shortestSamples !== null && longestSamples !== null && longestSamples <= shortestSamples) {
    throw new FilterRefusal(
      "band",
      `a longest period above the shortest of ${shortestSamples} samples`,
      `${longestSamples} samples`,
      "choose a longer period for the long edge",
    );
  }
}

function prewarped(periodSamples: number): number {
  return doubledRate * Math.tan(Math.PI / periodSamples);
}

/** Left half-plane poles on the unit circle: one of each conjugate pair with its conjugate, and -1 alone for odd orders. */
function prototypePoles(order: number): PolePair[] {
  return Array.from({ length: Math.ceil(order / 2) }, (_, k) => {
    const angle = (Math.PI * (order - 1 - 2 * k)) / (2 * order);
    const pole = { real: -Math.cos(angle), imaginary: Math.sin(angle) };
    return order - 1 - 2 * k === 0
      ? { first: { real: -1, imaginary: 0 }, second: null }
      : { first: pole, second: conjugate(pole) };
  });
}

/** Poles of s -> (s^2 + centre^2) / (width s): each prototype pole becomes two. */
function bandPassPairs({ first, second }: PolePair, width: number, centreSquared: number): PolePair[] {
  const half = scaled(first, width / 2);
  const root = complexSquareRoot({
    real: half.real ** 2 - half.imaginary ** 2 - centreSquared,
    imaginary: 2 * half.real * half.imaginary,
  });
  const one = { real: half.real + root.real, imaginary: half.imaginary + root.imaginary };
  const other = { real: half.real - root.real, imaginary: half.imaginary - root.imaginary };
  if (!second) return [{ first: one, second: other }];
  return [one, other].map((pole) => ({ first: pole, second: conjugate(pole) }));
}

/** Numerator g (1 - z^-2): a zero at each end of the spectrum. */
function bandSection(pair: PolePair, width: number): number[] {
  const { a1, a2, distance } = denominator(pair);
  const gain = (doubledRate * width) / distance;
  return [gain, 0, -gain, a1, a2];
}

/** Numerator g (1 + sign z^-1)^2, one factor for a single pole; gain 1 at zero frequency (sign 1) or at Nyquist's (-1). */
function edgeSection(pair: PolePair, sign: 1 | -1): number[] {
  const { a1, a2 } = denominator(pair);
  const total = 1 + sign * a1 + a2;
  return pair.second ? [total / 4, (sign * total) / 2, total / 4, a1, a2] : [total / 2, (sign * total) / 2, 0, a1, a2];
}

/** Bilinear transform of a pole pair, and the product of (doubled rate - pole). */
function denominator({ first, second }: PolePair): { a1: number; a2: number; distance: number } {
  const p = bilinear(first);
  if (!second) return { a1: -p.real, a2: 0, distance: doubledRate - first.real };
  const q = bilinear(second);
  const [pr, qr] = [doubledRate - first.real, doubledRate - second.real];
  return {
    a1: -(p.real + q.real),
    a2: p.real * q.real - p.imaginary * q.imaginary,
    distance: pr * qr - first.imaginary * second.imaginary,
  };
}

function bilinear(pole: Complex): Complex {
  const [top, bottom] = [doubledRate + pole.real, doubledRate - pole.real];
  const size = bottom * bottom + pole.imaginary * pole.imaginary;
  return {
    real: (top * bottom - pole.imaginary * pole.imaginary) / size,
    imaginary: (pole.imaginary * (top + bottom)) / size,
  };
}

function mapPair({ first, second }: PolePair, move: (pole: Complex) => Complex): PolePair {
  return { first: move(first), second: second && move(second) };
}

function scaled(pole: Complex, factor: number): Complex {
  return { real: pole.real * factor, imaginary: pole.imaginary * factor };
}

function reciprocal(pole: Complex, numerator: number): Complex {
  const size = pole.real ** 2 + pole.imaginary ** 2;
  return { real: (numerator * pole.real) / size, imaginary: (-numerator * pole.imaginary) / size };
}

function conjugate(pole: Complex): Complex {
  return { real: pole.real, imaginary: -pole.imaginary };
}

function assemble(sections: number[][], padSamples: number): Sections {
  return { count: sections.length, coefficients: Float64Array.from(sections.flat()), padSamples };
}
