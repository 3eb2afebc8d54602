"""Butterworth sections, zero-phase filtering (narrow bands too), running means, least-squares slopes, detrending,
periodograms, loess along a line and over a plane.

Sources: scipy.signal (butter, sosfiltfilt, savgol_coeffs, savgol_filter, detrend, periodogram, lombscargle); running-mean
response is textbook; local quadratic regression with tricube weights (Cleveland & Devlin 1988 [from memory]) by a direct
weighted solve at each point.
"""
import numpy as np
import scipy
from scipy import optimize, signal

from reference_file import quantised, write_or_check

STEP_DAYS = 3.0
LENGTH = 300
CUTS_DAYS = {"lowpass": [90.0], "highpass": [540.0], "bandpass": [540.0, 90.0]}


def series_with_trend():
    random = np.random.default_rng(1930)
    walk = np.cumsum(random.normal(0, 0.02, LENGTH))
    return quantised(0.3 + walk + 4e-4 * np.arange(LENGTH) + 0.04 * np.cos(2 * np.pi * 3 * np.arange(LENGTH) / 150))


def butterworth(series):
    cases = []
    for kind, cuts in CUTS_DAYS.items():
        edges = [2 * STEP_DAYS / cut for cut in cuts]
        for order in (2, 3, 4):
            sections = signal.butter(order, edges if len(edges) > 1 else edges[0], kind, output="sos")
            # scipy's default padding: three times the number of taps, less the zeros at the origin of either kind.
            at_origin = min((sections[:, 2] == 0).sum(), (sections[:, 5] == 0).sum())
            pad = 3 * (2 * len(sections) + 1 - at_origin)
            output = signal.sosfiltfilt(sections, series)
            assert np.array_equal(output, signal.sosfiltfilt(sections, series, padtype="odd", padlen=pad))
            _, at_cut = signal.sosfreqz(sections, worN=[np.pi * edge for edge in edges])
            assert np.allclose(np.abs(at_cut) ** 2, 0.5, atol=1e-6)
            cases.append(dict(kind=kind, order=order, cutDays=cuts, edgesOfNyquist=edges, sections=sections,
                              padLength=int(pad), initialStates=signal.sosfilt_zi(sections), output=output))
    return cases


def narrow_band():
    """0.001 to 0.002 cycles a sample; the input is stored as its formula, every 40th output and both ends are kept."""
    t = np.arange(4000)
    noise = ((t * 7919) % 1009) / 1009 - 0.5
    series = 0.5 + t / 16384 + 0.1 * np.cos(2 * np.pi * t / 700 + 0.3) + 0.05 * np.sin(2 * np.pi * t / 90) + 0.1 * noise
    shown = np.unique(np.concatenate([np.arange(0, 4000, 40), np.arange(20), 3980 + np.arange(20)]))
    cases = []
    for order in (1, 2, 3, 4, 5):
        sections = signal.butter(order, [0.002, 0.004], "bandpass", output="sos")
        output = signal.sosfiltfilt(sections, series)
        assert np.isfinite(output).all()
        cases.append(dict(order=order, output=output[shown]))
    return dict(formula="0.5 + t/16384 + 0.1 cos(2 pi t/700 + 0.3) + 0.05 sin(2 pi t/90) + 0.1 (((7919 t) mod 1009)/1009 - 0.5)",
                length=4000, cutSamples=[1000.0, 500.0], shown=shown, cases=cases)


def wide_and_odd(series):
    """Odd orders, cut-offs near Nyquist's, and a band so wide that a band-pass pole pair is real."""
    cases = []
    for kind, order, cuts in (("lowpass", 1, [5.0]), ("lowpass", 5, [2.5]), ("highpass", 1, [30.0]), ("highpass", 5, [2.5]),
                              ("bandpass", 1, [60.0, 2.2]), ("bandpass", 3, [40.0, 2.5]), ("bandpass", 5, [30.0, 8.0])):
        edges = [2 / cut for cut in cuts]
        sections = signal.butter(order, edges if len(edges) > 1 else edges[0], kind, output="sos")
        frequency = np.linspace(0.01, 0.49, 13)
        _, response = signal.sosfreqz(sections, worN=2 * np.pi * frequency)
        cases.append(dict(kind=kind, order=order, cutSamples=cuts, frequency=frequency, power=np.abs(response) ** 2,
                          output=signal.sosfiltfilt(sections, series)[::7]))
    return cases


def centred_even_mean():
    """18 weeks centred on a weekly sample: 19 weights with halves at both ends."""
    weights = np.ones(19) / 18
    weights[[0, -1]] /= 2
    offsets = np.arange(-9, 10)

    def gain(f):
        return np.sum(weights * np.cos(2 * np.pi * f * offsets))

    frequency = np.linspace(0.002, 0.5, 25)
    return dict(points=18, weights=weights, frequency=frequency, response=[gain(f) for f in frequency],
                halfAmplitudeDays=7 / optimize.brentq(lambda f: gain(f) - 0.5, 1e-4, 1 / 18),
                halfPowerDays=7 / optimize.brentq(lambda f: gain(f) ** 2 - 0.5, 1e-4, 1 / 18))


