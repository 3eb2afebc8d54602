"""Writes and checks the JSON file of a reference script; the command line that all of them share.

Numbers are written with repr, so that reading them back gives the same float64. NaN is written as null.
"""
import json
import math
import sys
from pathlib import Path

import numpy as np

RELATIVE_TOLERANCE = 1e-12
"""Floats are compared relative to the largest magnitude in their list: sums and linear solves round differently with
another BLAS, FFT or libm, and an element that cancels to nearly zero carries the rounding of its neighbours."""

QUANTUM = 2.0**-14


def quantised(values):
    """Values rounded to multiples of 2^-14, which float32 holds exactly below 1024: a reader that stores float32 gets
    the very same input."""
    return np.round(np.asarray(values, dtype=float) / QUANTUM) * QUANTUM


def plain(value):
    """Numpy arrays and scalars as lists and Python numbers; NaN as None."""
    if isinstance(value, dict):
        return {str(key): plain(item) for key, item in value.items()}
    if isinstance(value, np.ndarray):
        return plain(value.tolist())
    if isinstance(value, (list, tuple)):
        return [plain(item) for item in value]
    if isinstance(value, (bool, np.bool_)):
        return bool(value)
    if isinstance(value, (int, np.integer)):
        return int(value)
    if isinstance(value, (float, np.floating)):
        if math.isinf(value):
            raise ValueError("infinity has no place in a reference file")
        return None if math.isnan(value) else float(value)
    return value


def text_of(value, indent=0):
    """JSON with one key a line and every list of plain values on one line."""
    pad = "  " * (indent + 1)
    if isinstance(value, dict) and value:
        lines = [f"{pad}{json.dumps(key)}: {text_of(item, indent + 1)}" for key, item in value.items()]
        return "{\n" + ",\n".join(lines) + "\n" + "  " * indent + "}"
    if isinstance(value, list) and any(isinstance(item, (dict, list)) for item in value):
        lines = [pad + text_of(item, indent + 1) for item in value]
        return "[\n" + ",\n".join(lines) + "\n" + "  " * indent + "]"
    return json.dumps(value, allow_nan=False)


def magnitude(values):
    return max((abs(item) for item in values if isinstance(item, (int, float))), default=0.0)


def first_difference(committed, fresh, path="", scale=None):
    """The first place where two JSON values differ, as a sentence, or None."""
    if isinstance(committed, dict) and isinstance(fresh, dict):
        if list(committed) != list(fresh):
            return f"{path}: keys {list(committed)} against {list(fresh)}"
        pairs = [(committed[key], fresh[key], f"{path}.{key}", None) for key in committed]
    elif isinstance(committed, list) and isinstance(fresh, list):
        if len(committed) != len(fresh):
            return f"{path}: {len(committed)} items against {len(fresh)}"
        shared = magnitude(committed)
        pairs = [(a, b, f"{path}[{i}]", shared) for i, (a, b) in enumerate(zip(committed, fresh))]
    elif isinstance(committed, float) and isinstance(fresh, float):
        allowed = RELATIVE_TOLERANCE * (abs(committed) if scale is None else scale)
        return None if abs(committed - fresh) <= allowed else f"{path}: {committed!r} against {fresh!r}"
    else:
        same = type(committed) is type(fresh) and committed == fresh
        return None if same else f"{path}: {committed!r} against {fresh!r}"
    for a, b, where, list_scale in pairs:
        difference = first_difference(a, b, where, list_scale)
        if difference:
            return difference
    return None


def write_or_check(script, data, suffix=""):
    """Writes data beside the script as NAME[-suffix].json; with --check compares with the file there and exits 1 with
    the first difference."""
    source = Path(script).resolve()
    target = source.with_name(source.stem.replace("_", "-") + (f"-{suffix}" if suffix else "") + ".json")
    text = text_of(plain(data)) + "\n"
    if "--check" not in sys.argv[1:]:
        target.write_text(text, encoding="utf-8")
        print(f"{target.name}: written, {len(text) / 1024:.0f} KB")
        return
    if not target.exists():
        sys.exit(f"{target.name}: not there; run without --check to write it")
    difference = first_difference(json.loads(target.read_text(encoding="utf-8")), json.loads(text))
    if difference:
        sys.exit(f"{target.name}: committed against recomputed differ at {difference}")
    print(f"{target.name}: agrees")
