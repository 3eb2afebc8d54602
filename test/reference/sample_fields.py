"""u, v and vorticity of the sample grid, computed from its files by the independent difference code.

Without options: the date in the middle of the record, stencils 3 and 7, ellipsoid; root-mean-square of each field and
its values at 400 pseudo-random cells, into sample-fields.json. With --all OUT.nc: every date, stencil 7, into a netCDF
file (CF names) for comparing a whole run. Reads sample-data/grid/halcyon-a-*.nc (product A, quarter degree); without
them it says so and writes nothing.
"""
import sys
from pathlib import Path

import netCDF4
import numpy as np
import xarray

from geostrophy import Grid, geostrophic_velocity, relative_vorticity
from reference_file import write_or_check

FILES = Path(__file__).resolve().parents[2] / "sample-data" / "grid"
CELLS = 400
CF_NAMES = {
    "u": "surface_geostrophic_eastward_sea_water_velocity",
    "v": "surface_geostrophic_northward_sea_water_velocity",
    "vorticity": "ocean_relative_vorticity",
}


def first_with(dataset, attribute, accepted):
    return next(name for name, item in dataset.variables.items() if accepted(str(item.attrs.get(attribute, ""))))


def opened():
    """The sample's packed height (time, latitude, longitude) as stored, and its grid."""
    files = sorted(FILES.glob("halcyon-a-*.nc"))
    if not files:
        print(f"no product A under {FILES.parent.name}/{FILES.name}: nothing to compute")
        sys.exit(0)
    dataset = xarray.concat([xarray.open_dataset(file, mask_and_scale=False) for file in files], dim="time")
    height = dataset[first_with(dataset, "standard_name", lambda text: text.startswith("sea_surface_height_above"))]
    latitude = first_with(dataset, "units", lambda text: text.startswith("degrees_north"))
    longitude = first_with(dataset, "units", lambda text: text.startswith("degrees_east"))
    time = next(name for name in height.dims if name not in (latitude, longitude))
    height = height.transpose(time, latitude, longitude)
    lon = np.asarray(dataset[longitude].values, dtype=float)
    lon = np.degrees(np.unwrap(np.radians(lon))) if np.any(np.abs(np.diff(lon)) > 180) else lon
    periodic = abs(len(lon) * abs(lon[1] - lon[0]) - 360) < 0.5 * abs(lon[1] - lon[0])
    return files, height, Grid(np.asarray(dataset[latitude].values, dtype=float), lon, periodic)


def unpacked(height):
    """Metres in float64, CF section 8.1: fill tested before unpacking. (xarray's own decoding may stop at float32.)"""
    stored = np.asarray(height.values)
    fill = height.attrs.get("_FillValue", height.attrs.get("missing_value"))
    metres = stored.astype(float) * float(height.attrs.get("scale_factor", 1)) + float(height.attrs.get("add_offset", 0))
    metres = metres if fill is None else np.where(stored == fill, np.nan, metres)
    return metres / 100 if height.attrs["units"] == "cm" else metres


def fields_of(height, grid, stencil):
    u, v = geostrophic_velocity(unpacked(height), grid, stencil, "ellipsoid")
    return {"u": u, "v": v, "vorticity": relative_vorticity(u, v, grid, stencil, "ellipsoid")}


def middle_date():
    files, height, grid = opened()
    index = height.shape[0] // 2
    plane = height[index]
    rows, columns = np.unravel_index(
        np.random.default_rng(400).choice(plane.size, CELLS, replace=False), plane.shape
    )
    cases = []
    for stencil in (3, 7):
        fields = fields_of(plane, grid, stencil)
        cases.append({
            "stencil": stencil,
            **{name: field[rows, columns] for name, field in fields.items()},
            "rootMeanSquare": {name: np.sqrt(np.nanmean(field**2)) for name, field in fields.items()},
            "validCells": {name: int(np.isfinite(field).sum()) for name, field in fields.items()},
        })
    write_or_check(__file__, {
        "files": [file.name for file in files],
        "variable": height.name,
        "shape": list(height.shape),
        "timeIndex": index,
        "date": str(plane[height.dims[0]].values)[:10],
        "row": rows,
        "column": columns,
        "latitude": grid.latitude[rows],
        "longitude": grid.longitude[columns],
        "heightMetres": unpacked(plane)[rows, columns],
        "cases": cases,
    })


def all_dates(target):
    files, height, grid = opened()
    time, latitude, longitude = height.dims
    with netCDF4.Dataset(target, "w") as out:
        out.title = "Geostrophic velocity and vorticity of the sample grid, seven points, ellipsoid"
        out.source = ", ".join(file.name for file in files)
        for name, values, units in ((latitude, grid.latitude, "degrees_north"), (longitude, grid.longitude, "degrees_east")):
            out.createDimension(name, len(values))
            axis = out.createVariable(name, "f8", (name,))
            axis.units = units
            axis[:] = values
        out.createDimension(time, height.shape[0])
        axis = out.createVariable(time, "f8", (time,))
        axis.units = "days since 1970-01-01 00:00:00"
        axis.calendar = "standard"
        axis[:] = (height[time].values - np.datetime64("1970-01-01")) / np.timedelta64(1, "D")
        written = {}
        for name, standard_name in CF_NAMES.items():
            written[name] = out.createVariable(name, "f8", height.dims, zlib=True, complevel=1, fill_value=np.nan)
            written[name].standard_name = standard_name
            written[name].units = "s-1" if name == "vorticity" else "m s-1"
        for start in range(0, height.shape[0], 50):
            block = slice(start, start + 50)
            for name, field in fields_of(height[block], grid, 7).items():
                written[name][block] = field
    print(f"{target}: {height.shape[0]} dates")


if __name__ == "__main__":
    if "--all" in sys.argv:
        all_dates(sys.argv[sys.argv.index("--all") + 1])
    else:
        middle_date()
