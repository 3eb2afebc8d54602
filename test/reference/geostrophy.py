"""Geostrophic velocity and relative vorticity of awkward height fields, with the gap-narrowing difference rule.

Rule along an axis, at one cell: the widest symmetric centred stencil not wider than the chosen one (9, 7, 5, 3 points)
whose points all lie inside the array (or wrap, on a periodic axis) and are valid, the centre included. If not even three
points fit, the one-sided second-order difference [-3 4 -1]/2 towards increasing index, else its mirror towards
decreasing index; else NaN. u = -(g/f) eta_y, v = (g/f) eta_x, NaN where |latitude| < 5 degrees.
Vorticity v_x - u_y + u tan(phi)/R on the sphere, N in place of R on the ellipsoid, its differences by the same rule on
the u and v fields.

Sources: central weights are textbook (Fornberg 1988 [from memory]); seven points as in Arbic et al. 2012 (JGR 117,
C03029); earth from sphere_and_gravity.py. One JSON file a grid.
"""
from dataclasses import dataclass

import numpy as np
from scipy.special import eval_legendre

from reference_file import quantised, write_or_check
from sphere_and_gravity import coriolis, gravity_teos10, radii

CENTRED_WEIGHTS = {
    3: np.array([1]) / 2,
    5: np.array([8, -1]) / 12,
    7: np.array([45, -9, 1]) / 60,
    9: np.array([672, -168, 32, -3]) / 840,
}
ONE_SIDED = np.array([-3, 4, -1]) / 2
BLANK_DEGREES = 5.0
EARTHS = ("ellipsoid", "sphere")


@dataclass
class Grid:
    latitude: np.ndarray
    longitude: np.ndarray
    periodic: bool

    def step(self, axis):
        """Signed spacing in radians along axis 0 (latitude) or 1 (longitude)."""
        values = self.latitude if axis == 0 else self.longitude
        return np.radians((values[-1] - values[0]) / (len(values) - 1))

    def metres_per_radian(self, axis, earth):
        """Column of one value a latitude."""
        if earth == "sphere":
            along_meridian = prime = np.full(len(self.latitude), 6371000.0)
        else:
            along_meridian, prime = radii(self.latitude)
        metric = along_meridian if axis == 0 else prime * np.cos(np.radians(self.latitude))
        return metric[:, None]

    def curvature(self, earth):
        """tan(phi)/R, or tan(phi)/N on the ellipsoid, a column in 1/m."""
        prime = np.full(len(self.latitude), 6371000.0) if earth == "sphere" else radii(self.latitude)[1]
        return (np.tan(np.radians(self.latitude)) / prime)[:, None]


def difference_of_line(line, widest, periodic):
    """Derivative per index step of a 1-D array, the rule read plainly: one cell at a time."""
    n = len(line)

    def at(i):
        if periodic:
            return line[i % n]
        return line[i] if 0 <= i < n else np.nan

    out = np.full(n, np.nan)
    for i in range(n):
        for points in (9, 7, 5, 3):
            if points > widest:
                continue
            weights = CENTRED_WEIGHTS[points]
            reach = np.arange(1, len(weights) + 1)
            ahead = np.array([at(i + j) for j in reach])
            behind = np.array([at(i - j) for j in reach])
            if np.isfinite(at(i)) and np.isfinite(ahead).all() and np.isfinite(behind).all():
                out[i] = np.sum(weights * (ahead - behind))
                break
        else:
            for sign in (1, -1):
                three = np.array([at(i), at(i + sign), at(i + 2 * sign)])
                if np.isfinite(three).all():
                    out[i] = sign * np.sum(ONE_SIDED * three)
                    break
    return out


def shifted(field, axis, offset, periodic):
    """field[i + offset] at i along the axis; NaN beyond the ends unless periodic."""
    out = np.roll(field, -offset, axis=axis)
    if not periodic and offset:
        edge = [slice(None)] * field.ndim
        edge[axis] = slice(-offset, None) if offset > 0 else slice(None, -offset)
        out[tuple(edge)] = np.nan
    return out


