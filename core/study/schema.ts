import { z } from "zod";

const identifier = z.string().regex(/^[A-Za-z][A-Za-z0-9_-]{0,31}$/, "a short name of letters, digits, - and _");
const dateText = z.string().regex(/^\d{4}-\d{2}-\d{2}$/, "a date as YYYY-MM-DD");

const gridSource = z.strictObject({
  id: identifier,
  label: z.string().max(120).default(""),
  files: z.array(z.string().min(1)).min(1),
  height: z.string().min(1).default("auto"),
});

const region = z.strictObject({
  west: z.number().min(-360).max(720),
  east: z.number().min(-360).max(720),
  south: z.number().min(-90).max(90),
  north: z.number().min(-90).max(90),
});

const period = z.strictObject({ from: dateText, to: dateText });

export const geostrophySettings = z.strictObject({
  stencil: z.union([z.literal(3), z.literal(5), z.literal(7), z.literal(9)]).default(7),
  earth: z.enum(["ellipsoid", "sphere"]).default("ellipsoid"),
  radius: z.number().min(6.3e6).max(6.4e6).default(6371000),
  gravity: z.union([z.literal("latitude"), z.number().min(9.7).max(9.9)]).default("latitude"),
  omega: z.number().min(7.2e-5).max(7.4e-5).default(7.292115e-5),
  equator: z.enum(["blank", "blend"]).default("blank"),
  equatorDegrees: z.number().min(0).max(30).default(5),
  /** Blend only: e-folding latitude of the beta-plane solution's weight. */
  blendScaleDegrees: z.number().min(0.5).max(10).default(2.2),
  /** Blend only: the fit of the height's slope reaches this far on either side. */
  blendWidthDegrees: z.number().min(2).max(15).default(5),
});

export const backgroundSettings = z.strictObject({
  mean: z.boolean().default(true),
  trend: z.boolean().default(true),
  annual: z.boolean().default(true),
  semiannual: z.boolean().default(true),
});

export const bandSettings = z.strictObject({
  /** null: nothing is taken off the short periods. */
  shortestDays: z.number().positive().nullable().default(90),
  /** null: nothing is taken off the long periods. */
  longestDays: z.number().positive().nullable().default(540),
  filter: z.enum(["lanczos", "butterworth", "running-mean", "none"]).default("lanczos"),
  /** Butterworth only. */
  order: z.number().int().min(1).max(8).default(4),
  /** Butterworth only: what the named periods are in the result. */
  cut: z.enum(["half-amplitude", "half-power"]).default("half-amplitude"),
  /** Gaps up to this long are bridged; the filter does not reach across longer ones. */
  bridgeDays: z.number().min(0).default(20),
});

/** Two wavelengths in kilometres; null leaves that side open. */
const wavelengths = z
  .strictObject({
    shortestKm: z.number().positive().nullable().default(null),
    longestKm: z.number().positive().nullable().default(null),
  })
  .nullable()
  .default(null);

export const spaceSettings = z.strictObject({
  /** Band-pass along meridians. */
  meridional: wavelengths,
  /** Band-pass along parallels. */
  zonal: wavelengths,
  removeZonalMean: z.boolean().default(false),
  /** Half-spans of a large-scale loess surface that is taken off; null takes nothing off. */
  removeSurface: z
    .strictObject({ zonalKm: z.number().min(50), meridionalKm: z.number().min(50) })
    .nullable()
    .default(null),
});

/** How far a height is off: a standard error in metres, or "file" for the file's own error variable. */
export const errorSettings = z.strictObject({
  heightMetres: z
    .union([z.literal("file"), z.number().positive().max(10)])
    .nullable()
    .default(null),
  /** Distance over which height errors are alike; 0 for independent cells. */
  correlationKm: z.number().min(0).max(2000).default(0),
});

export const jetSettings = z.strictObject({
  /** Least prominence of an extreme in m s-1; "auto": the larger of 1 cm/s and half the standard deviation of the picture. */
  prominence: z.union([z.literal("auto"), z.number().positive()]).default("auto"),
  /** Width of the longitude sectors that tell a jet's extent and tilt. */
  sectorDegrees: z.number().min(1).max(180).default(5),
  fastestDegreesPerDay: z.number().positive().default(0.05),
  /** A jet not found for longer than this has ended. */
  longestGapDays: z.number().min(0).default(15),
  /** Shorter-lived lines are not listed as jets. */
  leastLifetimeDays: z.number().min(0).default(90),
});

