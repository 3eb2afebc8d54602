"""Geostrophic velocity between neighbouring casts: dynamic height from gsw, velocity from gsw.geostrophic_velocity.

With Phi the geopotential anomaly (m2 s-2) and s along the section, u_left = (1/f) dPhi/ds at the middle of each pair,
f at the mean latitude and s the spherical distance; the sea-surface form has g eta in place of Phi. Positive is to the
left of the direction of travel. Casts: the check casts shipped with gsw (gsw_cv_v3_0.npz, TEOS-10 check values) and
sections of neighbouring casts made from the first of them.
"""
from pathlib import Path

import gsw
import numpy as np

from reference_file import write_or_check

SHIPPED = Path(gsw.__file__).parent / "tests"
SHOWN_LEVELS = [0, 1, 5, 10, 20, 30, 44]


def section(name, absolute_salinity, conservative_temperature, pressure, longitude, latitude):
    """Dynamic heights and velocities of a section; arrays are levels x casts."""
    height = gsw.geo_strf_dyn_height(absolute_salinity, conservative_temperature, pressure, 0)
    velocity, mid_longitude, mid_latitude = gsw.geostrophic_velocity(height, longitude, latitude)
    distance = gsw.distance(longitude, latitude, 0)
    f = gsw.f(mid_latitude)
    by_hand = np.diff(height, axis=1) / (distance * f)
    # gsw unwraps longitudes before it takes distances, which rounds a step over the date line differently.
    assert np.nanmax(np.abs(by_hand - velocity)) <= 1e-11 * np.nanmax(np.abs(velocity))
    return dict(
        name=name,
        longitude=longitude,
        latitude=latitude,
        midLongitude=mid_longitude,
        midLatitude=mid_latitude,
        gswDistanceMetres=distance,
        gswCoriolis=f,
        levels=[
            dict(
                pressureDecibar=pressure[level],
                geopotentialAnomaly=height[level],
                velocityLeftMetresPerSecond=velocity[level],
            )
            for level in SHOWN_LEVELS
        ],
    )


def check_casts():
    values = np.load(SHIPPED / "gsw_cv_v3_0.npz")
    salinity, temperature = values["SA_chck_cast"], values["CT_chck_cast"]
    pressure = values["p_chck_cast"].astype(float)
    longitude, latitude = values["long_chck_cast"].astype(float), values["lat_chck_cast"].astype(float)
    height = gsw.geo_strf_dyn_height(salinity, temperature, pressure, 0)
    velocity, _, _ = gsw.geostrophic_velocity(height, longitude, latitude)
    shipped_height = np.load(SHIPPED / "geo_strf_dyn_height.npy")
    shipped_velocity = np.load(SHIPPED / "geo_strf_velocity.npy")
    # The shipped files were written with p_ref = "pr" of the check file and another build: rounding only.
    assert np.load(SHIPPED / "gsw_cv_v3_0.npz")["pr"] == 0
    assert np.nanmax(np.abs(height - shipped_height)) < 1e-9
    assert np.nanmax(np.abs(velocity - shipped_velocity)) < 1e-12
    # The toolbox's own check value uses another vertical interpolation: agreement is looser.
    toolbox_difference = float(np.nanmax(np.abs(velocity - values["geo_strf_velocity"])))
    assert toolbox_difference < 1e-4
    return salinity, temperature, pressure, longitude, latitude, toolbox_difference


def neighbouring(name, cast, longitude, latitude, seed):
    """A section of casts that differ from a check cast by a smooth random warming of the upper ocean."""
    salinity, temperature, pressure = cast
    random = np.random.default_rng(seed)
    count = len(longitude)
    warming = random.normal(0, 0.8, count) * np.exp(-pressure[:, None] / 600)
    saltiness = random.normal(0, 0.05, count) * np.exp(-pressure[:, None] / 400)
    shared = np.repeat(pressure[:, None], count, axis=1)
    return section(
        name,
        salinity[:, None] + saltiness,
        temperature[:, None] + warming,
        shared,
        np.asarray(longitude, dtype=float),
        np.asarray(latitude, dtype=float),
    )


if __name__ == "__main__":
    sa, ct, p, lon, lat, toolbox = check_casts()
    first = (sa[:, 0], ct[:, 0], p[:, 0])
    write_or_check(__file__, {
        "gswVersion": gsw.__version__,
        "largestDifferenceFromToolboxVelocity": round(toolbox, 9),
        "sections": [
            section("check casts", sa, ct, p, lon, lat),
            neighbouring("eastward along 30 N", first, [-40, -39.5, -39, -38.25, -37.5], [30] * 5, 11),
            neighbouring("northward through 35 S", first, [20] * 4, [-36, -35.6, -35.1, -34.5], 12),
            neighbouring("slanting over the date line", first, [179.4, 179.9, -179.7, -179.1], [21, 21.4, 21.7, 22.3], 13),
            neighbouring("slanting, southern, westward", first, [-150, -150.4, -150.9], [-44.5, -44.1, -43.9], 14),
        ],
    })
