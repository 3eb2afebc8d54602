"""Serial correlation, effective sample sizes, confidence limits, quantiles, multiple testing and robust slopes.

Sources: N_eff of a mean N(1-r)/(1+r) (Leith 1973, J. Appl. Meteor.); of a correlation N(1-r1 r2)/(1+r1 r2) (Bretherton
et al. 1999, J. Climate 12, 1990); block length (Wilks 1997, J. Climate [from memory]); false discovery rate (Benjamini &
Hochberg 1995); red noise (Gilman et al. 1963; Torrence & Compo 1998, BAMS, Eq. 16 [from memory]); Theil-Sen slope and
limits, t, chi-squared, normal and beta functions from scipy; NIST StRD NumAcc data sets and certified values [from
memory], confirmed here in exact fractions. Named so because "statistics" is a module of Python's own library.
"""
from fractions import Fraction

import numpy as np
import scipy
from scipy import optimize, special, stats

from reference_file import quantised, write_or_check

P_VALUES = [0.001, 0.008, 0.039, 0.041, 0.042, 0.06, 0.074, 0.205, 0.212, 0.216]


def autocorrelation(series, lag):
    """Lag products over the whole sum of squares (each divided by N: the biased estimator)."""
    anomaly = series - series.mean()
    return np.sum(anomaly[: len(series) - lag] * anomaly[lag:]) / np.sum(anomaly**2)


def autocorrelation_of_pairs(series, lag):
    """With gaps: mean product over the valid pairs, by the variance of the valid values, about their mean."""
    anomaly = series - np.nanmean(series)
    return np.nanmean(anomaly[: len(series) - lag] * anomaly[lag:]) / np.nanmean(anomaly**2)


def leith(n, r):
    return n * (1 - r) / (1 + r)


def bretherton(n, r_a, r_b):
    return n * (1 - r_a * r_b) / (1 + r_a * r_b)


def lag_product(n, correlations_a, correlations_b, triangular):
    """N over the two-sided sum of r_a(k) r_b(k), |k| <= K; optionally each weighted by 1 - |k|/N."""
    lags = np.arange(1, len(correlations_a) + 1)
    weight = 1 - lags / n if triangular else np.ones(len(lags))
    return n / (1 + 2 * np.sum(weight * correlations_a * correlations_b))


def red_noise_series(random, count, lag_one):
    noise = random.normal(0, 1, count)
    out = np.zeros(count)
    out[0] = noise[0] / np.sqrt(1 - lag_one**2)
    for i in range(1, count):
        out[i] = lag_one * out[i - 1] + noise[i]
    return quantised(0.1 * out)


