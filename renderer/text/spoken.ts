/** What a screen reader says when the cursor has moved: place, date and value, with signs and units as words. */
export function spokenCursor(latitude: string, date: string, value: string): string {
  return `${spokenLatitude(latitude)}, ${date}: ${spokenUnits(value)}`;
}

function spokenLatitude(text: string): string {
  return text.replace(/° N$/, " degrees north").replace(/° S$/, " degrees south").replace(/°$/, " degrees");
}

function spokenUnits(text: string): string {
  return text
    .replace(/−(?=[\d.])/g, "minus ")
    .replace("±", "plus or minus")
    .replace("10⁻⁶ s⁻¹", "millionths per second")
    .replace("10⁻¹²", "million millionths")
    .replace(" m⁻¹", " per metre")
    .replace(" s⁻¹", " per second")
    .replace(" s⁻²", " per second squared")
    .replace(/\bcm\b/, "centimetres");
}
