import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { commit, endGesture, redo, startHistory, undo } from "../../renderer/state/history";

describe("undo is a list of studies", () => {
  test("undo is the inverse of commit, redo the inverse of undo, for any run of edits", () => {
    fc.assert(
      fc.property(fc.uniqueArray(fc.integer(), { minLength: 1, maxLength: 30 }), (values) => {
        const [first, ...edits] = values;
        const end = edits.reduce((history, value) => commit(history, value), startHistory(first));
        const back = edits.reduce((history) => undo(history), end);
        expect(back.present).toBe(first);
        const forth = edits.reduce((history) => redo(history), back);
        expect(forth.present).toBe(values.at(-1));
        expect(forth.past).toEqual(end.past);
      }),
    );
  });

  test("a whole drag is one entry", () => {
    let history = startHistory(90);
    for (const days of [91, 95, 100, 120]) history = commit(history, days, "edge");
    expect(history.past).toEqual([90]);
    expect(undo(history).present).toBe(90);
  });

  test("two drags of the same edge are two entries", () => {
    const first = endGesture(commit(startHistory(90), 100, "edge"));
    const second = commit(first, 110, "edge");
    expect(second.past).toEqual([90, 100]);
  });

  test("a drag after an undo does not swallow the entry it starts from", () => {
    const dragged = commit(commit(startHistory(90), 100, "edge"), 110, "edge");
    const again = commit(undo(dragged), 95, "edge");
    expect(again.past).toEqual([90]);
    expect(again.future).toEqual([]);
  });

  test("undo and redo at the ends change nothing", () => {
    const history = startHistory(1);
    expect(undo(history)).toBe(history);
    expect(redo(history)).toBe(history);
    expect(commit(history, 1)).toBe(history);
  });

  test("a new edit drops what was undone", () => {
    const history = commit(undo(commit(startHistory(1), 2)), 3);
    expect(redo(history)).toBe(history);
  });
});
