import { fittingText, textWidth } from "../text-width";

/** Breaks a text at its spaces into lines of at most `width` pixels; what goes beyond `most` lines is cut with an ellipsis. */
export function wrapText(text: string, width: number, size: number, most: number): string[] {
  const lines: string[] = [];
  let rest = text.split(" ").filter((word) => word !== "");
  while (rest.length > 0 && lines.length < most) {
    if (lines.length === most - 1) {
      lines.push(fittingText([rest.join(" ")], width, size));
      break;
    }
    let count = 1;
    while (count < rest.length && textWidth(rest.slice(0, count + 1).join(" "), size, 400) <= width) count++;
    lines.push(fittingText([rest.slice(0, count).join(" ")], width, size));
    rest = rest.slice(count);
  }
  return lines.filter((line) => line !== "");
}
