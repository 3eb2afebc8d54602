"""Least squares of mean, linear trend, annual and semi-annual harmonics to series with gaps (numpy.linalg.lstsq).

Year of 365.2425 days (mean Gregorian year). Harmonic phases count from 1970-01-01; trend and intercept are about the
reference time, the middle of the time axis. Residuals and amplitudes do not depend on either choice.
"""
import numpy as np

from reference_file import quantised, write_or_check

YEAR_DAYS = 365.2425


def design(time, reference_time, with_trend=True, harmonics=2):
    """Columns: one, time from the reference in half-records, cosine and sine of each harmonic."""
    half_record = (time[-1] - time[0]) / 2
    columns = [np.ones_like(time)]
    if with_trend:
        columns.append((time - reference_time) / half_record)
    for harmonic in range(1, harmonics + 1):
        angle = 2 * np.pi * harmonic * time / YEAR_DAYS
        columns += [np.cos(angle), np.sin(angle)]
    return np.stack(columns, axis=1), half_record


def fitted(name, time, series, with_trend=True, harmonics=2):
    reference_time = (time[0] + time[-1]) / 2
    matrix, half_record = design(time, reference_time, with_trend, harmonics)
    valid = np.isfinite(series)
    solution, _, rank, _ = np.linalg.lstsq(matrix[valid], series[valid], rcond=None)
    assert rank == matrix.shape[1]
    residual = series - matrix @ solution
    assert np.max(np.abs(matrix[valid].T @ residual[valid])) < 1e-10
    trend = solution[1] / half_record if with_trend else 0.0
    pairs = solution[2 if with_trend else 1 :].reshape(-1, 2)
    return dict(
        name=name,
        timeDays=time,
        input=series,
        withTrend=with_trend,
        harmonics=harmonics,
        referenceTimeDays=reference_time,
        valueAtReferenceTime=solution[0],
        trendPerDay=trend,
        cosine=pairs[:, 0],
        sine=pairs[:, 1],
        amplitude=np.hypot(pairs[:, 0], pairs[:, 1]),
        residual=residual,
    )


def synthetic(random, time, gap_fraction):
    angle = 2 * np.pi * time / YEAR_DAYS
    series = random.normal(0.4, 0.2) + random.normal(0, 1e-5) * (time - time[0])
    for harmonic in (1, 2):
        series = series + random.normal(0, 0.06 / harmonic) * np.cos(harmonic * angle + random.uniform(0, 6.28))
    series = quantised(series + np.cumsum(random.normal(0, 0.006, len(time))))
    series[random.random(len(time)) < gap_fraction] = np.nan
    return series


def assert_recovers_truth():
    time = 8400 + 3.0 * np.arange(500)
    truth = 0.3 + 2e-5 * (time - time.mean()) + 0.05 * np.cos(2 * np.pi * time / YEAR_DAYS) \
        - 0.02 * np.sin(4 * np.pi * time / YEAR_DAYS)
    truth[::7] = np.nan
    fit = fitted("truth", time, truth)
    assert abs(fit["trendPerDay"] / 2e-5 - 1) < 1e-9 and abs(fit["valueAtReferenceTime"] - 0.3) < 1e-12
    assert np.allclose(fit["amplitude"], [0.05, 0.02], rtol=0, atol=1e-12)


if __name__ == "__main__":
    assert_recovers_truth()
    random_source = np.random.default_rng(3652425)
    three_days = 8401 + 3.0 * np.arange(420)
    write_or_check(__file__, {
        "yearDays": YEAR_DAYS,
        "fits": [
            fitted("no gaps, every three days", three_days, synthetic(random_source, three_days, 0)),
            fitted("one gap in ten", three_days, synthetic(random_source, three_days, 0.1)),
            fitted("half missing", three_days, synthetic(random_source, three_days, 0.5)),
            fitted("winters missing", three_days, np.where(
                np.mod(three_days, YEAR_DAYS) < 100, np.nan, synthetic(random_source, three_days, 0.02))),
            fitted("weekly, two and a half years", 15706 + 7.0 * np.arange(130),
                   synthetic(random_source, 15706 + 7.0 * np.arange(130), 0.05)),
            fitted("no trend, annual only", three_days, synthetic(random_source, three_days, 0.1), False, 1),
        ],
    })
