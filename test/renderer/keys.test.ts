import { describe, expect, test } from "vitest";
import { type KeyPress, keyAction } from "../../renderer/state/keys";

const press = (key: string, change: Partial<KeyPress> = {}): KeyPress => ({
  key,
  shift: false,
  command: false,
  alt: false,
  focus: "other",
  ...change,
});

describe("the keyboard", () => {
  test("arrows move the cursor: up north, right on in time", () => {
    expect(keyAction(press("ArrowUp"))).toEqual({ kind: "latitude", steps: 1 });
    expect(keyAction(press("ArrowDown"))).toEqual({ kind: "latitude", steps: -1 });
    expect(keyAction(press("ArrowRight"))).toEqual({ kind: "date", steps: 1 });
    expect(keyAction(press("ArrowLeft", { shift: true }))).toEqual({ kind: "date", steps: -10 });
  });

  test("brackets move the short edge, braces the long one", () => {
    expect(keyAction(press("]"))).toEqual({ kind: "edge", edge: "shortestDays", direction: 1 });
    expect(keyAction(press("{", { shift: true }))).toEqual({ kind: "edge", edge: "longestDays", direction: -1 });
  });

  test("nothing is taken from a person who types", () => {
    for (const key of ["ArrowUp", "[", " ", "?"]) expect(keyAction(press(key, { focus: "text" }))).toBeNull();
    expect(keyAction(press("z", { command: true, focus: "text" }))).toBeNull();
  });

  test("a control keeps the keys it uses itself", () => {
    expect(keyAction(press("ArrowUp", { focus: "choice" }))).toBeNull();
    expect(keyAction(press("ArrowUp", { focus: "slider" }))).toBeNull();
    expect(keyAction(press(" ", { focus: "button" }))).toBeNull();
    expect(keyAction(press("]", { focus: "button" }))).not.toBeNull();
  });

  test("undo and redo have their usual keys", () => {
    expect(keyAction(press("z", { command: true }))).toEqual({ kind: "undo" });
    expect(keyAction(press("Z", { command: true, shift: true }))).toEqual({ kind: "redo" });
    expect(keyAction(press("y", { command: true }))).toEqual({ kind: "redo" });
  });

  test("the browser's own shortcuts stay with the browser", () => {
    expect(keyAction(press("ArrowLeft", { alt: true }))).toBeNull();
    expect(keyAction(press("[", { command: true }))).toBeNull();
    expect(keyAction(press("Tab"))).toBeNull();
    expect(keyAction(press("constructor"))).toBeNull();
  });
});
