"""Standard errors of geostrophic velocity and vorticity from height errors, through the whole linear operator.

The operator is a dense matrix: every column is the answer to a height of 1 m in one cell and 0 elsewhere, gaps kept. Two
matrices are made and compared where the axes are even: the answers of geostrophy.py, and products of difference matrices
whose weights solve the moment equations (which also serve uneven axes). The standard error is sqrt(diag(A C A')),
C = sigma_i sigma_j exp(-d^2 / 2 L^2) with d the straight distance through a sphere of 6371 km, or diagonal for L = 0.

Errors of means: sqrt(w' C w) with w = 1/n, effective number = mean variance over the variance of the mean.

Sources: propagation of variances, textbook; Gaussian correlation: common practice. Check values: noise gains of the
centred first differences; sigma(vorticity / f) of 0.107 for 1 cm at 0.25 degrees and 30 degrees north with the compact
five-point Laplacian (closed form).
"""
import numpy as np

import geostrophy
from geostrophy import BLANK_DEGREES, CENTRED_WEIGHTS, ONE_SIDED, Grid
from reference_file import quantised, write_or_check
from sphere_and_gravity import coriolis, gravity_teos10, radii

RADIUS_KM = 6371.0


def moment_weights(nodes):
    """Weights of the first derivative at 0, exact for the powers below len(nodes)."""
    scale = np.abs(nodes).max()
    powers = np.vander(np.asarray(nodes) / scale, increasing=True).T
    wanted = np.zeros(len(nodes))
    wanted[1] = 1 / scale
    return np.linalg.solve(powers, wanted)