def running_mean():
    cases = []
    for points in (3, 7, 18, 41):
        frequency = np.linspace(0.002, 0.5, 25)
        response = np.sin(np.pi * frequency * points) / (points * np.sin(np.pi * frequency))
        offsets = np.arange(points) - (points - 1) / 2
        direct = np.array([np.mean(np.cos(2 * np.pi * f * offsets)) for f in frequency])
        assert np.allclose(response, direct, atol=1e-12)
        cases.append(dict(points=points, frequency=frequency, response=response))

    def gain(f):
        return np.sin(np.pi * f * 18) / (18 * np.sin(np.pi * f))

    half_amplitude = 7 / optimize.brentq(lambda f: gain(f) - 0.5, 1e-4, 1 / 18)
    half_power = 7 / optimize.brentq(lambda f: gain(f) ** 2 - 0.5, 1e-4, 1 / 18)
    lobe = np.min(gain(np.linspace(1 / 18, 2 / 18, 20001)))
    assert abs(half_amplitude - 208.6) < 0.06 and abs(half_power - 284.1) < 0.06 and abs(lobe + 0.2195) < 5e-5
    return cases


def least_squares_slopes(series):
    cases = []
    gains = {3: 0.1890, 5: 0.0953, 8: 0.0495, 10: 0.0360}
    half_km = {3: 53, 5: 85, 8: 132, 10: 163}
    for p in (1, 2, 3, 5, 8, 10):
        weights = signal.savgol_coeffs(2 * p + 1, 2, deriv=1)[::-1]
        n = np.arange(-p, p + 1)
        assert np.allclose(weights, 3 * n / (p * (p + 1) * (2 * p + 1)), atol=1e-14)
        gain = np.sqrt(np.sum(weights**2))
        if p in gains:
            assert abs(gain - gains[p]) < 6e-5

            def response(theta):
                return np.sum(weights * np.sin(n * theta)) / theta - 0.5

            assert abs(6.2 * 2 * np.pi / optimize.brentq(response, 1e-3, 3.0 / p) - half_km[p]) < 0.6
        slope = signal.savgol_filter(series, 2 * p + 1, 2, deriv=1, mode="interp")
        cases.append(dict(halfWidth=p, weights=weights, noiseGain=gain, slopePerSample=slope[p : LENGTH - p]))
    return cases


def spectra(series):
    cases = []
    for count in (300, 256, 97):
        for window in ("boxcar", "hann"):
            for detrend in ("constant", "linear"):
                frequency, density = signal.periodogram(series[:count], fs=1 / STEP_DAYS, window=window, detrend=detrend)
                cases.append(dict(count=count, window=window, detrend=detrend, frequencyPerDay=frequency, density=density))
    return cases


def lomb_scargle():
    random = np.random.default_rng(1982)
    cases = []
    for count in (40, 75):
        time = np.round(np.sort(random.uniform(0, 900, count)), 3)
        values = quantised(0.1 * np.sin(2 * np.pi * time / 140) + random.normal(0, 0.03, count))
        values = values - values.mean()
        frequency = np.linspace(1 / 600, 1 / 30, 40)
        power = signal.lombscargle(time, values, 2 * np.pi * frequency)
        shares = signal.lombscargle(time, values, 2 * np.pi * frequency, normalize=True)
        # At each frequency the normalised power is the share of variance that a least-squares sinusoid explains.
        for f, share in zip(frequency, shares):
            matrix = np.stack([np.cos(2 * np.pi * f * time), np.sin(2 * np.pi * f * time)], axis=1)
            left = values - matrix @ np.linalg.lstsq(matrix, values, rcond=None)[0]
            assert abs(1 - np.sum(left**2) / np.sum(values**2) - share) < 1e-10
        cases.append(dict(timeDays=time, input=values, frequencyPerDay=frequency, power=power, normalised=shares))
    return cases


def loess(position, values, half_span):
    """Local quadratic with tricube weights (1 - |d/h|^3)^3 inside the half-span; NaN where fewer than 3 points weigh."""
    out = np.full(len(position), np.nan)
    valid = np.isfinite(values)
    for i, centre in enumerate(position):
        d = (position - centre) / half_span
        near = valid & (np.abs(d) < 1)
        if near.sum() < 3:
            continue
        root = (1 - np.abs(d[near]) ** 3) ** 1.5
        matrix = np.stack([np.ones(near.sum()), d[near], d[near] ** 2], axis=1)
        out[i] = np.linalg.lstsq(matrix * root[:, None], values[near] * root, rcond=None)[0][0]
    return out


