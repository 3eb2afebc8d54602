"""Wavenumber and frequency-wavenumber spectra, and Welch spectra under several tapers.

Written from the definitions with numpy.fft; tapers from scipy.signal.get_window, the sine tapers from their formula (Riedel
& Sidorenko 1995 [from memory]), Welch spectra from scipy.signal.welch. One-sided along lines; two-sided for a plane, axes
centred by fftshift; one-sided in frequency for a matrix of time by position, whose waves are
cos 2 pi (wavenumber x - frequency t). Sums of density times steps are asserted to equal the variance of the tapered data.
"""
import numpy as np
import scipy
from scipy import signal

from reference_file import quantised, write_or_check

TAPERS = [
    dict(kind="boxcar"),
    dict(kind="hann"),
    dict(kind="hamming"),
    dict(kind="cosine", share=0.2),
    dict(kind="sine", count=3),
]


def tapers(taper, length):
    """Rows of weights, each of unit power."""
    if taper["kind"] == "sine":
        t = np.arange(1, length + 1)
        orders = np.arange(1, taper["count"] + 1)[:, None]
        rows = np.sqrt(2 / (length + 1)) * np.sin(np.pi * orders * t / (length + 1))
        assert np.allclose(rows @ rows.T, np.eye(taper["count"]), atol=1e-12)
        return rows
    name = ("tukey", taper["share"]) if taper["kind"] == "cosine" else taper["kind"]
    window = signal.get_window(name, length)
    return (window / np.sqrt(np.sum(window**2)))[None, :]


def straight(values):
    return signal.detrend(values, type="linear")


def flat(plane):
    """Minus the least-squares plane."""
    rows, columns = np.indices(plane.shape)
    matrix = np.stack([np.ones(plane.size), rows.ravel(), columns.ravel()], axis=1)
    return plane - (matrix @ np.linalg.lstsq(matrix, plane.ravel(), rcond=None)[0]).reshape(plane.shape)


def line_density(values, taper, step):
    pieces = straight(values) * tapers(taper, len(values))
    power = np.abs(np.fft.rfft(pieces, axis=1)) ** 2 * 2 * step
    power[:, 0] /= 2
    if len(values) % 2 == 0:
        power[:, -1] /= 2
    density = power.mean(axis=0)
    assert np.isclose(np.sum(density) / (len(values) * step), np.mean(np.sum(pieces**2, axis=1)), rtol=1e-12)
    return density


def lines(plane, taper, step, weights):
    densities = np.array([line_density(row, taper, step) for row in plane])
    return np.average(densities, axis=0, weights=weights)


def two_sided(plane, taper, row_step, column_step):
    total = np.zeros(plane.shape)
    variance = 0.0
    families = tapers(taper, plane.shape[0]), tapers(taper, plane.shape[1])
    for first in families[0]:
        for second in families[1]:
            tapered = flat(plane) * np.outer(first, second)
            total += np.abs(np.fft.fft2(tapered)) ** 2 * row_step * column_step
            variance += np.sum(tapered**2)
    count = len(families[0]) * len(families[1])
    total, variance = total / count, variance / count
    assert np.isclose(np.sum(total) / (plane.size * row_step * column_step), variance, rtol=1e-12)
    return total


def frequency_wavenumber(matrix, taper, row_step, column_step):
    """By adding up every transform bin where its wave belongs, one bin at a time."""
    density = two_sided(matrix, taper, row_step, column_step)
    times, places = matrix.shape
    frequencies = np.rint(np.fft.fftfreq(times) * times).astype(int)
    numbers = np.rint(np.fft.fftfreq(places) * places).astype(int)
    out = np.zeros((times // 2 + 1, places))
    for f, frequency in enumerate(frequencies):
        for k, number in enumerate(numbers):
            # The bin is exp(i (number x + frequency t)); written with a frequency >= 0 the wave is k x - f t.
            along = number if frequency <= 0 else -number
            if frequency == 0 or abs(frequency) * 2 == times:
                out[abs(frequency), (number + places // 2) % places] += (
                    density[f, k] + density[f, (-k) % places]) / 2
            else:
                out[abs(frequency), (along + places // 2) % places] += density[f, k]
    assert np.isclose(out.sum(), density.sum(), rtol=1e-12)
    return out


def planes():
    random = np.random.default_rng(1882)
    cases = []
    for rows, columns in ((12, 15), (9, 16)):
        y, x = np.indices((rows, columns))
        plane = quantised(
            0.2 * np.cos(2 * np.pi * (2 * x / columns + 3 * y / rows)) + 0.01 * x - 0.02 * y
            + random.normal(0, 0.05, (rows, columns)))
        weights = np.round(np.cos(np.linspace(0.3, 0.9, rows)), 6)
        column_step, row_step = 23500.0, 27800.0
        spectra = []
        for taper in TAPERS:
            plane_density = two_sided(plane, taper, row_step, column_step)
            spectra.append(dict(
                taper=taper,
                zonal=lines(plane, taper, column_step, weights),
                meridional=lines(plane.T, taper, row_step, None),
                plane=np.fft.fftshift(plane_density),
                frequencyWavenumber=frequency_wavenumber(plane, taper, 5.0, column_step),
            ))
        cases.append(dict(
            rows=rows, columns=columns, plane=plane, rowWeights=weights, columnStep=column_step, rowStep=row_step,
            timeStep=5.0,
            zonalWavenumber=np.fft.rfftfreq(columns, column_step),
            meridionalWavenumber=np.fft.rfftfreq(rows, row_step),
            centredZonal=np.fft.fftshift(np.fft.fftfreq(columns, column_step)),
            centredMeridional=np.fft.fftshift(np.fft.fftfreq(rows, row_step)),
            frequency=np.fft.rfftfreq(rows, 5.0),
            spectra=spectra,
        ))
    return cases


def gappy_lines():
    """Rows with gaps: up to two cells bridged, then the longest whole stretch, left out below 60 % of the row."""
    random = np.random.default_rng(1883)
    rows, columns, step = 6, 20, 25000.0
    plane = quantised(np.cumsum(random.normal(0, 0.1, (rows, columns)), axis=1))
    plane[0, 5:7] = np.nan
    plane[1, 5:9] = np.nan
    plane[2, :] = np.nan
    plane[3, 8:11] = np.nan
    bridged = plane[0].copy()
    bridged[5:7] = np.interp([5, 6], [4, 7], plane[0, [4, 7]])
    kept = np.array([bridged, plane[4], plane[5]])
    return dict(rows=rows, columns=columns, plane=plane, columnStep=step, bridgedCells=2, leastShare=0.6, linesKept=3,
                density=lines(kept, dict(kind="hann"), step, None))


def welch_spectra():
    random = np.random.default_rng(1884)
    series = quantised(np.cumsum(random.normal(0, 0.05, 200)))
    cases = []
    for taper in TAPERS[:4]:
        for segment in (64, 75):
            name = ("tukey", taper["share"]) if taper["kind"] == "cosine" else taper["kind"]
            frequency, density = signal.welch(
                series, fs=1 / 3.0, window=name, nperseg=segment, noverlap=segment // 2, detrend="linear")
            cases.append(dict(taper=taper, segment=segment, frequency=frequency, density=density))
    return dict(step=3.0, series=series, spectra=cases)


if __name__ == "__main__":
    write_or_check(__file__, {
        "scipyVersion": scipy.__version__,
        "planes": planes(),
        "gappy": gappy_lines(),
        "welch": welch_spectra(),
    })
