"""Dates and day counts of every CF calendar by cftime, the oracle for core/model/calendar.ts and time-units.ts.

Years are astronomical (has_year_zero=True) so that the six calendars count alike.
"""
import random

import cftime

from reference_file import write_or_check

CALENDARS = ["standard", "proleptic_gregorian", "julian", "noleap", "all_leap", "360_day"]
random.seed(20310524)

FIXED = [
    (1970, 1, 1), (1582, 10, 4), (1582, 10, 15), (1582, 12, 31), (1583, 1, 1), (1500, 2, 28), (1500, 3, 1),
    (1600, 2, 28), (1600, 3, 1), (1700, 3, 1), (1900, 2, 28), (1900, 3, 1), (2000, 2, 28), (2000, 3, 1), (2004, 3, 1),
    (1950, 1, 1), (1993, 1, 1), (2012, 12, 30), (2100, 2, 28), (2100, 3, 1), (1, 1, 1), (0, 3, 1), (-1, 12, 30),
    (-4712, 1, 1), (9999, 12, 30), (12345, 6, 7), (100000, 1, 1),
]
LEAP = [(2000, 2, 29), (2004, 2, 29), (1500, 2, 29), (1900, 2, 29), (2001, 2, 29), (2001, 2, 30)]


def rows(calendar):
    dates = [(*date, 0, 0, 0, 0) for date in FIXED]
    for _ in range(60):
        dates.append((random.randint(-3000, 4000), random.randint(1, 12), random.randint(1, 28),
                      random.randint(0, 23), random.randint(0, 59), random.randint(0, 59),
                      random.randrange(0, 1000) * 1000))
    dates += [(*date, 12, 0, 0, 0) for date in LEAP]
    epoch = cftime.datetime(1970, 1, 1, calendar=calendar, has_year_zero=True)
    out = []
    for date in dates:
        try:
            moment = cftime.datetime(*date, calendar=calendar, has_year_zero=True)
        except ValueError:
            out.append({"date": date, "exists": False})
            continue
        delta = moment - epoch
        out.append({"date": date, "exists": True, "days": delta.days,
                    "seconds": delta.seconds + delta.microseconds / 1e6})
    return out


UNITS = [
    "days since 1950-01-01 00:00:00", "days since 1950-1-1", "hours since 1900-01-01 00:00:0.0",
    "seconds since 1970-01-01T00:00:00Z", "minutes since 2000-01-01 12:30", "days since 1985-01-01 00:00:00+00:00",
    "days since 1985-01-01 00:00:00 UTC", "hours since 1990-06-15 06:00:00 -06:00", "days since 1800-02-03 01:02:03.5",
    "days since 0850-7-5", "d since 1992-10-8 15:15:42.5 +05:30", "sec since 2031-05-24", "h since 1582-10-4",
    "milliseconds since 1970-01-01", "microseconds since 1970-01-01 00:00:00",
]
VALUES = [0, 1, -1, 0.5, 365, 23010.25, 1e5, -70000]


def units_rows(calendar):
    out = []
    for units in UNITS:
        for value in VALUES:
            try:
                moment = cftime.num2date(value, units, calendar=calendar, has_year_zero=True)
            except ValueError:
                continue
            epoch = cftime.datetime(1970, 1, 1, calendar=calendar, has_year_zero=True)
            delta = moment - epoch
            out.append({"units": units, "value": value,
                        "days": delta.days + (delta.seconds + delta.microseconds / 1e6) / 86400})
    return out


def months_rows():
    out = []
    for value in [0, 1, 2.5, 14, -3]:
        moment = cftime.num2date(value, "months since 2000-01-16", calendar="360_day", has_year_zero=True)
        epoch = cftime.datetime(1970, 1, 1, calendar="360_day", has_year_zero=True)
        delta = moment - epoch
        out.append({"value": value, "days": delta.days + delta.seconds / 86400})
    return out


if __name__ == "__main__":
    write_or_check(__file__, {
        "cftime": cftime.__version__,
        "dates": {calendar: rows(calendar) for calendar in CALENDARS},
        "units": {calendar: units_rows(calendar) for calendar in CALENDARS},
        "months360": months_rows(),
    })
