import { readdirSync } from "node:fs";
import { expect, test } from "vitest";
import { figures } from "../../../core/figure/index";

test("every figure file in the folder is registered under its own name, and no other", () => {
  const files = readdirSync(new URL("../../../core/figure", import.meta.url))
    .filter((file) => file.endsWith("-figure.ts"))
    .map((file) => file.replace("-figure.ts", ""));
  expect(figures.map((figure) => figure.id as string).sort()).toEqual(files.sort());
});
