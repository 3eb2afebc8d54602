"""Coriolis parameter, beta, gravity, WGS-84 radii and degree lengths, and spherical distances, at many latitudes.

Sources: f with Omega = 7.292115e-5 rad/s (GRS80, Moritz 2000, J. Geodesy [from memory]); gravity at the sea surface from
TEOS-10 (IOC 2010, Appendix D [from memory]) and from gsw.grav; normal gravity of GRS80 (Somigliana's formula, Moritz
2000 [from memory]); meridian and prime-vertical radii of WGS-84 from their textbook formulas; gsw.f and gsw.distance.
"""
import gsw
import numpy as np

from reference_file import write_or_check

OMEGA = 7.292115e-5
SPHERE_RADIUS = 6371000.0
SEMI_MAJOR_AXIS = 6378137.0
INVERSE_FLATTENING = 298.257223563
FLATTENING = 1 / INVERSE_FLATTENING
ECCENTRICITY_SQUARED = FLATTENING * (2 - FLATTENING)

LATITUDES = np.array(
    [-90, -89.99, -80, -66.5, -60, -45, -37.25, -30, -23.4, -10, -5, -0.125, 0]
    + [0.001, 0.125, 2.2, 4.999, 5, 10, 15, 20, 25.625, 30, 33.3, 40, 45, 50, 55.55, 60, 70, 75, 85, 89.875, 90],
    dtype=float,
)

POINT_PAIRS = {
    "one degree of longitude at 45 N": (1, 45, 2, 45),
    "one degree of latitude": (10, -30, 10, -29),
    "across the date line, continuous": (179.5, 20, 180.75, 20.5),
    "across the date line, wrapped": (179.5, 20, -179.25, 20.5),
    "across the date line, southern": (-179.9, -41.3, 179.9, -41.1),
    "across Greenwich, wrapped": (359.875, 12, 0.125, 12),
    "over the pole": (0, 89.5, 180, 89.5),
    "near the north pole": (10, 89.9, 100, 89.95),
    "near the south pole": (-120, -89.99, 30, -89.8),
    "pole to equator": (33, 90, 77, 0),
    "across the equator": (-30, -0.125, -30.25, 0.125),
    "nearly antipodal": (0, 0.5, 179.5, 0.25),
    "six kilometres along a pass": (220.0, 34.0, 220.02, 34.052),
    "same point": (5, 5, 5, 5),
}


def coriolis(latitude):
    return 2 * OMEGA * np.sin(np.radians(latitude))


def beta_sphere(latitude):
    return 2 * OMEGA * np.cos(np.radians(latitude)) / SPHERE_RADIUS


def gravity_teos10(latitude):
    s = np.sin(np.radians(latitude)) ** 2
    return 9.780327 * (1 + (5.2792e-3 + 2.32e-5 * s) * s)


def gravity_grs80(latitude):
    s = np.sin(np.radians(latitude)) ** 2
    return 9.7803267715 * (1 + 0.001931851353 * s) / np.sqrt(1 - 0.00669438002290 * s)


def radii(latitude):
    """Meridian radius M and prime-vertical radius N of WGS-84 in metres."""
    w = np.sqrt(1 - ECCENTRICITY_SQUARED * np.sin(np.radians(latitude)) ** 2)
    return SEMI_MAJOR_AXIS * (1 - ECCENTRICITY_SQUARED) / w**3, SEMI_MAJOR_AXIS / w


def assert_published():
    """Values to the last digit printed in the literature's usual tables."""
    table = {
        0: (0, 2.289159, 9.780327, 110574.3, 111319.5),
        10: (2.532525, 2.254381, 9.781884, 110607.8, 109639.4),
        30: (7.292115, 1.982470, 9.793249, 110852.4, 96486.3),
        45: (10.31261, 1.618680, 9.806200, 111131.8, 78846.8),
        60: (12.63031, 1.144579, 9.819179, 111412.3, 55800.0),
    }
    for latitude, (f, beta, g, degree_latitude, degree_longitude) in table.items():
        meridian, prime = radii(latitude)
        assert abs(coriolis(latitude) * 1e5 - f) < 6e-6
        assert abs(beta_sphere(latitude) * 1e11 - beta) < 6e-7
        assert abs(gravity_teos10(latitude) - g) < 6e-7
        assert abs(np.radians(meridian) - degree_latitude) < 0.06
        assert abs(np.radians(prime) * np.cos(np.radians(latitude)) - degree_longitude) < 0.06
    assert abs(ECCENTRICITY_SQUARED - 0.00669437999014) < 5e-15
    assert abs(np.radians(SPHERE_RADIUS) - 111194.93) < 0.006
    assert np.max(np.abs(gravity_teos10(LATITUDES) - gsw.grav(LATITUDES, 0))) < 1e-11
    assert np.allclose(coriolis(LATITUDES), gsw.f(LATITUDES), rtol=1e-15, atol=0)


def distances():
    rows = []
    for name, (lon_a, lat_a, lon_b, lat_b) in POINT_PAIRS.items():
        lon, lat = np.array([lon_a, lon_b], dtype=float), np.array([lat_a, lat_b], dtype=float)
        metres = gsw.distance(lon, lat, 0)[0]
        rows.append(dict(name=name, longitude=lon, latitude=lat, gswDistanceMetres=metres))
    return rows


def gsw_radius():
    """The radius inside gsw.distance, from a quarter turn along the equator."""
    return gsw.distance(np.array([0.0, 90.0]), np.array([0.0, 0.0]), 0)[0] / (np.pi / 2)


if __name__ == "__main__":
    assert_published()
    assert abs(gsw_radius() - 6371000) < 1e-6
    meridian_radius, prime_radius = radii(LATITUDES)
    cosine = np.cos(np.radians(LATITUDES))
    write_or_check(__file__, {
        "constants": {
            "omega": OMEGA,
            "sphereRadiusMetres": SPHERE_RADIUS,
            "semiMajorAxisMetres": SEMI_MAJOR_AXIS,
            "inverseFlattening": INVERSE_FLATTENING,
            "gswDistanceRadiusMetres": round(gsw_radius()),
            "gswVersion": gsw.__version__,
        },
        "latitude": LATITUDES,
        "coriolis": coriolis(LATITUDES),
        "gswCoriolis": gsw.f(LATITUDES),
        "betaSphere": beta_sphere(LATITUDES),
        "gravityTeos10": gravity_teos10(LATITUDES),
        "gswGravity": gsw.grav(LATITUDES, 0),
        "gravityGrs80": gravity_grs80(LATITUDES),
        "meridianRadiusMetres": meridian_radius,
        "primeVerticalRadiusMetres": prime_radius,
        "degreeOfLatitudeMetres": np.radians(meridian_radius),
        "degreeOfLongitudeMetres": np.radians(prime_radius) * cosine,
        "degreeOfLongitudeSphereMetres": np.radians(SPHERE_RADIUS) * cosine,
        "distances": distances(),
    })
