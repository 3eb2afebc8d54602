import { useCallback, useEffect, useMemo, useRef } from "react";
import { themes } from "../../../core/figure/colour/theme";
import { useBench, useBenchState } from "../../app/bench-context";
import type { Ground } from "../../app/theme";
import { BandHandles } from "../../figure/BandHandles";
import { Overlay } from "../../figure/Overlay";
import type { Pointed } from "../../figure/pointing";
import { SceneView } from "../../figure/SceneView";
import { useSize } from "../../figure/use-size";
import { recordLimits } from "../../state/band-edges";
import type { Picture } from "../../state/bench-state";
import { nearestIndex } from "../../state/cursor";
import { JetLabels } from "./jets/JetLabels";
import { heldMarks, pictureScene } from "./picture-scene";
import { pointerReadout } from "./readout";

interface LatitudesFigureProps {
  readonly picture: Picture;
  readonly ground: Ground;
}

/** The figure with everything a person can take hold of in it. */
export function LatitudesFigure({ picture, ground }: LatitudesFigureProps) {
  const bench = useBench();
  const pane = useRef<HTMLDivElement>(null);
  const size = useSize(pane);
  const cursor = useBenchState((state) => state.cursor);
  const spectrum = useBenchState((state) => state.spectrum);
  const band = useBenchState((state) => state.studies?.present.study.band ?? picture.open.study.band);
  const computing = useBenchState((state) => state.computing);
  const noSpectrum = useBenchState((state) => state.noSpectrum);
  const blendedRows = useBenchState((state) => state.blendedRows);
  const found = useBenchState((state) => state.jets.found);
  const selectedJet = useBenchState((state) => state.selectedJet);
  const scene = useMemo(() => {
    if (!size || size.width <= 0 || size.height <= 0) return null;
    const around = { band, spectrum, noSpectrum, blendedRows, found, selectedJet };
    return pictureScene(picture, around, size, themes[ground]);
  }, [picture, spectrum, noSpectrum, blendedRows, found, selectedJet, band, size, ground]);

  const timePanel = scene?.panels.find((panel) => panel.id === "latitude-time");
  const columns = timePanel ? columnsFor(timePanel.width * window.devicePixelRatio) : null;
  useEffect(() => {
    if (columns !== null) bench.setColumns(columns);
  }, [bench, columns]);

  const { record } = picture;
  const readout = useCallback((pointed: Pointed) => pointerReadout(picture, pointed), [picture]);
  const onPoint = (pointed: Pointed): void => {
    pane.current?.focus({ preventScroll: true });
    if (pointed.latitude !== null) bench.setLatitude(pointed.latitude);
    if (pointed.day !== null) bench.setDate(nearestIndex(record.time.values, pointed.day));
  };
  const spectrumPanel = scene?.panels.find((panel) => panel.id === "spectrum");
  const limits = recordLimits(record.time);

  return (
    <div
      className="figure-pane"
      ref={pane}
      // biome-ignore lint/a11y/noNoninteractiveTabindex: the figure takes the arrow keys, so it must hold the focus
      tabIndex={0}
      role="application"
      aria-busy={computing}
      aria-label="Latitudes figure; press ? for keys"
    >
      {scene ? <SceneView scene={scene} without={heldMarks} /> : null}
      {scene && cursor ? (
        <Overlay
          scene={scene}
          latitude={cursor.latitude}
          day={record.time.values[Math.min(cursor.dateIndex, record.time.values.length - 1)]}
          readout={readout}
          onPoint={onPoint}
        >
          <JetLabels scene={scene} selected={selectedJet} />
          {spectrumPanel && band.filter !== "none" ? (
            <BandHandles
              panel={spectrumPanel}
              band={band}
              limits={limits}
              onMove={(edge, days) => bench.setEdge(edge, days, `edge ${edge}`)}
              onEnd={() => bench.endGesture()}
            />
          ) : null}
        </Overlay>
      ) : null}
    </div>
  );
}

/** As many columns as the panel has device pixels, in steps, so that a small change of width asks for nothing new. */
function columnsFor(devicePixels: number): number {
  return Math.min(2400, Math.max(100, Math.ceil(devicePixels / 100) * 100));
}
