/**
 * How a piece of record is weighted before its transform. "cosine" rises and falls over `share` of the length (0 is the
 * boxcar, 1 Hann; also named after Tukey). "sine" is a multitaper of `count` orthogonal tapers whose spectra are averaged;
 * its half-bandwidth is about (count + 1) / 2 frequency steps. Ref: Riedel & Sidorenko 1995, IEEE Trans. Signal Process. 43,
 * 188-195 [from memory].
 */
export type Taper =
  | { readonly kind: "boxcar" }
  | { readonly kind: "hann" }
  | { readonly kind: "hamming" }
  | { readonly kind: "cosine"; readonly share: number }
  | { readonly kind: "sine"; readonly count: number };

/** Periodic Hann window. */
export function hannWindow(length: number): Float64Array {
  return Float64Array.from({ length }, (_, i) => 0.5 - 0.5 * Math.cos((2 * Math.PI * i) / length));
}

/**
 * The weights of each taper of a family, every one scaled to a sum of squares of 1, so that the loss of power by tapering
 * is made good. Single tapers are periodic (the sample after the last would be the first). At least one, at most `length`
 * sine tapers.
 */
export function taperFamily(taper: Taper, length: number): Float64Array[] {
  switch (taper.kind) {
    case "boxcar":
      return [new Float64Array(length).fill(1 / Math.sqrt(length))];
    case "hann":
      return [unitPower(hannWindow(length))];
    case "hamming":
      return [unitPower(hannWindow(length).map((weight) => 0.08 + 0.92 * weight))];
    case "cosine":
      return [unitPower(cosineWindow(length, taper.share))];
    case "sine": {
      const count = Math.max(1, Math.min(length, Math.floor(taper.count)));
      return Array.from({ length: count }, (_, order) => sineTaper(length, order + 1));
    }
  }
}

function cosineWindow(length: number, share: number): Float64Array {
  return Float64Array.from({ length }, (_, i) => {
    const fromEnd = Math.min(i, length - i) / length;
    return fromEnd < share / 2 ? 0.5 - 0.5 * Math.cos((2 * Math.PI * fromEnd) / share) : 1;
  });
}

function sineTaper(length: number, order: number): Float64Array {
  const scale = Math.sqrt(2 / (length + 1));
  return Float64Array.from({ length }, (_, i) => scale * Math.sin((Math.PI * order * (i + 1)) / (length + 1)));
}

function unitPower(weights: Float64Array): Float64Array {
  let power = 0;
  for (const weight of weights) power += weight * weight;
  return weights.map((weight) => weight / Math.sqrt(power));
}

/** The taper in words, for the legend of a figure and the methods text. */
export function taperName(taper: Taper): string {
  switch (taper.kind) {
    case "boxcar":
      return "no taper";
    case "hann":
      return "Hann";
    case "hamming":
      return "Hamming";
    case "cosine":
      return `cosine over ${Math.round(taper.share * 100)} %`;
    case "sine":
      return `${taper.count} sine tapers`;
  }
}
