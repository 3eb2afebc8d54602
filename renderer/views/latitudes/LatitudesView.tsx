import { useBenchState } from "../../app/bench-context";
import type { Ground } from "../../app/theme";
import { NothingYet } from "../NothingYet";
import { Cautions } from "./Cautions";
import { CursorReadout } from "./CursorReadout";
import { JetsPanel } from "./jets/JetsPanel";
import { LatitudesFigure } from "./LatitudesFigure";
import { ProfileTable } from "./ProfileTable";
import { Spoken } from "./Spoken";
import { StudyActions } from "./StudyActions";
import { StudySettings } from "./settings/StudySettings";
import { Toolbar } from "./Toolbar";

/** Map, zonal mean and latitude-time picture on one latitude axis; the band and the days with data below. */
export function LatitudesView({ ground }: { readonly ground: Ground }) {
  const open = useBenchState((state) => state.studies?.present ?? null);
  const record = useBenchState((state) => state.record);
  const picture = useBenchState((state) => state.picture);
  const cautions = useBenchState((state) => state.cautions);
  const loading = useBenchState((state) => state.loading);
  if (!open || !record || (loading && !picture)) return <NothingYet />;
  return (
    <div className="latitudes">
      <div className="bench">
        <Toolbar />
        {picture ? <LatitudesFigure picture={picture} ground={ground} /> : <NothingYet />}
      </div>
      <aside className="side" aria-label="Readout and settings">
        {picture ? <CursorReadout picture={picture} /> : null}
        <JetsPanel open={open} record={record} />
        <StudySettings open={open} />
        <Cautions cautions={cautions} />
        {picture ? <ProfileTable picture={picture} /> : null}
        <StudyActions open={open} />
        {picture ? <Spoken picture={picture} /> : null}
      </aside>
    </div>
  );
}
