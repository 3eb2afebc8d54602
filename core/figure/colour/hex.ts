import { linearFromSrgb, type Triple } from "./oklab";

/** Red, green and blue bytes of "#rrggbb". */
export function bytesFromHex(hex: string): Triple {
  const packed = Number.parseInt(hex.slice(1), 16);
  return [(packed >> 16) & 255, (packed >> 8) & 255, packed & 255];
}

/** Linear light, 0..1, of three sRGB bytes. */
export function linearFromBytes([red, green, blue]: Triple): Triple {
  return [linearFromSrgb(red / 255), linearFromSrgb(green / 255), linearFromSrgb(blue / 255)];
}

/** Contrast ratio of two "#rrggbb" colours, 1 to 21. Ref: WCAG 2.2, "contrast ratio" and "relative luminance". */
export function contrastRatio(first: string, second: string): number {
  const [darker, lighter] = [relativeLuminance(first), relativeLuminance(second)].sort((a, b) => a - b) as [
    number,
    number,
  ];
  return (lighter + 0.05) / (darker + 0.05);
}

function relativeLuminance(hex: string): number {
  const [red, green, blue] = linearFromBytes(bytesFromHex(hex));
  return 0.2126 * red + 0.7152 * green + 0.0722 * blue;
}
