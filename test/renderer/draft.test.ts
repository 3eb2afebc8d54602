import { describe, expect, test, vi } from "vitest";
import { type DraftStorage, drafts, throttled } from "../../renderer/state/draft";
import { withBand } from "../../renderer/state/edit-study";
import { standInStudy } from "./stand-in-engine";

const open = { study: standInStudy, folder: "/made-up", path: "/made-up/basin.study.json" };
const edited = withBand(open, { ...open.study.band, shortestDays: 60 });

function memoryStorage(): DraftStorage {
  const entries = new Map<string, string>();
  return {
    getItem: (key) => entries.get(key) ?? null,
    setItem: (key, value) => void entries.set(key, value),
    removeItem: (key) => void entries.delete(key),
  };
}

describe("a draft", () => {
  test("brings unsaved edits back to the study they belong to, and to no other", () => {
    const kept = drafts(memoryStorage());
    kept.keep(edited);
    expect(kept.find(open)).toEqual(edited.study);
    expect(kept.find({ ...open, path: "/other.study.json" })).toBeNull();
  });

  test("that equals the file is none, and a forgotten one is gone", () => {
    const kept = drafts(memoryStorage());
    kept.keep(open);
    expect(kept.find(open)).toBeNull();
    kept.keep(edited);
    kept.forget(edited);
    expect(kept.find(open)).toBeNull();
  });

  test("neither full, refused nor damaged storage throws", () => {
    const refusing = (): never => {
      throw new Error("quota");
    };
    const broken = drafts({ getItem: refusing, setItem: refusing, removeItem: refusing });
    broken.keep(edited);
    broken.forget(edited);
    expect(broken.find(open)).toBeNull();
    expect(drafts({ ...memoryStorage(), getItem: () => "{half" }).find(open)).toBeNull();
    expect(drafts(null).find(open)).toBeNull();
  });

  test("is written with the newest value within half a second, however often edits come", () => {
    vi.useFakeTimers();
    const written: number[] = [];
    const write = throttled((value: number) => written.push(value), 500);
    for (let edit = 0; edit < 100; edit++) {
      write(edit);
      vi.advanceTimersByTime(10);
    }
    vi.advanceTimersByTime(500);
    vi.useRealTimers();
    expect(written.at(-1)).toBe(99);
    // A thousand milliseconds of edits hold two whole pauses of 500.
    expect(written.length).toBeLessThanOrEqual(3);
  });
});
