"""Passing Gaussian eddies: zonal-mean currents, mapped heights, energy, lasting, and red noise in a band.

Every value comes from quadrature or a covariance matrix, none from the closed forms under test: zonal means from a height
field summed over longitude and differenced in latitude, smoothed heights by integrating the moving eddy against the
kernels, energy by integrating the squared current, red noise from the Toeplitz covariance of AR(1) and the filter's matrix.
"""
import numpy as np
import scipy
from scipy import integrate, optimize, special

from reference_file import write_or_check

RADIUS, GRAVITY, OMEGA = 6371000.0, 9.81, 7.292115e-5
METRES_PER_DEGREE = RADIUS * np.pi / 180
DAY = 86400.0


def ratio(latitude):
    """g/f."""
    return GRAVITY / (2 * OMEGA * np.sin(np.radians(latitude)))


def envelope(age, ramp):
    to_end = np.minimum(age, 1 - age)
    rise = np.sin(np.pi / 2 * np.clip(to_end / ramp, 0, 1)) ** 2
    return np.where(to_end > 0, rise, 0.0)


def zonal_means():
    latitudes = np.arange(28.0, 33.01, 0.5)
    days = np.arange(0.0, 181.0, 12.0)
    lifetime, ramp = 150.0, 0.25
    stretches = [[-150.0, -146.0], [-144.5, -140.0]]
    eddies = [
        dict(amplitudeMetres=0.12, radiusMetres=60e3, longitude=-145.0, latitude=30.0, middleDay=80.0, speedMetresPerSecond=-0.05),
        dict(amplitudeMetres=-0.08, radiusMetres=45e3, longitude=-141.0, latitude=31.3, middleDay=20.0, speedMetresPerSecond=-0.04),
        dict(amplitudeMetres=0.20, radiusMetres=90e3, longitude=-149.5, latitude=29.2, middleDay=150.0, speedMetresPerSecond=0.02),
        dict(amplitudeMetres=-0.15, radiusMetres=70e3, longitude=-144.9, latitude=32.8, middleDay=95.0, speedMetresPerSecond=-0.10),
    ]
    width = sum(east - west for west, east in stretches)
    cells = 4000
    longitudes = np.concatenate([west + (east - west) * (np.arange(cells) + 0.5) / cells for west, east in stretches])
    weights = np.concatenate([np.full(cells, (east - west) / cells / width) for west, east in stretches])
    current = np.zeros((len(latitudes), len(days)))
    for eddy in eddies:
        east = METRES_PER_DEGREE * np.cos(np.radians(eddy["latitude"]))
        for t, day in enumerate(days):
            since = day - eddy["middleDay"]
            strength = eddy["amplitudeMetres"] * envelope(np.array(since / lifetime + 0.5), ramp)
            x = (longitudes - eddy["longitude"]) * east - eddy["speedMetresPerSecond"] * DAY * since

            def mean_height(y):
                return strength * np.sum(weights * np.exp(-(x**2 + y**2) / (2 * eddy["radiusMetres"] ** 2)))

            for row, latitude in enumerate(latitudes):
                y = (latitude - eddy["latitude"]) * METRES_PER_DEGREE
                step = 20.0
                slope = (8 * (mean_height(y + step) - mean_height(y - step))
                         - (mean_height(y + 2 * step) - mean_height(y - 2 * step))) / (12 * step)
                current[row, t] -= ratio(latitude) * slope
    return dict(latitudes=latitudes, days=days, lifetimeDays=lifetime, rampShare=ramp, stretches=stretches, eddies=eddies,
                current=current.ravel())


def mapped_heights():
    """Height seen at x, y from the centre of a moving eddy, smoothed in space and time, by sums over 801 even steps to 9
    standard deviations (which converge faster than any power for a Gaussian)."""
    nodes = np.linspace(-9, 9, 801)
    weights = np.exp(-nodes**2 / 2)
    weights = weights / weights.sum()
    cases = []
    for amplitude, radius, speed, metres, days in ((0.1, 60e3, -0.05, 35e3, 5.0), (0.2, 80e3, 0.3, 60e3, 12.0), (0.1, 50e3, -0.1, 0.0, 10.0)):
        points = [[0.0, 0.0], [40e3, 0.0], [0.0, 70e3], [-90e3, 50e3]]
        heights = []
        for x, y in points:
            dx = x - nodes[:, None] * metres - nodes[None, :] * days * DAY * speed
            along = np.einsum("ik,i,k", np.exp(-(dx**2) / (2 * radius**2)), weights, weights)
            across = np.sum(weights * np.exp(-((y - nodes * metres) ** 2) / (2 * radius**2)))
            heights.append(amplitude * along * across)
        cases.append(dict(amplitudeMetres=amplitude, radiusMetres=radius, speedMetresPerSecond=speed, metres=metres, days=days,
                          points=points, heights=heights))
    return cases