def difference(field, axis, widest, periodic):
    """The same as difference_of_line along an axis of an array, whole arrays at a time."""
    moved = {k: shifted(field, axis, k, periodic) for k in range(-4, 5)}
    out = np.full(field.shape, np.nan)
    for sign in (-1, 1):
        one_sided = sign * (ONE_SIDED[0] * field + ONE_SIDED[1] * moved[sign] + ONE_SIDED[2] * moved[2 * sign])
        out = np.where(np.isfinite(one_sided), one_sided, out)
    for points in (3, 5, 7, 9):
        if points <= widest:
            weights = CENTRED_WEIGHTS[points]
            centred = sum(w * (moved[j + 1] - moved[-j - 1]) for j, w in enumerate(weights))
            out = np.where(np.isfinite(centred) & np.isfinite(field), centred, out)
    return out


def gradient(field, grid, axis, widest, earth):
    """Derivative per metre along axis -2 (north) or -1 (east) of the last two dimensions."""
    periodic = grid.periodic and axis == 1
    per_step = difference(field, axis - 2, widest, periodic)
    return per_step / grid.step(axis) / grid.metres_per_radian(axis, earth)


def geostrophic_velocity(height, grid, widest, earth):
    """u and v in m/s of a height field in metres (last two dimensions latitude, longitude)."""
    gravity = np.full(len(grid.latitude), 9.81) if earth == "sphere" else gravity_teos10(grid.latitude)
    with np.errstate(divide="ignore"):
        ratio = gravity / coriolis(grid.latitude)
    ratio = np.where(np.abs(grid.latitude) < BLANK_DEGREES, np.nan, ratio)[:, None]
    u = -ratio * gradient(height, grid, 0, widest, earth)
    v = ratio * gradient(height, grid, 1, widest, earth)
    return u, v


def relative_vorticity(u, v, grid, widest, earth):
    """In 1/s, with the metric term."""
    v_x = gradient(v, grid, 1, widest, earth)
    u_y = gradient(u, grid, 0, widest, earth)
    return v_x - u_y + u * grid.curvature(earth)


def waves_and_eddies(latitude, longitude, random, eddies, eddy_km):
    """A random smooth sum of spherical waves plus Gaussian eddies, in metres."""
    phi, lam = np.radians(latitude)[:, None], np.radians(longitude)[None, :]
    height = 0.4 * eval_legendre(3, np.sin(phi)) + 0 * lam
    for wavenumber in (1, 2, 3, 5, 8, 13):
        amplitude, turn = random.normal(0, 0.15), random.uniform(0, 2 * np.pi)
        height += amplitude * np.cos(phi) * np.cos(wavenumber * lam + turn) * eval_legendre(wavenumber, np.sin(phi))
    for _ in range(eddies):
        centre_lat = random.uniform(latitude.min(), latitude.max())
        centre_lon = random.uniform(longitude.min(), longitude.max())
        size = random.uniform(*eddy_km) * 1e3
        turn = np.mod(longitude - centre_lon + 180, 360) - 180
        x = 6371000 * np.cos(np.radians(centre_lat)) * np.radians(turn)[None, :]
        y = 6371000 * np.radians(latitude - centre_lat)[:, None]
        height += random.normal(0, 0.25) * np.exp(-(x**2 + y**2) / (2 * size**2))
    return quantised(height)


