"""The sample study's whole result recomputed by the independent code and compared with what a run wrote.

    python3 sample_run.py RESULT_FOLDER

Reads fields.nc and latitude-time.nc of RESULT_FOLDER with xarray (times decoded), recomputes every date's u, v and
vorticity (seven points, ellipsoid) and the band-passed u of every cell (mean, trend, annual and semi-annual fit by
numpy.linalg.lstsq taken off, then the Lanczos band of 90 to 540 days whose half-width is the longest period, renormalised
over missing dates) and prints, as JSON, the largest difference of each over its root mean square, how many cells were
compared, and how often one side has a value where the other has none. The band is left out where no date is.
"""
import json
import sys
from pathlib import Path

import numpy as np
import xarray

from background import design
from lanczos import low_pass
from sample_fields import fields_of, opened

BAND_DAYS = (90.0, 540.0)


def on_days(result, days, field):
    """Fields of the record's own dates laid on the result's dates; NaN where the record has no date."""
    out = np.full((len(result),) + field.shape[1:], np.nan)
    out[np.searchsorted(result, days)] = field
    return out


def compared(ours, theirs):
    both = np.isfinite(ours) & np.isfinite(theirs)
    scale = np.sqrt(np.nanmean(theirs**2))
    return {
        "largest": float(np.max(np.abs(ours[both] - theirs[both])) / scale),
        "compared": int(both.sum()),
        "onlyOne": int((np.isfinite(ours) != np.isfinite(theirs)).sum()),
    }


def band_passed(days, field):
    """Band of every cell; the filter's weights meet only dates with data, which are the same for all cells that have any."""
    step = float(np.median(np.diff(days)))
    half_width = int(np.ceil(BAND_DAYS[1] / step))
    cells = field.reshape(len(days), -1)
    known = np.isfinite(cells).all(axis=1) if np.isfinite(cells).all(axis=1).any() else np.isfinite(cells).any(axis=1)
    matrix, _ = design(days, (days[0] + days[-1]) / 2)
    solution = np.linalg.lstsq(matrix[known], np.nan_to_num(cells[known]), rcond=None)[0]
    residual = np.where(known[:, None], np.nan_to_num(cells) - matrix @ solution, 0)
    offset = np.arange(len(days))[:, None] - np.arange(len(days))[None, :]
    total = 0
    for sign, period in ((1, BAND_DAYS[0]), (-1, BAND_DAYS[1])):
        weights = low_pass(step / period, half_width)
        table = np.where(np.abs(offset) <= half_width, weights[np.clip(offset + half_width, 0, 2 * half_width)], 0)
        table = table * known[None, :]
        total = total + sign * (table @ residual) / table.sum(axis=1)[:, None]
    total[~known] = np.nan
    total[:, ~np.isfinite(cells).any(axis=0)] = np.nan
    return total.reshape(field.shape)


def main(folder):
    fields = xarray.open_dataset(folder / "fields.nc")
    picture = xarray.open_dataset(folder / "latitude-time.nc")
    assert str(fields.time.dtype).startswith("datetime64") and str(picture.time.dtype).startswith("datetime64")
    epoch = np.datetime64("1970-01-01")
    result_days = (fields.time.values - epoch) / np.timedelta64(1, "D")
    _, height, grid = opened()
    days = (height[height.dims[0]].values - epoch) / np.timedelta64(1, "D")
    ours = {name: on_days(result_days, days, field) for name, field in fields_of(height, grid, 7).items()}
    report = {name: compared(field, fields[name].values.astype(float)) for name, field in ours.items()}
    band = band_passed(result_days, ours["u"])
    report["u_band"] = compared(band, fields["u_band"].values.astype(float))
    ocean = np.isfinite(ours["u"]).any(axis=0)
    enough = np.isfinite(ours["u"]).sum(axis=2) >= 0.5 * ocean.sum(axis=1)[None, :]
    with np.errstate(all="ignore"):
        mean = np.where(enough, np.nansum(ours["u"], axis=2) / np.isfinite(ours["u"]).sum(axis=2), np.nan)
    report["zonal_u"] = compared(mean, picture["u"].values)
    report["dates"] = [str(fields.time.values[0])[:10], str(fields.time.values[-1])[:10], int(fields.sizes["time"])]
    report["names"] = {name: fields[name].attrs.get("standard_name", "") for name in fields.data_vars}
    print(json.dumps(report))


if __name__ == "__main__":
    main(Path(sys.argv[1]))
