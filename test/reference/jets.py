"""Peaks with prominences and widths, least-cost assignments, shares of variance between lines, drift slopes.

Sources: scipy.signal.find_peaks, peak_prominences, peak_widths (half prominence); scipy.optimize.linear_sum_assignment;
scipy.stats.theilslopes; lines by direct sums over every pair of point and line, from the definition in words: points
shared linearly between the two nearest lines, lines spaced by a cell's extent across them, means weighted by the weight on
the line, the share of independent values taken off.
"""
import numpy as np
import scipy
from scipy import optimize, signal, stats

from reference_file import quantised, write_or_check


def peaks():
    random = np.random.default_rng(2020)
    rows = []
    for count, smooth in ((40, 1), (120, 5), (200, 11)):
        noise = random.normal(0, 0.1, count + smooth)
        values = quantised(np.convolve(noise, np.ones(smooth) / np.sqrt(smooth), "valid")[:count])
        rows.append(values)
    rows.append(np.array([0, 1, 1, 0, 2, 2, 2, 1, 3, 0.5, 0.5, 3, 3, 3, 3, 1, 0, 4], dtype=float))
    out = []
    for values in rows:
        index, _ = signal.find_peaks(values)
        prominence, _, _ = signal.peak_prominences(values, index)
        _, _, left, right = signal.peak_widths(values, index, rel_height=0.5)
        out.append(dict(values=values, index=index, prominence=prominence, left=left, right=right))
    return out


def assignments():
    random = np.random.default_rng(1987)
    out = []
    for rows, columns in ((1, 1), (3, 3), (4, 7), (12, 12), (30, 45), (60, 60)):
        for whole in (False, True):
            costs = quantised(random.random((rows, columns)) * 3)
            if whole:
                costs = np.floor(costs * 2)
            row, column = optimize.linear_sum_assignment(costs)
            out.append(dict(rows=rows, columns=columns, costs=costs.ravel(), total=costs[row, column].sum()))
    return out


def share_between_lines(position, time, value, position_step, time_step, angle):
    spacing = position_step * abs(np.cos(angle)) + time_step * abs(np.sin(angle))
    across = (position * np.cos(angle) - time * np.sin(angle)) / spacing
    across = across - across.min()
    between = chance = 0.0
    for line in range(int(np.ceil(across.max())) + 2):
        weight = np.clip(1 - np.abs(across - line), 0, None)
        if weight.sum() > 0:
            mean = (weight * value).sum() / weight.sum()
            between += weight.sum() * mean**2
            chance += (weight**2).sum() / weight.sum()
    share = between / (value**2).sum()
    chance /= len(value)
    return (share - chance) / (1 - chance)


def lines():
    random = np.random.default_rng(1917)
    out = []
    for missing in (0.0, 0.2):
        position, time = np.meshgrid(np.arange(14) * 0.25, np.arange(23) * 0.125, indexing="ij")
        value = np.cos(2 * (position - 0.75 * time)) + 0.3 * random.normal(size=position.shape)
        keep = random.random(position.shape) >= missing
        position, time, value = position[keep], time[keep], quantised(value[keep])
        value = quantised(value - value.mean())
        angles = np.radians(np.array([-83.0, -45, -10, 0, 20, 36.87, 45, 60, 89]))
        share = [share_between_lines(position, time, value, 0.25, 0.125, angle) for angle in angles]
        out.append(dict(position=position, time=time, value=value, positionStep=0.25, timeStep=0.125,
                        angles=angles, share=share))
    return out


def drifts():
    random = np.random.default_rng(1950)
    out = []
    for count, slope in ((40, 0.6), (200, -0.25)):
        index = np.arange(count)
        latitude = quantised(28 + slope * index * 7 / 365.25 + random.normal(0, 0.05, count))
        value, _, _, _ = stats.theilslopes(latitude, index * 7 / 365.25, 0.95)
        out.append(dict(latitude=latitude, stepDays=7, yearDays=365.25, slope=value))
    return out


if __name__ == "__main__":
    write_or_check(__file__, {
        "scipyVersion": scipy.__version__,
        "peaks": peaks(),
        "assignments": assignments(),
        "lines": lines(),
        "drifts": drifts(),
    })
