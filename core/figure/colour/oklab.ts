/** A colour in OKLab: lightness 0..1, a (green to red), b (blue to yellow). */
export interface OkLab {
  readonly lightness: number;
  readonly a: number;
  readonly b: number;
}

/** Red, green, blue from 0 to 1; which transfer curve they carry is in the name of the value. */
export type Triple = readonly [red: number, green: number, blue: number];

/** sRGB component (0..1) to linear light. IEC 61966-2-1. */
export function linearFromSrgb(component: number): number {
  return component <= 0.04045 ? component / 12.92 : ((component + 0.055) / 1.055) ** 2.4;
}

/** Linear light (0..1) to the sRGB component. Inverse of linearFromSrgb. IEC 61966-2-1. */
export function srgbFromLinear(component: number): number {
  return component <= 0.0031308 ? 12.92 * component : 1.055 * component ** (1 / 2.4) - 0.055;
}

/** Linear sRGB to OKLab. Ref: B. Ottosson, "A perceptual color space for image processing", 2020 [from memory]. */
export function okLabFromLinear([red, green, blue]: Triple): OkLab {
  const long = Math.cbrt(0.4122214708 * red + 0.5363325363 * green + 0.0514459929 * blue);
  const medium = Math.cbrt(0.2119034982 * red + 0.6806995451 * green + 0.1073969566 * blue);
  const short = Math.cbrt(0.0883024619 * red + 0.2817188376 * green + 0.6299787005 * blue);
  return {
    lightness: 0.2104542553 * long + 0.793617785 * medium - 0.0040720468 * short,
    a: 1.9779984951 * long - 2.428592205 * medium + 0.4505937099 * short,
    b: 0.0259040371 * long + 0.7827717662 * medium - 0.808675766 * short,
  };
}

/** OKLab to linear sRGB; components leave 0..1 where the colour is outside the sRGB gamut. Ref: Ottosson 2020 [from memory]. */
export function linearFromOkLab({ lightness, a, b }: OkLab): Triple {
  const long = (lightness + 0.3963377774 * a + 0.2158037573 * b) ** 3;
  const medium = (lightness - 0.1055613458 * a - 0.0638541728 * b) ** 3;
  const short = (lightness - 0.0894841775 * a - 1.291485548 * b) ** 3;
  return [
    4.0767416621 * long - 3.3077115913 * medium + 0.2309699292 * short,
    -1.2684380046 * long + 2.6097574011 * medium - 0.3413193965 * short,
    -0.0041960863 * long - 0.7034186147 * medium + 1.707614701 * short,
  ];
}

const gamutSlack = 1e-6;

function insideGamut(linear: Triple): boolean {
  return linear.every((component) => component >= -gamutSlack && component <= 1 + gamutSlack);
}

/**
 * sRGB bytes of a colour given as lightness 0..1, chroma and hue in degrees. Outside the gamut the chroma shrinks to the
 * largest that fits, so that lightness and hue hold.
 */
export function srgbBytesFromLch(lightness: number, chroma: number, hueDegrees: number): Triple {
  const hue = (hueDegrees * Math.PI) / 180;
  const linearAt = (scale: number) =>
    linearFromOkLab({ lightness, a: scale * chroma * Math.cos(hue), b: scale * chroma * Math.sin(hue) });
  let scale = 1;
  if (!insideGamut(linearAt(1))) {
    let outside = 1;
    scale = 0;
    for (let halving = 0; halving < 30; halving++) {
      const middle = (scale + outside) / 2;
      if (insideGamut(linearAt(middle))) scale = middle;
      else outside = middle;
    }
  }
  const [red, green, blue] = linearAt(scale);
  return [byteFromLinear(red), byteFromLinear(green), byteFromLinear(blue)];
}

function byteFromLinear(linear: number): number {
  return Math.round(255 * srgbFromLinear(Math.min(1, Math.max(0, linear))));
}