def line_matrix(valid, coordinates, widest, periodic):
    """Derivative along one line as a matrix, and where there is one."""
    n = len(valid)
    matrix, defined = np.zeros((n, n)), np.zeros(n, bool)

    def place(i):
        return coordinates[i % n] + (i // n) * 2 * np.pi

    def usable(i):
        return (periodic or 0 <= i < n) and valid[i % n]

    for i in np.flatnonzero(valid):
        offers = [range(-m, m + 1) for m in (4, 3, 2, 1) if 2 * m + 1 <= widest] + [range(0, 3), range(-2, 1)]
        for offsets in offers:
            if all(usable(i + j) for j in offsets):
                for j, weight in zip(offsets, moment_weights([place(i + j) - place(i) for j in offsets])):
                    matrix[i, (i + j) % n] += weight
                defined[i] = True
                break
    return matrix, defined


def plane_matrix(valid, grid, axis, widest):
    """Derivative per radian along an axis of a plane (rows x columns) as a matrix over its cells."""
    rows, columns = valid.shape
    matrix, defined = np.zeros((rows, columns, rows, columns)), np.zeros(valid.shape, bool)
    if axis == 0:
        for c in range(columns):
            part, defined[:, c] = line_matrix(valid[:, c], np.radians(grid.latitude), widest, False)
            matrix[:, c, :, c] = part
    else:
        for r in range(rows):
            part, defined[r] = line_matrix(valid[r], np.radians(grid.longitude), widest, grid.periodic)
            matrix[r, :, r, :] = part
    return matrix.reshape(rows * columns, -1), defined


def operators(valid, grid, widest, earth):
    """Matrices of u, v and vorticity; rows without a value are NaN."""
    columns = len(grid.longitude)
    by_cell = lambda column: np.repeat(np.ravel(column), columns)[:, None]
    gravity = np.full(len(grid.latitude), 9.81) if earth == "sphere" else gravity_teos10(grid.latitude)
    if earth == "sphere":
        meridional = prime = np.full(len(grid.latitude), RADIUS_KM * 1000)
    else:
        meridional, prime = radii(grid.latitude)
    phi = np.radians(grid.latitude)
    north, east = by_cell(1 / meridional), by_cell(1 / (prime * np.cos(phi)))
    with np.errstate(divide="ignore"):
        ratio = gravity / coriolis(grid.latitude)
    open_rows = np.abs(grid.latitude) >= BLANK_DEGREES
    ratio = by_cell(np.where(open_rows, ratio, 0))
    d_north, has_north = plane_matrix(valid, grid, 0, widest)
    d_east, has_east = plane_matrix(valid, grid, 1, widest)
    has_u, has_v = has_north & open_rows[:, None], has_east & open_rows[:, None]
    u, v = -ratio * north * d_north, ratio * east * d_east
    v_x, has_v_x = plane_matrix(has_v, grid, 1, widest)
    u_y, has_u_y = plane_matrix(has_u, grid, 0, widest)
    vorticity = east * v_x @ v - north * u_y @ u + by_cell(np.tan(phi) / prime) * u
    for matrix, has in ((u, has_u), (v, has_v), (vorticity, has_u & has_v_x & has_u_y)):
        matrix[~has.ravel()] = np.nan
    return dict(u=u, v=v, vorticity=vorticity)


def operators_by_impulses(valid, grid, widest, earth):
    """The same from geostrophy.py's answers to unit heights (even axes only)."""
    cells = valid.size
    impulses = np.eye(cells).reshape(cells, *valid.shape)
    impulses[:, ~valid] = np.nan
    u, v = geostrophy.geostrophic_velocity(impulses, grid, widest, earth)
    vorticity = geostrophy.relative_vorticity(u, v, grid, widest, earth)
    return {name: field.reshape(cells, cells).T for name, field in dict(u=u, v=v, vorticity=vorticity).items()}


def correlation(grid, length_km):
    """Matrix over the cells, from the haversine of the arc between them."""
    phi, lam = (np.radians(a).ravel() for a in np.meshgrid(grid.latitude, grid.longitude, indexing="ij"))
    if length_km == 0:
        return np.eye(len(phi))
    haversine = (
        np.sin((phi[:, None] - phi) / 2) ** 2
        + np.cos(phi[:, None]) * np.cos(phi) * np.sin((lam[:, None] - lam) / 2) ** 2
    )
    return np.exp(-2 * RADIUS_KM**2 * haversine / length_km**2)


def standard_errors(matrix, covariance):
    """sqrt(diag(A C A')); NaN for rows of NaN."""
    known = np.isfinite(matrix).all(axis=1)
    out = np.full(len(matrix), np.nan)
    rows = matrix[known]
    out[known] = np.sqrt(np.einsum("ij,ij->i", rows @ covariance, rows))
    return out


def gaps(random, shape, share):
    return random.random(shape) >= share


def even_north():
    random = np.random.default_rng(20240701)
    grid = Grid(27 + 0.5 * np.arange(11), 205 + 0.5 * np.arange(12), False)
    valid = gaps(random, (11, 12), 0.02)
    valid[:2, :3] = False
    return grid, valid, random, "ellipsoid", (3, 5, 7, 9), (0, 90)


def band_over_equator():
    random = np.random.default_rng(20240702)
    grid = Grid(21 - 3.0 * np.arange(13), 7.5 + 15.0 * np.arange(24), True)
    valid = gaps(random, (13, 24), 0.03)
    valid[9:, 5:8] = False
    return grid, valid, random, "sphere", (5,), (0, 800)


def uneven_south():
    random = np.random.default_rng(20240703)
    latitude = -45 + np.cumsum(0.3 + 0.3 * random.random(11))
    grid = Grid(latitude, 20 + np.cumsum(0.4 + 0.2 * random.random(12)), False)
    return grid, gaps(random, (11, 12), 0.02), random, "ellipsoid", (3, 7), (60,)


GRIDS = {"even": even_north, "band": band_over_equator, "uneven": uneven_south}


def assert_known_cases():
    gain = {points: np.sqrt(2 * np.sum(weights**2)) for points, weights in CENTRED_WEIGHTS.items()}
    for points, expected in {3: 0.7071, 5: 0.9501, 7: 1.0819, 9: 1.1674}.items():
        assert abs(gain[points] - expected) < 1e-4
    assert np.allclose(moment_weights([0, 1, 2]), ONE_SIDED)
    for points, weights in CENTRED_WEIGHTS.items():
        half = len(weights)
        assert np.allclose(moment_weights(np.arange(-half, half + 1))[half + 1 :], weights)
    assert abs(laplacian_over_f() - 0.107) < 5e-4
    for name in ("even", "band"):
        grid, valid, _, earth, stencils, _ = GRIDS[name]()
        for points in stencils:
            one, other = operators(valid, grid, points, earth), operators_by_impulses(valid, grid, points, earth)
            for field in one:
                scale = np.nanmax(np.abs(one[field]))
                assert np.allclose(one[field], other[field], rtol=0, atol=1e-11 * scale, equal_nan=True), (name, field)


def laplacian_over_f(sigma=0.01, latitude=30.0, spacing_degrees=0.25):
    """sigma(vorticity)/f of the compact Laplacian on a square mesh: g sqrt(20) sigma / (f dx)^2."""
    spacing = np.radians(spacing_degrees) * RADIUS_KM * 1000
    return 9.81 * np.sqrt(20) * sigma / (coriolis(latitude) * spacing) ** 2


def composed_over_f():
    """The same for two differences in succession, at the middle of a 0.25 degree grid about 30 degrees north, by stencil."""
    out = {}
    grid = Grid(30 + 0.25 * np.arange(-9, 10), 200 + 0.25 * np.arange(-9, 10), False)
    valid = np.ones((19, 19), bool)
    for points in CENTRED_WEIGHTS:
        matrix = operators_by_impulses(valid, grid, points, "sphere")["vorticity"]
        out[points] = 0.01 * np.sqrt(np.sum(matrix[9 * 19 + 9] ** 2)) / coriolis(30.0)
    return out


def grid_cases(name):
    grid, valid, random, earth, stencils, lengths = GRIDS[name]()
    sigma = quantised(0.01 + 0.03 * random.random(valid.shape))
    cases = []
    for points in stencils:
        matrices = operators(valid, grid, points, earth)
        for length in lengths:
            covariance = sigma.ravel()[:, None] * sigma.ravel() * correlation(grid, length)
            errors = {field: standard_errors(matrix, covariance) for field, matrix in matrices.items()}
            cases.append(dict(stencil=points, correlationKm=length, **errors))
    return {
        "latitude": grid.latitude,
        "longitude": grid.longitude,
        "periodic": grid.periodic,
        "earth": earth,
        "blankDegrees": BLANK_DEGREES,
        "valid": valid.ravel(),
        "sigmaMetres": sigma.ravel(),
        "cases": cases,
    }


def mean_case(sigma, distance, length):
    """Plain mean of the values whose sigma is not NaN."""
    has = np.isfinite(sigma)
    n = has.sum()
    one = np.eye(n) if length == 0 else np.exp(-(distance[np.ix_(has, has)] ** 2) / (2 * length**2))
    covariance = sigma[has][:, None] * sigma[has] * one
    variance = covariance.sum() / n**2
    effective = np.mean(sigma[has] ** 2) / variance
    return dict(length=length, standardError=np.sqrt(variance), effectiveCount=effective, count=n)


def means():
    random = np.random.default_rng(20240704)
    days = np.cumsum(random.integers(1, 9, 80)).astype(float)
    sigma = quantised(0.02 + 0.02 * random.random(80))
    sigma[random.random(80) < 0.1] = np.nan
    apart = np.abs(days[:, None] - days)
    longitude = 5.0 + 10 * np.arange(36)
    ring = quantised(0.02 + 0.02 * random.random(36))
    ring[3:6] = np.nan
    degrees = np.abs(longitude[:, None] - longitude)
    circle_km = 2 * np.pi * RADIUS_KM * np.cos(np.radians(40.0))
    ring_km = np.minimum(degrees, 360 - degrees) / 360 * circle_km
    return {
        "days": days,
        "sigmaInTime": sigma,
        "inTime": [mean_case(sigma, apart, length) for length in (0, 3, 15, 100)],
        "ringLatitude": 40.0,
        "ringLongitude": longitude,
        "sigmaOnRing": ring,
        "onRing": [mean_case(ring, ring_km, length) for length in (0, 300, 1500)],
    }


if __name__ == "__main__":
    assert_known_cases()
    values = {"laplacianOverF": laplacian_over_f(), "composedOverF": composed_over_f()}
    values["grids"] = {name: grid_cases(name) for name in GRIDS}
    values["means"] = means()
    write_or_check(__file__, values)
