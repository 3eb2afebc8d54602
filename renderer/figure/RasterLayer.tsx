import { useLayoutEffect, useRef } from "react";
import type { Scene } from "../../core/figure/scene";
import { paintRasters } from "./paint-rasters";
import { usePixelRatio } from "./use-pixel-ratio";

/** One canvas for all rasters of a Scene, as many device pixels as the screen has. */
export function RasterLayer({ scene }: { readonly scene: Scene }) {
  const canvas = useRef<HTMLCanvasElement>(null);
  const ratio = usePixelRatio();
  const { width, height } = scene;
  useLayoutEffect(() => {
    if (canvas.current) paintRasters(canvas.current, scene, ratio);
  }, [scene, ratio]);
  return <canvas ref={canvas} style={{ width, height }} />;
}
