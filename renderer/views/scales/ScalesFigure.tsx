import { useMemo } from "react";
import { themes } from "../../../core/figure/colour/theme";
import { boxText } from "../../../core/figure/record-text";
import { bandText } from "../../../core/figure/scales/band-text";
import { type ScalesPart, scalesScene } from "../../../core/figure/scales-figure";
import { useBenchState } from "../../app/bench-context";
import type { Ground } from "../../app/theme";
import { SceneView } from "../../figure/SceneView";
import type { Size } from "../../figure/use-size";
import type { ScalesPicture } from "../../state/scales";
import { gridTitle } from "../../text/record";
import { ScalesPointer } from "./ScalesPointer";
import { sceneSize } from "./scales-parts";

const nothing: ReadonlySet<string> = new Set();

interface ScalesFigureProps {
  readonly picture: ScalesPicture;
  readonly part: ScalesPart;
  readonly pane: Size;
  readonly ground: Ground;
}

/** The figure of scales; a jet that is lit elsewhere is a line through every panel with a latitude axis. */
export function ScalesFigure({ picture, part, pane, ground }: ScalesFigureProps) {
  const heldLatitude = useBenchState(
    ({ jets, selectedJet }) => jets.found?.result.jets.find(({ id }) => id === selectedJet)?.meanLatitude,
  );
  const scene = useMemo(() => {
    const { result, record, open, grid } = picture;
    const input = {
      result,
      longitude: record.longitude.values,
      ocean: record.ocean,
      calendar: record.time.calendar,
      region: boxText(record),
      grid: gridTitle(open.study, grid, record),
      band: bandText(open.study.band),
      ...(heldLatitude === undefined ? {} : { heldLatitude }),
    };
    return scalesScene(input, { ...sceneSize(pane, part), part }, themes[ground]);
  }, [picture, part, pane, ground, heldLatitude]);
  return (
    <div className="scales-scene" style={{ width: scene.width, height: scene.height }}>
      <SceneView scene={scene} without={nothing} />
      <ScalesPointer scene={scene} picture={picture} />
    </div>
  );
}
