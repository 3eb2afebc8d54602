/** Global attributes that every sample file carries. */
export function simulatedNotice(title: string): Record<string, string> {
  return {
    Conventions: "CF-1.11",
    title,
    summary:
      "A made-up sea computed with a barotropic vorticity model. No measurement of any real ocean is in this file: not for navigation, not for science about the real sea.",
    keywords: "simulated, invented, sea surface height",
    source:
      "doubly periodic barotropic vorticity model on a beta plane, stirred at random; see the README beside the files",
    license: "CC0-1.0",
    history: "made by sample-data/generate.ts",
  };
}

/** Days from 1950-01-01 to a date YYYY-MM-DD. */
export function daysSince1950(date: string): number {
  return (Date.parse(`${date}T00:00:00Z`) - Date.UTC(1950, 0, 1)) / 86400e3;
}
