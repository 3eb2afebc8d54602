import type { RasterMark, Scene } from "../../core/figure/scene";

/**
 * Paints a Scene's rasters. Cells stay cells: nearest neighbour, so that no colour appears that no value has and a gap
 * does not bleed. Edges are put on device pixels, which keeps them sharp at any ratio.
 */
export function paintRasters(canvas: HTMLCanvasElement, scene: Scene, ratio: number): void {
  const width = Math.round(scene.width * ratio);
  const height = Math.round(scene.height * ratio);
  if (canvas.width !== width) canvas.width = width;
  if (canvas.height !== height) canvas.height = height;
  const context = canvas.getContext("2d");
  if (!context) return;
  context.imageSmoothingEnabled = false;
  context.fillStyle = scene.background;
  context.fillRect(0, 0, width, height);
  for (const mark of scene.marks) if (mark.kind === "raster") paintRaster(context, mark, ratio);
}

function paintRaster(context: CanvasRenderingContext2D, mark: RasterMark, ratio: number): void {
  const { columns, rows } = mark;
  if (columns === 0 || rows === 0) return;
  const cells = new OffscreenCanvas(columns, rows);
  const cellContext = cells.getContext("2d");
  if (!cellContext) return;
  const image = cellContext.createImageData(columns, rows);
  image.data.set(mark.pixels);
  cellContext.putImageData(image, 0, 0);
  const left = Math.round(mark.x * ratio);
  const top = Math.round(mark.y * ratio);
  const right = Math.round((mark.x + mark.width) * ratio);
  const bottom = Math.round((mark.y + mark.height) * ratio);
  context.drawImage(cells, left, top, right - left, bottom - top);
}
