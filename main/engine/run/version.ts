import { readFileSync } from "node:fs";
import { join } from "node:path";
import { findPlaces } from "../process/places";

/** Strake's version, from its package.json. */
export const version = (
  JSON.parse(readFileSync(join(findPlaces(import.meta.url).root, "package.json"), "utf8")) as { version: string }
).version;