def serial_correlation():
    random = np.random.default_rng(1973)
    rows = []
    for count, lag_one in ((120, 0.3), (300, 0.7), (400, 0.9), (97, -0.2)):
        a, b = red_noise_series(random, count, lag_one), red_noise_series(random, count, lag_one)
        b = quantised(0.5 * a + b)
        lags = count // 4
        r_a = np.array([autocorrelation(a, k) for k in range(1, lags + 1)])
        r_b = np.array([autocorrelation(b, k) for k in range(1, lags + 1)])
        effective = leith(count, r_a[0])
        deviation = a.std(ddof=1)
        half_width = stats.t.ppf(0.975, effective - 1) * deviation / np.sqrt(effective)
        correlation = stats.pearsonr(a, b)[0]
        pairs = bretherton(count, r_a[0], r_b[0])
        t_value = correlation * np.sqrt((pairs - 2) / (1 - correlation**2))
        gappy = a.copy()
        gappy[random.choice(count, count // 10, replace=False)] = np.nan
        rows.append(dict(
            a=a, b=b,
            mean=a.mean(),
            standardDeviation=deviation,
            lagOneA=r_a[0], lagOneB=r_b[0],
            effectiveNumberMean=effective,
            meanHalfWidth95=half_width,
            correlation=correlation,
            effectiveNumberCorrelation=pairs,
            correlationPValue=2 * stats.t.sf(abs(t_value), pairs - 2),
            lags=lags,
            autocorrelationA=r_a, autocorrelationB=r_b,
            effectiveNumberLagProduct=lag_product(count, r_a, r_b, False),
            effectiveNumberLagProductTriangular=lag_product(count, r_a, r_b, True),
            gappyA=gappy,
            gappyLagOneOfPairs=autocorrelation_of_pairs(gappy, 1),
        ))
    return rows


def block_length(n, r):
    """Root of L = (N - L + 1)^((2/3)(1 - n'/n)), n'/n = (1 - r)/(1 + r)."""
    power = 2 / 3 * (1 - (1 - r) / (1 + r))
    return optimize.brentq(lambda length: length - (n - length + 1) ** power, 1, n, xtol=1e-12, rtol=1e-14)


def benjamini_hochberg(p_values, alpha):
    p = np.sort(p_values)
    below = p <= alpha * np.arange(1, len(p) + 1) / len(p)
    return int(np.max(np.nonzero(below)[0]) + 1) if below.any() else 0


def false_discovery():
    random = np.random.default_rng(1995)
    mixed = np.round(np.concatenate([random.random(180), random.random(20) * 1e-3]), 6)
    return [
        dict(pValues=values, alpha=alpha, rejections=benjamini_hochberg(values, alpha))
        for values in (P_VALUES, mixed.tolist(), [0.2, 0.5, 0.9])
        for alpha in (0.01, 0.05, 0.1, 0.25)
    ]


def red_noise_spectrum(r, n):
    k = np.arange(n // 2 + 1)
    return (1 - r**2) / (1 + r**2 - 2 * r * np.cos(2 * np.pi * k / n))


def critical_correlation(n_effective, level=0.05):
    t = stats.t.ppf(1 - level / 2, n_effective - 2)
    return t / np.sqrt(n_effective - 2 + t**2)


def slopes():
    random = np.random.default_rng(1968)
    rows = []
    for count in (6, 11, 25, 60):
        time = np.cumsum(random.integers(1, 4, count)).astype(float)
        series = quantised(0.02 * time + random.standard_t(2, count) * 0.1)
        slope, intercept, low, high = stats.theilslopes(series, time, 0.95)
        tied = np.round(series, 1)
        tied_slope, tied_intercept, tied_low, tied_high = stats.theilslopes(tied, time, 0.95)
        rows.append(dict(time=time, input=series, slope=slope, intercept=intercept, low95=low, high95=high))
        rows.append(dict(time=time, input=tied, slope=tied_slope, intercept=tied_intercept,
                         low95=tied_low, high95=tied_high))
    return rows


def certified():
    """NIST StRD univariate sets NumAcc1 to NumAcc4: mean, standard deviation, lag-1 autocorrelation."""
    rows = []
    for name, first, low, high in (("NumAcc2", "1.2", "1.1", "1.3"), ("NumAcc3", "1000000.2", "1000000.1", "1000000.3"),
                                   ("NumAcc4", "10000000.2", "10000000.1", "10000000.3")):
        exact = [Fraction(first)] + [Fraction(low), Fraction(high)] * 500
        rows.append((name, exact, Fraction(first), Fraction("0.1"), Fraction("-0.999")))
    one = [Fraction(10000001), Fraction(10000003), Fraction(10000002)]
    rows.insert(0, ("NumAcc1", one, Fraction(10000002), Fraction(1), Fraction("-0.5")))
    out = []
    for name, exact, mean, deviation, lag_one in rows:
        assert sum(exact) / len(exact) == mean
        anomaly = [value - mean for value in exact]
        squares = sum(a * a for a in anomaly)
        assert squares / (len(exact) - 1) == deviation**2
        assert sum(a * b for a, b in zip(anomaly, anomaly[1:])) / squares == lag_one
        head = [float(value) for value in exact[:3]]
        out.append(dict(name=name, count=len(exact), firstThree=head, mean=float(mean),
                        standardDeviation=float(deviation), lagOne=float(lag_one)))
    return out


def quantiles():
    whole = list(range(1, 201))
    fractional = [1.2, 1.5, 2.3, 2.75, 3.14159, 4.5, 7.9, 12.34, 25.5, 51.63, 102.97, 999.5]
    levels = [0.9, 0.95, 0.975, 0.99, 0.995, 0.9995]
    chi_df = [1, 2, 3, 4, 5, 8, 12, 20, 38, 60, 100, 250, 2.5, 7.3, 31.4]
    probabilities = [1e-6, 0.001, 0.01, 0.025, 0.05, 0.1, 0.25, 0.5, 0.75, 0.9, 0.95, 0.975, 0.99, 0.999, 1 - 1e-6]
    beta_cases = [(a, b, x) for a in (0.5, 1, 2.5, 10, 60) for b in (0.5, 1, 3.7, 25) for x in (0.01, 0.2, 0.5, 0.8, 0.99)]
    gamma_cases = [(a, x) for a in (0.5, 1, 2.5, 10, 60) for x in (0.01, 0.5, 2, 10, 55, 90)]
    return dict(
        studentWhole=dict(degreesOfFreedom=whole,
                          quantile={str(p): stats.t.ppf(p, whole) for p in (0.95, 0.975, 0.995)}),
        studentFractional=dict(degreesOfFreedom=fractional,
                               quantile={str(p): stats.t.ppf(p, fractional) for p in levels}),
        studentTwoSidedP=[dict(t=t, degreesOfFreedom=df, p=2 * stats.t.sf(t, df))
                          for t in (0.1, 1.0, 2.0, 3.5, 8.0) for df in (1, 2.5, 10, 51.63, 400)],
        chiSquared=dict(degreesOfFreedom=chi_df,
                        quantile={str(p): stats.chi2.ppf(p, chi_df) for p in (0.025, 0.05, 0.5, 0.95, 0.975, 0.99)}),
        normal=dict(probability=probabilities, quantile=stats.norm.ppf(probabilities)),
        incompleteBeta=[[a, b, x, special.betainc(a, b, x)] for a, b, x in beta_cases],
        incompleteGamma=[[a, x, special.gammainc(a, x)] for a, x in gamma_cases],
        logGamma=[[x, special.gammaln(x)] for x in (0.1, 0.5, 1.5, 3.0, 7.25, 50.0, 500.5)],
    )


def assert_published():
    assert abs(-1 / np.log(0.9) - 9.491) < 6e-4
    assert abs(leith(1000, 0.9) - 52.63) < 6e-3 and abs(bretherton(1000, 0.9, 0.9) - 104.97) < 6e-3
    assert abs(critical_correlation(bretherton(1000, 0.9, 0.9)) - 0.1918) < 6e-5
    decay = 0.9 ** np.arange(1, 2000)
    assert abs(lag_product(1000, decay, decay, False) / bretherton(1000, 0.9, 0.9) - 1) < 1e-12
    assert abs(2 * (1 / 90 - 1 / 540) * 28 * 365.25 - 189) < 0.5
    assert abs(block_length(1000, 0.9) - 74.77) < 6e-3
    assert benjamini_hochberg(P_VALUES, 0.05) == 2
    spectrum = red_noise_spectrum(0.9, 1000)
    assert abs(spectrum[0] - 19) < 1e-9 and abs(spectrum[-1] - 0.052632) < 6e-7
    both_sides = np.concatenate([spectrum, spectrum[1:-1]])
    assert abs(both_sides.mean() - 1) < 1e-9
    assert abs(stats.chi2.ppf(0.95, 2) / 2 - 2.9957) < 6e-5 and abs(stats.chi2.ppf(0.99, 2) / 2 - 4.6052) < 6e-5


if __name__ == "__main__":
    assert_published()
    write_or_check(__file__, {
        "scipyVersion": scipy.__version__,
        "serialCorrelation": serial_correlation(),
        "criticalCorrelation": [
            dict(effectiveNumber=n, critical95=critical_correlation(n)) for n in (5.5, 20.0, bretherton(1000, 0.9, 0.9))
        ],
        "blockLengths": [dict(count=n, lagOne=r, length=block_length(n, r))
                         for n in (100, 400, 1000, 3000) for r in (0.1, 0.5, 0.7, 0.9, 0.97)],
        "falseDiscovery": false_discovery(),
        "redNoise": [dict(lagOne=r, count=n, power=red_noise_spectrum(r, n), ratio95=stats.chi2.ppf(0.95, 2) / 2,
                          ratio99=stats.chi2.ppf(0.99, 2) / 2) for r, n in ((0.9, 64), (0.72, 97), (0.0, 16))],
        "theilSen": slopes(),
        "quantiles": quantiles(),
        "certified": certified(),
    })
