"""Welch spectra (scipy.signal.welch) averaged over the series of a region.

Welch 1967 [from memory]: Hann window (periodic), 50 % overlap, each segment detrended, one-sided density scaling so that
the integral over frequency is the variance. Checked here against a plain discrete Fourier sum.
"""
import numpy as np
import scipy
from scipy import signal

from reference_file import quantised, write_or_check

STEP_DAYS = 3.0
SEGMENTS = (300, 257, 128, 97, 64)


def region():
    """5 x 4 series of red noise with a shared oscillation, a trend and an offset each; 500 dates."""
    random = np.random.default_rng(1967)
    noise = signal.lfilter([0.05], [1, -0.85], random.normal(0, 1, (5, 4, 500)), axis=-1)
    dates = np.arange(500) * STEP_DAYS
    phase = random.uniform(0, 2 * np.pi, (5, 4, 1))
    shared = 0.08 * np.cos(2 * np.pi * dates / 160 + phase)
    drift = random.normal(0, 1e-4, (5, 4, 1)) * dates + random.normal(0, 0.5, (5, 4, 1))
    return quantised(noise + shared + drift)


def plain_welch(series, length, detrend):
    """One series, from the definition: a Fourier sum for each segment."""
    window = 0.5 - 0.5 * np.cos(2 * np.pi * np.arange(length) / length)
    index = np.arange(length)
    turns = np.exp(-2j * np.pi * np.outer(np.arange(length // 2 + 1), index) / length)
    spectra = []
    for start in range(0, len(series) - length + 1, length - length // 2):
        segment = series[start : start + length]
        degree = 1 if detrend == "linear" else 0
        centred = index - index.mean()
        segment = segment - np.polyval(np.polyfit(centred, segment, degree), centred)
        power = np.abs(turns @ (segment * window)) ** 2 * STEP_DAYS / np.sum(window**2)
        power[1 : (length + 1) // 2] *= 2
        spectra.append(power)
    return np.mean(spectra, axis=0), len(spectra)


def spectrum(data, length, detrend):
    options = dict(fs=1 / STEP_DAYS, window="hann", nperseg=length, detrend=detrend, scaling="density", axis=-1)
    frequency, density = signal.welch(data, **options)
    plain, segments = plain_welch(data[2, 3], length, detrend)
    assert np.allclose(plain, density[2, 3], rtol=1e-9, atol=1e-9 * density[2, 3].max())
    return dict(
        segmentLength=length,
        overlap=length // 2,
        segments=segments,
        detrend=detrend,
        frequencyPerDay=frequency,
        density=density.mean(axis=(0, 1)),
    )


def assert_parseval():
    """The integral of the density of a sine of amplitude 0.05 is 0.00125 to 1 %."""
    series = 0.05 * np.sin(2 * np.pi * np.arange(4000) / 20)
    frequency, density = signal.welch(series, fs=1.0, nperseg=400)
    assert abs(density.sum() * frequency[1] / 0.00125 - 1) < 0.01


if __name__ == "__main__":
    assert_parseval()
    heights = region()
    write_or_check(__file__, {
        "scipyVersion": scipy.__version__,
        "stepDays": STEP_DAYS,
        "shape": list(heights.shape),
        "heightMetres": heights.reshape(20, 500),
        "spectra": [spectrum(heights, length, detrend) for length in SEGMENTS for detrend in ("constant", "linear")],
    })