def energy():
    """Integral of v squared over the plane for one eddy, east and north radii apart."""
    cases = []
    for amplitude, east, north in ((0.1, 60e3, 60e3), (0.15, 110e3, 70e3)):
        slope = integrate.quad(lambda x: (x / east**2) ** 2 * np.exp(-(x**2) / east**2), -12 * east, 12 * east, epsabs=0)[0]
        across = integrate.quad(lambda y: np.exp(-(y**2) / north**2), -12 * north, 12 * north, epsabs=0)[0]
        cases.append(dict(amplitudeMetres=amplitude, radiusEastMetres=east, radiusNorthMetres=north, gravityOverCoriolis=ratio(30.0),
                          integral=(ratio(30.0) * amplitude) ** 2 * slope * across))
    return cases


def lasting():
    cases = []
    for ramp in (0.1, 0.25, 0.5):
        def overlap(lag):
            corners = sorted({point for base in (0, ramp, 1 - ramp, 1) for point in (base, base - lag) if 0 < point < 1 - lag})
            edges = [0, *corners, 1 - lag]
            return sum(integrate.quad(lambda a: float(envelope(np.array(a), ramp) * envelope(np.array(a + lag), ramp)), low, high)[0]
                       for low, high in zip(edges, edges[1:]))

        whole = overlap(0.0)
        folding = optimize.brentq(lambda lag: overlap(lag) - whole / np.e, 0.1, 0.95, xtol=1e-12)
        cases.append(dict(rampShare=ramp, meanSquare=whole, foldingShare=folding))
    return cases


def red_noise():
    """Mean and degrees of freedom of the band variance of AR(1) noise from matrices, the filter wrapped round the ends."""
    cases = []
    samples = 600
    frequency = np.fft.fftfreq(samples)
    low, high = 1 / 120, 1 / 20
    response = ((np.abs(frequency) >= low) & (np.abs(frequency) <= high)).astype(float)
    filtering = np.real(np.fft.ifft(response[:, None] * np.fft.fft(np.eye(samples), axis=0), axis=0))
    lag = np.abs(np.subtract.outer(np.arange(samples), np.arange(samples)))
    for r in (0.0, 0.5, 0.9):
        banded = filtering @ (r**lag) @ filtering.T
        mean = np.trace(banded) / samples
        variance = 2 * np.sum(banded**2) / samples**2
        cases.append(dict(lagOne=r, samples=samples, lowest=low, highest=high, share=mean, degrees=2 * mean**2 / variance))
    return cases


def crossing():
    amplitude, radius, speed, days = 0.1, 60e3, 0.05, 1400.0
    y = radius
    time = np.linspace(-days / 2, days / 2, 200001) * DAY
    current = ratio(30.0) * amplitude * y / radius**2 * np.exp(-((speed * time) ** 2 + y**2) / (2 * radius**2))
    mean = np.trapezoid(current, time) / (days * DAY) if hasattr(np, "trapezoid") else np.trapz(current, time) / (days * DAY)
    assert abs(mean - 3.382e-3) < 2e-6
    return dict(gravityOverCoriolis=ratio(30.0), amplitudeMetres=amplitude, speedMetresPerSecond=speed, days=days, peak=mean)


if __name__ == "__main__":
    x = np.concatenate([np.linspace(-6.5, 6.5, 53), [1e-8, 2.999, 3.0, 3.001]])
    write_or_check(__file__, {
        "scipyVersion": scipy.__version__,
        "errorFunction": {"x": x, "values": special.erf(x)},
        "zonalMeans": zonal_means(),
        "mappedHeights": mapped_heights(),
        "energy": energy(),
        "lasting": lasting(),
        "crossing": crossing(),
        "redNoise": red_noise(),
    })