def loess_cases(series):
    fine = np.arange(-1000, 1001) / 200
    wave = np.cos(2 * np.pi * fine / 1.16)
    assert abs(loess(fine, wave, 1.0)[1000] - 0.5) < 0.01
    random = np.random.default_rng(1988)
    gappy = series[:120].copy()
    gappy[random.choice(120, 10, replace=False)] = np.nan
    gappy[50:62] = np.nan
    uneven = np.round(np.cumsum(random.uniform(4.5, 7.5, 90)), 3)
    along = quantised(0.1 * np.sin(uneven / 25) + random.normal(0, 0.02, 90))
    index = np.arange(120.0)
    return [
        dict(name="even, no gaps", position=index, input=series[:120], halfSpan=9.5, output=loess(index, series[:120], 9.5)),
        dict(name="gaps and a run of 12", position=index, input=gappy, halfSpan=7.5, output=loess(index, gappy, 7.5)),
        dict(name="uneven along a track, kilometres", position=uneven, input=along, halfSpan=40.0,
             output=loess(uneven, along, 40.0)),
    ]


def loess_surface():
    """Local quadratic surface, tricube in sqrt((x/hx)^2 + (y/hy)^2); x along each source row's own parallel."""
    random = np.random.default_rng(2015)
    rows, columns, step_north, span_east, span_north = 12, 18, 27.8, 160.0, 110.0
    spacing = 27.8 * np.cos(np.radians(20 + 0.25 * np.arange(rows)))
    plane = quantised(random.normal(0, 0.05, (rows, columns)) + 0.01 * np.arange(columns) + 0.02 * np.arange(rows)[:, None])
    plane[2:5, 10:13] = np.nan
    plane[random.integers(0, rows, 14), random.integers(0, columns, 14)] = np.nan
    cases = []
    for periodic in (False, True):
        out = np.full((rows, columns), np.nan)
        for row in range(rows):
            for column in range(columns):
                offset = np.arange(columns) - column
                if periodic:
                    offset = (offset + columns // 2) % columns - columns // 2
                x = offset[None, :] * spacing[:, None] / span_east
                y = ((np.arange(rows) - row) * step_north / span_north)[:, None] + 0 * x
                distance = np.hypot(x, y)
                near = (distance < 1) & np.isfinite(plane)
                root = (1 - distance[near] ** 3) ** 1.5
                x, y = x[near], y[near]
                matrix = np.stack([np.ones_like(x), x, y, x * x, x * y, y * y], axis=1)
                out[row, column] = np.linalg.lstsq(matrix * root[:, None], plane[near] * root, rcond=None)[0][0]
        cases.append(dict(periodic=periodic, output=out.ravel()))

    def gain(wavelength):
        """What is left of a wave along one axis, wavelength in half-spans, on a fine disk without gaps."""
        edge = np.linspace(-1, 1, 161)
        x, y = (axis.ravel() for axis in np.meshgrid(edge, edge))
        distance = np.minimum(np.hypot(x, y), 1)
        weight = (1 - distance**3) ** 3
        matrix = np.stack([np.ones_like(x), x, y, x * x, x * y, y * y], axis=1)
        kernel = np.linalg.solve((matrix * weight[:, None]).T @ matrix, (matrix * weight[:, None]).T)[0]
        return np.sum(kernel * np.cos(2 * np.pi * x / wavelength))

    halves = [optimize.brentq(lambda q: gain(q) - level, 0.8, 4) for level in (0.5, np.sqrt(0.5))]
    return dict(rows=rows, columns=columns, northStepKilometres=step_north, eastSpacingKilometres=spacing,
                eastSpanKilometres=span_east, northSpanKilometres=span_north, input=plane.ravel(), cases=cases,
                halfAmplitudeInSpans=halves[0], halfPowerInSpans=halves[1])


def corrected_cuts():
    """Edge factor in the prewarped domain that puts -3 dB of the forward-and-back filter at the named period."""
    rows = []
    for order, expected in ((2, 1.2465), (4, 1.1165)):
        factor = (np.sqrt(2) - 1) ** (-1 / (2 * order))
        assert abs(factor - expected) < 6e-5
        edge = 2 * STEP_DAYS / 90
        moved = 2 / np.pi * np.arctan(factor * np.tan(np.pi * edge / 2))
        sections = signal.butter(order, moved, output="sos")
        _, at_cut = signal.sosfreqz(sections, worN=[np.pi * edge])
        assert abs(np.abs(at_cut[0]) ** 4 - 0.5) < 1e-9
        rows.append(dict(order=order, factor=factor, edgeOfNyquist=edge, movedEdgeOfNyquist=moved))
    return rows


if __name__ == "__main__":
    data = series_with_trend()
    write_or_check(__file__, {
        "scipyVersion": scipy.__version__,
        "stepDays": STEP_DAYS,
        "input": data,
        "butterworth": butterworth(data),
        "wideAndOdd": wide_and_odd(data),
        "narrowBand": narrow_band(),
        "halfPowerCuts": corrected_cuts(),
        "runningMean": running_mean(),
        "centredEvenMean": centred_even_mean(),
        "leastSquaresSlopes": least_squares_slopes(data),
        "detrended": {kind: signal.detrend(data, type=kind) for kind in ("constant", "linear")},
        "periodograms": spectra(data),
        "lombScargle": lomb_scargle(),
        "loess": loess_cases(data),
        "loessSurface": loess_surface(),
    })
