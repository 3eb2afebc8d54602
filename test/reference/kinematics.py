"""Divergence, strain and Okubo-Weiss on the grids of geostrophy.py, and a Gaussian eddy with its cyclogeostrophic flow.

On the sphere (radius R; M and N take its place in the north and east terms on the ellipsoid):
divergence u_x + v_y - v tan(phi)/R; normal strain u_x - v_y - v tan(phi)/R; shear strain v_x + u_y + u tan(phi)/R;
Okubo-Weiss = normal^2 + shear^2 - vorticity^2. On the ellipsoid tan(phi)/N, as for vorticity.
Cyclogeostrophy: V^2/r + f V = f Vg, V = (r f / 2)(-1 + sqrt(1 + 4 Vg/(f r))) (Penven et al. 2014, JGR Oceans 119, 1054
[from memory]); thresholds of Okubo-Weiss are left to their users.
"""
import numpy as np

from geostrophy import EARTHS, GRIDS, Grid, geostrophic_velocity, gradient, relative_vorticity
from reference_file import write_or_check
from sphere_and_gravity import OMEGA

CELLS = 150
STENCIL = 7


def deformation(u, v, grid, widest, earth):
    u_x, u_y = gradient(u, grid, 1, widest, earth), gradient(u, grid, 0, widest, earth)
    v_x, v_y = gradient(v, grid, 1, widest, earth), gradient(v, grid, 0, widest, earth)
    curvature = grid.curvature(earth)
    normal = u_x - v_y - v * curvature
    shear = v_x + u_y + u * curvature
    vorticity = relative_vorticity(u, v, grid, widest, earth)
    return dict(
        divergence=u_x + v_y - v * curvature,
        normalStrain=normal,
        shearStrain=shear,
        okuboWeiss=normal**2 + shear**2 - vorticity**2,
    )


def on_grids():
    rows = []
    for name, make in GRIDS.items():
        grid, height = make()
        for earth in EARTHS:
            u, v = geostrophic_velocity(height, grid, STENCIL, earth)
            fields = deformation(u, v, grid, STENCIL, earth)
            random = np.random.default_rng(150)
            row, column = np.unravel_index(random.choice(height.size, CELLS, replace=False), height.shape)
            shown = {key: field[row, column] for key, field in fields.items()}
            rows.append(dict(grid=name, earth=earth, stencil=STENCIL, row=row, column=column, **shown))
    return rows


def assert_divergence_of_geostrophic_flow():
    """Geostrophic flow on the sphere diverges as -beta v/f; 2.71865e-8 1/s for v = 0.1 m/s at 30 N."""
    beta, f = 2 * OMEGA * np.cos(np.radians(30)) / 6371000, OMEGA
    assert abs(beta * 0.1 / f / 2.71865e-8 - 1) < 1e-5
    grid = Grid(28 + 0.125 * np.arange(33), 0.125 * np.arange(33), False)
    phi, lam = np.radians(grid.latitude)[:, None], np.radians(grid.longitude)[None, :]
    height = 0.3 * np.sin(20 * lam) * np.cos(15 * phi)
    u, v = geostrophic_velocity(height, grid, 9, "sphere")
    divergence = deformation(u, v, grid, 9, "sphere")["divergence"]
    expected = -(v / (np.tan(phi) * 6371000))
    assert np.max(np.abs(divergence - expected)[8:-8, 8:-8]) < 1e-6 * np.max(np.abs(expected))


def gaussian_eddy(f=1e-4, amplitude=0.3, size=50e3, gravity=9.81):
    """Height amplitude times exp(-r^2/2L^2); speeds positive anticlockwise, as for a low in the north."""
    radius = size * np.array([0.1, 0.25, 0.5, 0.75, 1.0, 1.25, 1.5, 2.0, 2.5, 3.0])
    bell = np.exp(-(radius**2) / (2 * size**2))
    rows = []
    for kind, sign in (("anticyclone", 1), ("cyclone", -1)):
        geostrophic = -sign * gravity * amplitude * radius / (f * size**2) * bell
        balanced = radius * f / 2 * (-1 + np.sqrt(1 + 4 * geostrophic / (f * radius)))
        assert np.allclose(balanced**2 / radius + f * balanced, f * geostrophic, rtol=1e-12)
        iterated, steps = geostrophic.copy(), [geostrophic]
        for _ in range(2):
            iterated = geostrophic - iterated**2 / (f * radius)
            steps.append(iterated)
        vorticity = sign * gravity * amplitude / (f * size**2) * (radius**2 / size**2 - 2) * bell
        rows.append(dict(kind=kind, radiusMetres=radius, geostrophic=geostrophic, gradientWind=balanced,
                         afterOneIteration=steps[1], afterTwoIterations=steps[2], vorticity=vorticity))
    at_size = 4
    for row, balanced, iterated in ((rows[0], -0.386950, -0.386264), (rows[1], 0.334611, 0.335024)):
        assert abs(abs(row["geostrophic"][at_size]) - 0.357004) < 1e-6
        assert abs(row["gradientWind"][at_size] - balanced) < 1e-6
        assert abs(row["afterTwoIterations"][at_size] - iterated) < 1e-6
    centre = -2 * gravity * amplitude / (f * size**2)
    assert abs(centre / -2.3544e-5 - 1) < 1e-9 and abs(-(centre**2) / -5.5432e-10 - 1) < 1e-5
    return dict(
        coriolis=f, amplitudeMetres=amplitude, sizeMetres=size, gravity=gravity,
        centreVorticity=centre, centreOkuboWeiss=-(centre**2), centreRossby=centre / f, eddies=rows,
    )


if __name__ == "__main__":
    assert_divergence_of_geostrophic_flow()
    write_or_check(__file__, {"grids": on_grids(), "gaussianEddy": gaussian_eddy()})
