"""Lanczos low-pass and band-pass weights, responses and gap-aware application to series.

Weights (Duchon 1979, J. Appl. Meteor. 18, 1016-1022): w_k = 2 fc sinc(2 fc k) sinc(k/n), |k| <= n, numpy's sinc, fc in
cycles a sample, divided by their sum. Band = low-pass at the shorter period's frequency minus low-pass at the longer's.
With gaps each low-pass is sum(w_k x_k m_k) / sum(w_k m_k), m = 0 outside the series and where it is NaN, and the band
is the difference; the support of a point is the smaller of the two sums of w_k m_k.
"""
import numpy as np

from reference_file import quantised, write_or_check

STEP_DAYS = 3.0
BAND_DAYS = (90.0, 540.0)
HALF_WIDTH = 120
LENGTH = 400


def raw_low_pass(cutoff, half_width):
    k = np.arange(-half_width, half_width + 1)
    return 2 * cutoff * np.sinc(2 * cutoff * k) * np.sinc(k / half_width)


def low_pass(cutoff, half_width):
    weights = raw_low_pass(cutoff, half_width)
    return weights / weights.sum()


def response(weights, frequency):
    k = np.arange(len(weights)) - len(weights) // 2
    return float(np.sum(weights * np.cos(2 * np.pi * frequency * k)))


def gap_aware(series, weights):
    """Low-passed series and the sum of weights that met data, point by point from the definition."""
    n = len(weights) // 2
    out, support = np.full(len(series), np.nan), np.zeros(len(series))
    for i in range(len(series)):
        inside = np.arange(max(0, i - n), min(len(series), i + n + 1))
        valid = inside[np.isfinite(series[inside])]
        met = weights[valid - i + n]
        support[i] = met.sum()
        out[i] = np.sum(met * series[valid]) / support[i]
    return out, support


def by_convolution(series, weights):
    mask = np.isfinite(series)
    total = np.convolve(np.where(mask, series, 0), weights)
    support = np.convolve(mask.astype(float), weights)
    keep = slice(len(weights) // 2, len(weights) // 2 + len(series))
    return total[keep] / support[keep]


def filtered(name, series):
    high, low = low_pass(STEP_DAYS / BAND_DAYS[0], HALF_WIDTH), low_pass(STEP_DAYS / BAND_DAYS[1], HALF_WIDTH)
    wide, wide_support = gap_aware(series, high)
    narrow, narrow_support = gap_aware(series, low)
    for output, weights in ((wide, high), (narrow, low)):
        assert np.allclose(by_convolution(series, weights), output, rtol=0, atol=1e-11)
    if np.isfinite(series).all():
        interior = slice(HALF_WIDTH, LENGTH - HALF_WIDTH)
        band = np.convolve(series, high - low, mode="valid")
        assert np.allclose(band, (wide - narrow)[interior], rtol=0, atol=1e-12)
    return dict(
        name=name,
        input=series,
        lowPassShort=wide,
        lowPassLong=narrow,
        band=wide - narrow,
        support=np.minimum(wide_support, narrow_support),
    )


def all_series():
    random = np.random.default_rng(1979)
    walk = quantised(np.cumsum(random.normal(0, 0.02, LENGTH)) + 0.05 * np.sin(2 * np.pi * np.arange(LENGTH) * 3 / 200))
    gappy = walk.copy()
    gappy[random.choice(LENGTH, 12, replace=False)] = np.nan
    gappy[150:165] = np.nan
    ends = walk.copy()
    ends[:7] = np.nan
    ends[-20:] = np.nan
    return {"no gaps": walk, "isolated gaps and a run of 15": gappy, "gaps at both ends": ends}


def assert_published():
    raw = raw_low_pass(1 / 18, 24)
    assert abs(raw.sum() - 0.990786) < 1e-6 and abs(raw[24] - 0.111111) < 1e-6 and abs(raw[25] - 0.108558) < 1e-6
    normalised = raw / raw.sum()
    for period, expected in ((18, 0.5055), (12, -0.0018), (30, 0.9734)):
        assert abs(response(normalised, 1 / period) - expected) < 1e-4
    band = low_pass(1 / 90, 700) - low_pass(1 / 540, 700)
    for period, expected in ((90, 0.4999), (180, 1.0009), (360, 0.9986), (540, 0.4945), (60, -0.0005)):
        assert abs(response(band, 1 / period) - expected) < 1e-4


def weight_case(step_days, band_days, half_width, periods):
    short, long = low_pass(step_days / band_days[0], half_width), low_pass(step_days / band_days[1], half_width)
    return dict(
        stepDays=step_days,
        bandDays=list(band_days),
        halfWidth=half_width,
        lowPassShort=short[half_width:],
        lowPassLong=long[half_width:],
        band=(short - long)[half_width:],
        periodsDays=periods,
        responseLowPassShort=[response(short, step_days / period) for period in periods],
        responseLowPassLong=[response(long, step_days / period) for period in periods],
        responseBand=[response(short - long, step_days / period) for period in periods],
    )


if __name__ == "__main__":
    assert_published()
    shown_periods = [20.0, 45.0, 60.0, 75.0, 90.0, 120.0, 180.0, 240.0, 360.0, 450.0, 540.0, 720.0, 1080.0, 3000.0]
    single = low_pass(1 / 18, 24)
    write_or_check(__file__, {
        "note": "weights are given for k = 0 to the half-width; they are symmetric",
        "single": dict(
            cutoffCyclesPerSample=1 / 18,
            halfWidth=24,
            rawSum=raw_low_pass(1 / 18, 24).sum(),
            weights=single[24:],
            periodsSamples=[12.0, 18.0, 30.0, 36.0],
            response=[response(single, 1 / period) for period in (12, 18, 30, 36)],
        ),
        "bands": [
            weight_case(3.0, (90.0, 540.0), 120, shown_periods),
            weight_case(1.0, (90.0, 540.0), 700, shown_periods),
            weight_case(7.0, (126.0, 700.0), 65, shown_periods),
        ],
        "series": [filtered(name, series) for name, series in all_series().items()],
    })
