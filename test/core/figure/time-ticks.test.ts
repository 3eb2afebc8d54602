import { execFileSync } from "node:child_process";
import { describe, expect, test } from "vitest";
import { formatDate, timeTicks } from "../../../core/figure/time-ticks";
import { calendars, daysFromDate } from "../../../core/model/calendar";

const always = () => true;

function day(calendar: (typeof calendars)[number], year: number, month: number, date: number): number {
  return daysFromDate(calendar, { year, month, day: date, hour: 0, minute: 0, second: 0 });
}

describe("time ticks", () => {
  test("quarters carry month names, January the year", () => {
    const from = day("standard", 2031, 3, 1);
    const to = day("standard", 2033, 8, 18);
    const ticks = timeTicks("standard", from, to, (candidate) => candidate.length <= 10);
    expect(ticks.map((tick) => tick.label)).toEqual([
      "April",
      "July",
      "October",
      "2032",
      "April",
      "July",
      "October",
      "2033",
      "April",
      "July",
    ]);
    expect(ticks[3].value).toBe(day("standard", 2032, 1, 1));
  });

  test("where whole names do not fit, months are cut to three letters before the step grows", () => {
    const from = day("standard", 2031, 3, 1);
    const to = day("standard", 2031, 8, 18);
    const short = (ticks: readonly { label: string }[]) =>
      ticks.length <= 6 && ticks.every((tick) => tick.label.length <= 4);
    expect(timeTicks("standard", from, to, short).map((tick) => tick.label)).toEqual([
      "Mar",
      "Apr",
      "May",
      "Jun",
      "Jul",
      "Aug",
    ]);
  });

  test("thirty years are cut at whole years", () => {
    const from = day("standard", 1993, 1, 1);
    const to = day("standard", 2023, 1, 1);
    const ticks = timeTicks("standard", from, to, (candidate) => candidate.length <= 8);
    expect(ticks.map((tick) => tick.label)).toEqual(["1995", "2000", "2005", "2010", "2015", "2020"]);
  });

  test.each(calendars)("the %s calendar puts a tick on the first of every month of a year", (calendar) => {
    const from = day(calendar, 2031, 1, 1);
    const to = day(calendar, 2031, 12, 30);
    const ticks = timeTicks(calendar, from, to, (candidate) => candidate.length <= 12);
    expect(ticks.map((tick) => tick.value)).toEqual(
      Array.from({ length: 12 }, (_, month) => day(calendar, 2031, month + 1, 1)),
    );
  });

  test("a few weeks are cut into days that the reform of 1582 does not break", () => {
    const from = day("standard", 1582, 9, 25);
    const to = day("standard", 1582, 10, 25);
    const labels = timeTicks("standard", from, to, (candidate) => candidate.length <= 9).map((tick) => tick.label);
    expect(labels).toContain("1 October");
    expect(labels).not.toContain("5 October");
  });

  test("an impossible fit gives no ticks", () => {
    expect(timeTicks("standard", 0, 1000, () => false)).toEqual([]);
    expect(timeTicks("standard", 0, 0.5, always).length).toBeLessThanOrEqual(1);
  });

  test("a date reads the same under any time zone and locale", () => {
    const script = `import("./core/figure/time-ticks.ts").then((m) => process.stdout.write(m.formatDate("standard", 22789)))`;
    const zones = [
      { TZ: "America/St_Johns", LANG: "de_DE.UTF-8" },
      { TZ: "Pacific/Kiritimati", LANG: "ar_EG.UTF-8" },
    ];
    const here = formatDate("standard", 22789);
    // 22789 days after 1970-01-01, by Python's datetime: date(1970, 1, 1) + timedelta(22789).
    expect(here).toBe("24 May 2032");
    for (const zone of zones) {
      const there = execFileSync("npx", ["tsx", "-e", script], { env: { ...process.env, ...zone }, encoding: "utf8" });
      expect(there).toBe(here);
    }
  });
});
