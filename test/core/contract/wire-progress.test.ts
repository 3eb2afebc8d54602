import { describe, expect, test } from "vitest";
import type { Progress } from "../../../core/contract/job";
import { throttleProgress } from "../../../core/contract/wire-progress";

/** Reports every millisecond of `milliseconds`, the step named by `stepAt`; gives what passed and when. */
function simulate(milliseconds: number, stepAt: (time: number) => string) {
  let time = 0;
  const passed: { time: number; progress: Progress }[] = [];
  const throttle = throttleProgress(
    (progress) => passed.push({ time, progress }),
    () => time,
  );
  for (; time < milliseconds; time++) throttle.report({ step: stepAt(time), done: time, total: milliseconds });
  throttle.flush();
  return passed;
}

describe("progress", () => {
  test("of one step passes twenty times a second, 50 ms apart", () => {
    const times = simulate(3000, () => "reading").map(({ time }) => time);
    expect(times.slice(0, -1)).toEqual(Array.from({ length: 60 }, (_, index) => index * 50));
  });

  test("of a new step passes at once", () => {
    const passed = simulate(500, (time) => (time < 110 ? "reading" : "filtering"));
    expect(passed.map(({ time }) => time)).toContain(110);
  });

  test("passes no more than twenty times a second however often the step changes", () => {
    const passed = simulate(2000, (time) => `step ${time}`);
    expect(passed.filter(({ time }) => time < 1000)).toHaveLength(20);
    expect(passed.filter(({ time }) => time >= 1000 && time < 2000)).toHaveLength(20);
  });

  test("ends on the last report, and only once", () => {
    expect(simulate(130, () => "reading").at(-1)?.progress.done).toBe(129);
    expect(simulate(51, () => "reading").map(({ progress }) => progress.done)).toEqual([0, 50]);
  });
});
