import { execFileSync } from "node:child_process";
import { describe, expect, test } from "vitest";
import type { Scene } from "../../../core/figure/scene";
import { sceneToSvg } from "../../../core/figure/scene-to-svg";
import { plainLine } from "../../../core/figure/xml-text";
import { readPng } from "./png-reader";

interface Element {
  readonly tag: string;
  readonly attributes: Record<string, string>;
  readonly text: string;
}

/** Parses with Python's expat-based reader, which refuses anything that is not well-formed XML. */
function parse(svg: string): Element[] {
  const script = `
import json, sys
from xml.etree import ElementTree
root = ElementTree.fromstring(sys.stdin.buffer.read())
print(json.dumps([{"tag": e.tag.split("}")[1], "attributes": e.attrib, "text": "".join(e.itertext())} for e in root.iter()]))`;
  const output = execFileSync("/usr/bin/python3", ["-c", script], { input: svg, maxBuffer: 1 << 28 });
  return JSON.parse(output.toString()) as Element[];
}

const hostile = `"><script>alert('1')</script>&amp; \u202egpj.exe\u2069 \u0000\u0007\ud800 ]]> line\nbreak`;

function scene(parts: Partial<Scene> = {}): Scene {
  return {
    width: 200,
    height: 100,
    background: "#ffffff",
    title: "A title",
    description: "A description",
    panels: [
      {
        id: "map",
        x: 10,
        y: 10,
        width: 100,
        height: 50,
        horizontal: { kind: "linear", from: 0, to: 1 },
        vertical: { kind: "linear", from: 0, to: 1 },
      },
    ],
    marks: [
      { kind: "path", id: "line", d: "M0 0L5 5", stroke: "#000000", strokeWidth: 1, fill: "none", clip: "map" },
      { kind: "text", id: "unit", x: 5, y: 20, text: "cm s⁻¹", size: 10, weight: 400, anchor: "start", fill: "#000" },
    ],
    ...parts,
  };
}

describe("scene to SVG", () => {
  test("the document is well-formed and holds every mark", () => {
    const elements = parse(sceneToSvg(scene()));
    expect(elements.filter((element) => element.attributes.id).map((element) => element.attributes.id)).toEqual([
      "title",
      "description",
      "clip-map",
      "line",
      "unit",
    ]);
    expect(elements.find((element) => element.attributes.id === "line")?.attributes["clip-path"]).toBe(
      "url(#clip-map)",
    );
  });

  test("hostile text stays text in every place that takes text, and its control and bidirectional marks are gone", () => {
    const text = { kind: "text", x: 0, y: 9, size: 9, weight: 400, anchor: "start", fill: hostile } as const;
    const svg = sceneToSvg(
      scene({
        title: hostile,
        description: hostile,
        background: hostile,
        marks: [
          { ...text, id: hostile, text: hostile },
          { kind: "path", id: "p", d: hostile, stroke: hostile, strokeWidth: 1, fill: hostile },
        ],
      }),
      { metadata: { title: hostile } },
    );
    const elements = parse(svg);
    expect(elements.map((element) => element.tag)).not.toContain("script");
    const expected = `"><script>alert('1')</script>&amp; gpj.exe  ]]> line break`;
    expect(elements.find((element) => element.tag === "title")?.text).toBe(expected);
    expect(elements.find((element) => element.tag === "text")?.text).toBe(expected);
    const unwanted = [0, 7, 0x202e, 0x2069, 0xd800].map((code) => String.fromCharCode(code));
    for (const character of unwanted) expect(svg.includes(character)).toBe(false);
  });

  test("the metadata come back as the very same value", () => {
    const metadata = {
      strake: 1,
      title: `${hostile.replace("\ud800", "")} Höhe μ <metadata> </metadata>`,
      list: [1.5],
    };
    const svg = sceneToSvg(scene(), { metadata });
    const stored = parse(svg).find((element) => element.tag === "metadata")?.text ?? "";
    expect(JSON.parse(stored)).toEqual(metadata);
  });

  test("superscripts are raised figures of the same font, and the label keeps the text as written", () => {
    const unit = parse(sceneToSvg(scene())).find((element) => element.attributes.id === "unit");
    expect(unit?.text).toBe("cm s−1");
    expect(unit?.attributes["aria-label"]).toBe("cm s⁻¹");
  });

  test("width in millimetres sets the height in proportion", () => {
    const [root] = parse(sceneToSvg(scene(), { widthMm: 174 }));
    expect(root.attributes).toMatchObject({ width: "174mm", height: "87mm", viewBox: "0 0 200 100" });
  });

  test("the embedded picture decodes to the raster's pixels", () => {
    const pixels = Uint8ClampedArray.from({ length: 4 * 12 }, (_, index) =>
      index % 4 === 3 ? 255 : 20 * (index % 11),
    );
    const raster = { kind: "raster", id: "r", x: 10, y: 10, width: 100, height: 50, columns: 4, rows: 3 } as const;
    const svg = sceneToSvg(scene({ marks: [{ ...raster, pixels }] }));
    const href = parse(svg).find((element) => element.tag === "image")?.attributes.href ?? "";
    const [start, data] = href.split(",");
    expect(start).toBe("data:image/png;base64");
    expect(readPng(Buffer.from(data, "base64"))).toMatchObject({ columns: 4, rows: 3, pixels });
  });

  test("a 1440 by 720 raster of noise stays under 5 MB", () => {
    const pixels = new Uint8ClampedArray(4 * 1440 * 720);
    let state = 1;
    for (let i = 0; i < pixels.length; i += 4) {
      // Park and Miller's minimal generator: noise is what deflate compresses worst.
      state = (state * 48271) % 2147483647;
      const shade = state % 258;
      pixels.set([shade & 255, (shade * 3) & 255, shade >> 8, 255], i);
    }
    const raster = { kind: "raster", id: "r", x: 0, y: 0, width: 200, height: 100, columns: 1440, rows: 720 } as const;
    expect(sceneToSvg(scene({ marks: [{ ...raster, pixels }] })).length).toBeLessThan(5e6);
  });

  test("fonts handed over are embedded", () => {
    const svg = sceneToSvg(scene(), { fonts: [{ weight: 700, bytes: Uint8Array.of(1, 2, 3), type: "font/ttf" }] });
    expect(svg).toContain("font-weight:700;src:url(data:font/ttf;base64,AQID)");
    expect(parse(svg).length).toBeGreaterThan(4);
  });

  test("the same scene gives the same bytes", () => {
    expect(sceneToSvg(scene(), { metadata: { a: 1 } })).toBe(sceneToSvg(scene(), { metadata: { a: 1 } }));
  });
});

test("plain lines keep letters of every script", () => {
  expect(plainLine("Ägäis Καρπάθιο 黒潮 😀")).toBe("Ägäis Καρπάθιο 黒潮 😀");
});
