import { base64 } from "./base64";
import { encodePng } from "./png";
import type { Mark, PanelFrame, PathMark, RasterMark, Scene, TextMark } from "./scene";
import { superscriptRise, superscriptRuns, superscriptScale } from "./text-width";
import { xmlJson, xmlText } from "./xml-text";

export const fontFamily = "Atkinson Hyperlegible Next";

export interface SvgOptions {
  /** Width on paper. Left out: the scene's width in CSS pixels. */
  readonly widthMm?: number;
  /** Kept as JSON in a metadata element (the study, versions). */
  readonly metadata?: unknown;
  /** Font files to embed, so that text looks the same on a machine that lacks the font. */
  readonly fonts?: readonly { readonly weight: 400 | 700; readonly bytes: Uint8Array; readonly type: string }[];
}

/**
 * A scene as a standalone SVG 1.1 document: text stays text, each raster is one embedded PNG with sharp cells. The same
 * scene and options give the same bytes. All text is cleaned (see plainLine) and escaped.
 */
export function sceneToSvg(scene: Scene, options: SvgOptions = {}): string {
  const clips = usedClips(scene);
  return [
    `<svg xmlns="http://www.w3.org/2000/svg" ${sizeAttributes(scene, options.widthMm)}` +
      ` viewBox="0 0 ${number(scene.width)} ${number(scene.height)}" role="img" aria-labelledby="title description">`,
    `<title id="title">${xmlText(scene.title)}</title>`,
    `<desc id="description">${xmlText(scene.description)}</desc>`,
    ...(options.metadata === undefined ? [] : [`<metadata>${xmlJson(options.metadata)}</metadata>`]),
    `<style>${fontFaces(options)}text{font-family:"${fontFamily}",sans-serif;font-variant-numeric:tabular-nums;` +
      `font-feature-settings:"tnum";white-space:pre}image{image-rendering:pixelated}</style>`,
    ...(clips.length > 0 ? [`<defs>${clips.map(clipPath).join("")}</defs>`] : []),
    `<rect width="${number(scene.width)}" height="${number(scene.height)}" fill="${xmlText(scene.background)}"/>`,
    ...scene.marks.map(markElement),
    "</svg>",
    "",
  ].join("\n");
}

/** Hundredths of a pixel: finer than any printer, and equal on every machine. */
function number(value: number): string {
  const rounded = Math.round(value * 100) / 100;
  return Object.is(rounded, -0) ? "0" : String(rounded);
}

function sizeAttributes(scene: Scene, widthMm?: number): string {
  if (widthMm === undefined) return `width="${number(scene.width)}" height="${number(scene.height)}"`;
  return `width="${number(widthMm)}mm" height="${number((widthMm * scene.height) / scene.width)}mm"`;
}

function fontFaces(options: SvgOptions): string {
  return (options.fonts ?? [])
    .map(
      ({ weight, bytes, type }) =>
        `@font-face{font-family:"${fontFamily}";font-weight:${weight};src:url(data:${xmlText(type)};base64,${base64(bytes)})}`,
    )
    .join("");
}

function usedClips(scene: Scene): PanelFrame[] {
  const used = new Set(scene.marks.map((mark) => (mark.kind === "path" ? mark.clip : undefined)));
  return scene.panels.filter((panel) => used.has(panel.id));
}

function clipId(panelId: string): string {
  return xmlText(`clip-${panelId}`);
}

function clipPath({ id, x, y, width, height }: PanelFrame): string {
  const box = `x="${number(x)}" y="${number(y)}" width="${number(width)}" height="${number(height)}"`;
  return `<clipPath id="${clipId(id)}"><rect ${box}/></clipPath>`;
}

function markElement(mark: Mark): string {
  switch (mark.kind) {
    case "raster":
      return rasterElement(mark);
    case "path":
      return pathElement(mark);
    case "text":
      return textElement(mark);
  }
}

function rasterElement(mark: RasterMark): string {
  const data = base64(encodePng(mark.pixels, mark.columns, mark.rows));
  const box = `x="${number(mark.x)}" y="${number(mark.y)}" width="${number(mark.width)}" height="${number(mark.height)}"`;
  return `<image id="${xmlText(mark.id)}" ${box} preserveAspectRatio="none" href="data:image/png;base64,${data}"/>`;
}

function pathElement(mark: PathMark): string {
  const dash = mark.dash ? ` stroke-dasharray="${mark.dash.map(number).join(" ")}"` : "";
  const clip = mark.clip === undefined ? "" : ` clip-path="url(#${clipId(mark.clip)})"`;
  const stroke =
    mark.stroke === "none"
      ? ""
      : ` stroke="${xmlText(mark.stroke)}" stroke-width="${number(mark.strokeWidth)}" stroke-linejoin="round"${dash}`;
  return `<path id="${xmlText(mark.id)}" d="${xmlText(mark.d)}" fill="${xmlText(mark.fill)}"${stroke}${clip}/>`;
}

function textElement(mark: TextMark): string {
  const place = `x="${number(mark.x)}" y="${number(mark.y)}"`;
  const anchor = mark.anchor === "start" ? "" : ` text-anchor="${mark.anchor}"`;
  const weight = mark.weight === 400 ? "" : ` font-weight="${mark.weight}"`;
  const turn = mark.rotate ? ` transform="rotate(${number(mark.rotate)} ${number(mark.x)} ${number(mark.y)})"` : "";
  const runs = superscriptRuns(mark.text);
  // Raised figures lose their meaning to a reader by ear or by search: the label keeps the text as written.
  const label = runs.some((run) => run.raised) ? ` aria-label="${xmlText(mark.text)}"` : "";
  const style = `font-size="${number(mark.size)}"${weight} fill="${xmlText(mark.fill)}"${anchor}${turn}${label}`;
  return `<text id="${xmlText(mark.id)}" ${place} ${style}>${textRuns(mark)}</text>`;
}

function textRuns(mark: TextMark): string {
  const rise = superscriptRise * mark.size;
  let offset = 0;
  return superscriptRuns(mark.text)
    .map(({ text, raised }) => {
      const wanted = raised ? -rise : 0;
      const shift = wanted - offset;
      offset = wanted;
      if (!raised && shift === 0) return xmlText(text);
      const size = raised ? ` font-size="${number(superscriptScale * mark.size)}"` : "";
      return `<tspan dy="${number(shift)}"${size}>${xmlText(text)}</tspan>`;
    })
    .join("");
}
