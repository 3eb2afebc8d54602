import { closeSync, fstatSync, openSync, readSync } from "node:fs";
import type { Container, FileFormat } from "./container";
import { fileFault } from "./faults";
import { netcdfClassic } from "./netcdf-classic/format";
import { netcdf4 } from "./netcdf4/format";

/** Every file format Strake reads: one line each. */
export const fileFormats: readonly FileFormat[] = [netcdfClassic, netcdf4];

/** First bytes of files that people take for data files, and what to do about each. */
const strangers: readonly (readonly [start: string, name: string, advice: string])[] = [
  ["\x1f\x8b", "a gzip archive", "unpack it first"],
  ["PK\x03\x04", "a zip archive", "unpack it first"],
  ["GRIB", "a GRIB file", "convert it to netCDF"],
  ["\x0e\x03\x13\x01", "an HDF4 file", "convert it to netCDF-4"],
  ["%PDF", "a PDF", "choose a data file"],
  ["\x89PNG", "a picture", "choose a data file"],
];

const headBytes = 2056;

/**
 * Opens a data file by its first bytes, whatever its name. Throws a Fault (tag "file") for a missing, unreadable or empty
 * file, a folder, text, a format not read here, and a file that is cut or damaged.
 */
export async function openContainer(path: string): Promise<Container> {
  const head = readHead(path);
  const format = fileFormats.find((candidate) => candidate.recognises(head));
  if (!format) throw notRecognised(path, head);
  return format.open(path);
}

function readHead(path: string): Uint8Array {
  let descriptor: number;
  try {
    descriptor = openSync(path, "r");
  } catch (error) {
    const missing = (error as NodeJS.ErrnoException).code === "ENOENT";
    const got = missing ? "no such file" : `${(error as NodeJS.ErrnoException).code}: it cannot be opened`;
    throw fileFault(path, "a data file", got, missing ? "check the path" : "check its permissions", error);
  }
  try {
    const status = fstatSync(descriptor);
    if (status.isDirectory()) throw fileFault(path, "a data file", "a folder", "name the files in it");
    if (!status.isFile()) throw fileFault(path, "a data file", "a device or pipe", "copy the data into a file");
    if (status.size === 0) throw fileFault(path, "a data file", "an empty file", "fetch it again");
    const head = new Uint8Array(Math.min(headBytes, status.size));
    return head.subarray(0, readSync(descriptor, head, 0, head.length, 0));
  } finally {
    closeSync(descriptor);
  }
}

function notRecognised(path: string, head: Uint8Array) {
  const expected = `${fileFormats.map(({ title }) => title).join(" or ")}`;
  const start = Buffer.from(head).toString("latin1");
  const stranger = strangers.find(([magic]) => start.startsWith(magic));
  if (stranger) return fileFault(path, expected, stranger[1], stranger[2]);
  if (/^\s*(<!doctype|<html|<\?xml)/i.test(start)) {
    return fileFault(path, expected, "a web page or XML", "the download gave an error page: fetch the file again");
  }
  const isText = head.every((byte) => byte >= 32 || (byte >= 9 && byte <= 13) || byte === 27);
  if (isText) return fileFault(path, expected, "a text file", "choose the data file itself");
  const bytes = [...head.subarray(0, 8)].map((byte) => byte.toString(16).padStart(2, "0")).join(" ");
  return fileFault(path, expected, `a file that starts with ${bytes}`, "choose a netCDF file or convert this one");
}
