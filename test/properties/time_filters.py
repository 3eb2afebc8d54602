"""Band-passed heights of a made file by numpy and scipy, compared with a result's height_band.

Usage: time_filters.py HEIGHTS.nc FIELDS.nc SETTINGS-JSON; prints the largest difference over the band's rms and the number of
values on one side only. Background: mean and trend by numpy.linalg.lstsq over the dates there are. Butterworth: scipy's
sections forward and back with scipy's own default padding, missing dates bridged by straight lines; the half-power cut moves
the analogue cut-off so that two passes give -3 dB. Lanczos: Duchon 1979, renormalised over missing dates. Running means: pairs of
dates opposite each other, even counts with half a weight at each end.
"""

import json
import sys
from pathlib import Path

import netCDF4
import numpy as np
from scipy import signal

sys.path.insert(0, str(Path(__file__).resolve().parent.parent / "reference"))
from lanczos import low_pass

LEAST_WEIGHT = 0.25


def cut(period, edge, settings):
    """Digital cut-off in cycles a sample; half power widens the analogue one by (sqrt 2 - 1)^(-1/(2 order))."""
    frequency = 1 / period
    if settings["cut"] == "half-amplitude":
        return frequency
    factor = (np.sqrt(2) - 1) ** (-edge / (2 * settings["order"]))
    return np.arctan(np.tan(np.pi * frequency) * factor) / np.pi


def butterworth(series, settings, shortest, longest):
    if shortest and longest:
        kind, edges = "bandpass", [1 / longest, 1 / shortest]
    elif shortest:
        kind, edges = "lowpass", cut(shortest, 1, settings)
    else:
        kind, edges = "highpass", cut(longest, -1, settings)
    sections = signal.butter(settings["order"], edges, kind, fs=1, output="sos")
    known = np.isfinite(series)
    index = np.arange(len(series))
    return signal.sosfiltfilt(sections, np.interp(index, index[known], series[known]))


def lanczos(series, _, shortest, longest):
    half = int(np.ceil(longest or 2 * shortest))

    def smooth(period):
        weights = low_pass(1 / period, half)
        known = np.isfinite(series).astype(float)
        filled = np.nan_to_num(series)
        share = np.convolve(known, weights)[half:-half]
        with np.errstate(invalid="ignore"):
            return np.where(share < LEAST_WEIGHT, np.nan, np.convolve(filled, weights)[half:-half] / share)

    return (smooth(shortest) if shortest else series) - (smooth(longest) if longest else 0)


def running_mean(series, _, shortest, longest):
    def smooth(points):
        half = points // 2
        weights = np.ones(2 * half + 1) / points
        if points % 2 == 0:
            weights[[0, -1]] /= 2
        padded = np.pad(series, half, constant_values=np.nan)
        windows = np.lib.stride_tricks.sliding_window_view(padded, 2 * half + 1)
        both = np.isfinite(windows) & np.isfinite(windows[:, ::-1])
        share = (both * weights).sum(axis=1)
        with np.errstate(invalid="ignore"):
            return np.where(share < LEAST_WEIGHT, np.nan, (np.where(both, windows, 0) * weights).sum(axis=1) / share)

    fast = smooth(round(shortest)) if shortest else series
    return fast - (smooth(round(longest)) if longest else 0)


def main(heights, fields, settings):
    source, result = netCDF4.Dataset(heights), netCDF4.Dataset(fields)
    days = result["time"][:].data
    step = np.median(np.diff(days))
    own = np.searchsorted(days, source["time"][:].data)
    height = np.full((len(days),) + source["adt"].shape[1:], np.nan)
    height[own] = source["adt"][:].filled(np.nan)
    design = np.stack([np.ones(len(days)), (days - days.mean()) / 365.2425], axis=1)
    filters = {"butterworth": butterworth, "lanczos": lanczos, "running-mean": running_mean}
    periods = [settings[key] and settings[key] / step for key in ("shortestDays", "longestDays")]
    wanted = np.full_like(height, np.nan)
    for row in range(height.shape[1]):
        for column in range(height.shape[2]):
            series = height[:, row, column]
            known = np.isfinite(series)
            fit = np.linalg.lstsq(design[known], series[known], rcond=None)[0]
            wanted[:, row, column] = filters[settings["filter"]](series - design @ fit, settings, *periods)
            wanted[~known, row, column] = np.nan
    got = result["height_band"][:].filled(np.nan).astype(float)
    both = np.isfinite(got) & np.isfinite(wanted)
    largest = np.abs(got - wanted)[both].max() / np.sqrt(np.mean(wanted[both] ** 2))
    only = int((np.isfinite(got) != np.isfinite(wanted)).sum())
    print(json.dumps({"largest": float(largest), "compared": int(both.sum()), "onlyOne": only}))


if __name__ == "__main__":
    main(sys.argv[1], sys.argv[2], json.loads(sys.argv[3]))