export const eddyTestSettings = z.strictObject({
  /** Random oceans drawn; 0 leaves the test out of a run. */
  oceans: z.number().int().min(0).max(20_000).default(500),
  seed: z.number().int().min(0).max(4294967295).default(1),
  /** Chance that any jet is held in an ocean of eddies alone. */
  level: z.number().min(0.001).max(0.5).default(0.05),
  /** What is set here is not estimated from the data. */
  population: z
    .strictObject({
      medianAmplitudeMetres: z.number().positive().optional(),
      medianRadiusMetres: z.number().positive().optional(),
      densityPerMillionKm2: z.number().positive().optional(),
      lifetimeDays: z.number().positive().optional(),
      speedMetresPerSecond: z.number().optional(),
    })
    .prefault({}),
});

export const scaleSettings = z.strictObject({
  /** First deformation radius: the built-in table by latitude, a constant first-mode speed in m s-1, or a file of latitude and km. */
  deformation: z
    .union([
      z.literal("table"),
      z.strictObject({ waveSpeed: z.number().positive() }),
      z.strictObject({ file: z.string().min(1) }),
    ])
    .default("table"),
  /** Speed for the Rhines scale: rms of the whole flow or of the eddies. */
  rhinesSpeed: z.enum(["total", "eddy"]).default("eddy"),
  /** Repeat periods of the altimeters behind the maps, in days; tidal aliases in the band are cautioned. */
  repeatDays: z.array(z.number().positive()).default([9.915642, 35]),
  /** What the mapping resolves. */
  resolvedDays: z.number().positive().default(30),
  resolvedKm: z.number().positive().default(180),
});

/** How the spectrum by period is taken. */
export const spectrumSettings = z.strictObject({
  taper: z.enum(["hann", "hamming", "boxcar", "cosine", "multitaper"]).default("hann"),
  /** Share of a segment that neighbouring ones have in common. */
  overlap: z.number().min(0).max(0.9).default(0.5),
  detrend: z.enum(["none", "constant", "linear"]).default("constant"),
  longestSegmentDays: z.number().positive().default(3000),
});

export const outputSettings = z.strictObject({
  fields: z.enum(["none", "mean", "all"]).default("mean"),
  figures: z.array(z.string()).default(["latitudes"]),
  formats: z.array(z.enum(["svg"])).default(["svg"]),
  widthMm: z.number().min(60).max(400).default(174),
});

/** The study file, version 1. Unknown keys are refused (see read.ts, which names the nearest known key). */
export const studySchema = z.strictObject({
  strake: z.literal(1),
  title: z.string().max(200).default(""),
  grids: z.array(gridSource).min(1),
  tracks: z.array(gridSource).default([]),
  /** Left out: all of the first grid. */
  region: region.optional(),
  /** Left out: all of the first grid. */
  period: period.optional(),
  geostrophy: geostrophySettings.prefault({}),
  background: backgroundSettings.prefault({}),
  space: spaceSettings.prefault({}),
  band: bandSettings.prefault({}),
  spectrum: spectrumSettings.prefault({}),
  errors: errorSettings.prefault({}),
  jets: jetSettings.prefault({}),
  eddyTest: eddyTestSettings.prefault({}),
  scales: scaleSettings.prefault({}),
  compare: z.strictObject({}).prefault({}),
  outputs: outputSettings.prefault({}),
});

/** A study with every default written out. */
export type Study = z.output<typeof studySchema>;
export type GridSettings = z.output<typeof gridSource>;
export type Region = z.output<typeof region>;
export type Period = z.output<typeof period>;
export type GeostrophySettings = z.output<typeof geostrophySettings>;
export type BackgroundSettings = z.output<typeof backgroundSettings>;
export type JetSettings = z.output<typeof jetSettings>;
export type EddyTestSettings = z.output<typeof eddyTestSettings>;
export type ScaleSettings = z.output<typeof scaleSettings>;
export type SpectrumSettings = z.output<typeof spectrumSettings>;
export type SpaceSettings = z.output<typeof spaceSettings>;
export type ErrorSettings = z.output<typeof errorSettings>;
export type BandSettings = z.output<typeof bandSettings>;
