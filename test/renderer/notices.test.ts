import { describe, expect, test } from "vitest";
import { Fault } from "../../core/model/errors";
import { addNotice, noticeFromError } from "../../renderer/state/notices";

const fault = new Fault({
  tag: "band",
  where: "band.shortestDays",
  expected: "at least twice the sampling of 3 days",
  got: "4 days",
  advice: "choose 6 days or more",
});

describe("a notice", () => {
  test("says where, what was expected, what was got and what to do, in sentences", () => {
    const notice = noticeFromError(fault);
    expect(notice?.kind).toBe("error");
    expect(notice?.text).toBe(
      "band.shortestDays: expected at least twice the sampling of 3 days, got 4 days. Choose 6 days or more.",
    );
  });

  test("reads a fault that has crossed a process border as plain data", () => {
    expect(noticeFromError(fault.toData())).toEqual(noticeFromError(fault));
  });

  test("is not made for what the person cancelled", () => {
    expect(noticeFromError(new Fault({ ...fault.toData(), tag: "cancelled" }))).toBeNull();
    expect(noticeFromError(new DOMException("stopped", "AbortError"))).toBeNull();
  });

  test("is made of any thrown value", () => {
    expect(noticeFromError(new TypeError("x is undefined"))?.text).toContain("x is undefined".slice(1));
    expect(noticeFromError(42)?.text).toContain("42");
    expect(noticeFromError(undefined)).not.toBeNull();
  });

  test("keeps line breaks of a hostile file name out of the sentence", () => {
    const text = noticeFromError(new Fault({ ...fault.toData(), where: "a\n\n\nb" }))?.text ?? "";
    expect(text).toMatch(/^a b: /);
  });

  test("that repeats a standing one replaces it, so a failing drag is told once", () => {
    const text = noticeFromError(fault);
    if (!text) throw new Error("a fault gives a notice");
    const many = Array.from({ length: 50 }).reduce<ReturnType<typeof addNotice>>((all) => addNotice(all, text), []);
    expect(many).toHaveLength(1);
  });

  test("has an id of its own while it stands", () => {
    const notices = ["a", "b", "c"].reduce<ReturnType<typeof addNotice>>(
      (all, text) => addNotice(all, { kind: "news", heading: "News", text }),
      [],
    );
    expect(new Set(notices.map((notice) => notice.id)).size).toBe(3);
  });
});