def northern_with_land():
    """Quarter-degree grid with a slanting coast, a peninsula one cell thick, islands and random gaps."""
    random = np.random.default_rng(20240611)
    grid = Grid(30.125 + 0.25 * np.arange(20), -47.625 + 0.25 * np.arange(30), False)
    height = waves_and_eddies(grid.latitude, grid.longitude, random, 9, (40, 110))
    row, column = np.meshgrid(np.arange(20), np.arange(30), indexing="ij")
    land = (column + row // 2 > 32) | ((row == 9) & (column < 6)) | ((row > 14) & (row < 17) & (column > 8) & (column < 11))
    height[land | (random.random(height.shape) < 0.04)] = np.nan
    return grid, height


def southern_descending():
    """Quarter-degree grid, latitude descending, longitude running on past 180; gaps in two corners."""
    random = np.random.default_rng(20240612)
    grid = Grid(-31.375 - 0.25 * np.arange(20), 176.125 + 0.25 * np.arange(30), False)
    height = waves_and_eddies(grid.latitude, grid.longitude, random, 9, (40, 110))
    height[:3, :4] = np.nan
    height[-1, -5:] = np.nan
    height[random.random(height.shape) < 0.01] = np.nan
    return grid, height


def periodic_band():
    """Two-degree band all the way round, over the equator, with a continent and random gaps."""
    random = np.random.default_rng(20240613)
    grid = Grid(-21 + 2.0 * np.arange(22), 1 + 2.0 * np.arange(180), True)
    height = waves_and_eddies(grid.latitude, grid.longitude, random, 60, (300, 700))
    height[4:19, 84:90] = np.nan
    height[random.random(height.shape) < 0.01] = np.nan
    return grid, height


GRIDS = {"northern": northern_with_land, "southern": southern_descending, "band": periodic_band}
SHOWN_COLUMNS = {"band": list(range(10)) + list(range(80, 86)) + list(range(168, 180))}


def assert_known_cases():
    """Stencil responses, solid-body rotation and the two spellings of the difference rule."""
    responses = {3: (0.6366, 0.8270, 0.9003), 5: (0.8488, 0.9648, 0.9882), 7: (0.9337, 0.9924, 0.9985)}
    responses[9] = (0.9701, 0.9983, 0.9998)
    for points, expected in responses.items():
        for wavelength, response in zip((4, 6, 8), expected):
            theta = 2 * np.pi / wavelength
            line = np.sin(theta * np.arange(-30, 31))
            assert abs(difference_of_line(line, points, False)[30] / theta - response) < 1e-4
    eddy = {3: 0.9124, 5: 0.9875, 7: 0.9982, 9: 1.0000}
    spacing, size = 0.25 * 111194.93, 50e3
    y = spacing * np.arange(-20, 21)
    profile = 0.3 * np.exp(-(y**2) / (2 * size**2))
    for points, ratio in eddy.items():
        slope = difference_of_line(profile, points, False)[22] / spacing
        assert abs(slope / (-y[22] / size**2 * profile[22]) - ratio) < 1e-4
    grid = Grid(20 + 0.25 * np.arange(81), 0.25 * np.arange(40), False)
    u = np.cos(np.radians(grid.latitude))[:, None] + np.zeros((1, 40))
    vorticity = relative_vorticity(u, 0 * u, grid, 9, "sphere")
    assert abs(vorticity[40, 20] / 1.56961e-7 - 1) < 3e-6
    tilted = np.radians(grid.latitude - 30)[:, None] * 6371000 * 1e-7 + np.zeros((1, 40))
    east, _ = geostrophic_velocity(tilted, grid, 7, "sphere")
    assert abs(east[40, 20] + 0.013453) < 5e-7
    for make in GRIDS.values():
        grid, height = make()
        for points in CENTRED_WEIGHTS:
            for axis in (0, 1):
                periodic = grid.periodic and axis == 1
                plainly = np.apply_along_axis(difference_of_line, axis, height, points, periodic)
                assert np.allclose(plainly, difference(height, axis, points, periodic), rtol=0, atol=1e-15, equal_nan=True)


def flat(field, columns):
    return field[:, columns].ravel()


def reference(name):
    grid, height = GRIDS[name]()
    columns = SHOWN_COLUMNS.get(name, list(range(len(grid.longitude))))
    cases = []
    for earth in EARTHS:
        for points in CENTRED_WEIGHTS:
            u, v = geostrophic_velocity(height, grid, points, earth)
            vorticity = relative_vorticity(u, v, grid, points, earth)
            fields = dict(u=flat(u, columns), v=flat(v, columns), vorticity=flat(vorticity, columns))
            cases.append(dict(earth=earth, stencil=points, **fields))
    return {
        "latitude": grid.latitude,
        "longitude": grid.longitude,
        "periodic": grid.periodic,
        "blankDegrees": BLANK_DEGREES,
        "heightMetres": height.ravel(),
        "shownColumns": columns,
        "cases": cases,
    }


if __name__ == "__main__":
    assert_known_cases()
    for grid_name in GRIDS:
        write_or_check(__file__, reference(grid_name), grid_name)
