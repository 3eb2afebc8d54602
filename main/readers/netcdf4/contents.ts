import type { Metadata } from "h5wasm/node";
import type { VariableInfo } from "../container";
import { baseName } from "../container";
import { readAttribute, readAttributes } from "./attributes";
import { callHdf5 } from "./library";
import { storedType, typeClass } from "./types";

/** Kinds of a link's target (H5G_obj_t). */
const linkKind = { group: 0, dataset: 1, userDefined: 4 } as const;

export interface Contents {
  readonly variables: readonly VariableInfo[];
  readonly dimensions: readonly { readonly name: string; readonly length: number }[];
}

interface Dataset {
  readonly objectPath: string;
  readonly metadata: Metadata;
  readonly shape: readonly number[];
  /** Name of the dimension scale it is; null where it is none. */
  readonly scaleName: string | null;
}

/** By this a netCDF-4 writer marks a dimension that has no variable. */
const dimensionOnly = /^This is a netCDF dimension but not a netCDF variable/;

/**
 * The variables of the root group and of the groups in it, with their dimensions' names: from the attached dimension
 * scales, for a scale from its own name, in plain HDF5 from a one-dimensional data set of that length. Links to other
 * files are left out.
 */
export function readContents(path: string, fileId: bigint): Contents {
  const datasets: Dataset[] = [];
  for (const [objectPath, kind] of children(path, fileId, "/")) {
    if (kind === linkKind.dataset) datasets.push(describeDataset(path, fileId, objectPath));
    if (kind !== linkKind.group) continue;
    for (const [inner, innerKind] of children(path, fileId, objectPath)) {
      if (innerKind === linkKind.dataset) datasets.push(describeDataset(path, fileId, inner));
    }
  }
  const variables: VariableInfo[] = [];
  const lengths = new Map<string, number>();
  for (const dataset of datasets) {
    const dimensions = dimensionNames(path, fileId, dataset, datasets);
    dimensions.forEach((name, i) => {
      lengths.set(name, dataset.shape[i]);
    });
    const type = storedType(dataset.metadata);
    if (type === null || (dataset.scaleName !== null && dimensionOnly.test(dataset.scaleName))) continue;
    variables.push(variable(path, fileId, dataset, type, dimensions));
  }
  return { variables, dimensions: [...lengths].map(([name, length]) => ({ name, length })) };
}

function children(path: string, fileId: bigint, group: string): [objectPath: string, kind: number][] {
  return callHdf5(path, group, (library) =>
    library.get_names(fileId, group, false).map((name) => {
      const objectPath = `${group === "/" ? "" : group}/${name}`;
      // A soft or external link answers with its own kind: it is not followed to see what it leads to.
      const external = library.get_external_link(fileId, objectPath);
      return [objectPath, external.filename ? linkKind.userDefined : library.get_type(fileId, objectPath)];
    }),
  );
}

function describeDataset(path: string, fileId: bigint, objectPath: string): Dataset {
  return callHdf5(path, objectPath.slice(1), (library) => {
    const metadata = library.get_dataset_metadata(fileId, objectPath);
    const shape = [...(metadata.shape ?? [0])];
    return { objectPath, metadata, shape, scaleName: library.get_scale_name(fileId, objectPath) };
  });
}

function variable(
  path: string,
  fileId: bigint,
  { objectPath, metadata, shape }: Dataset,
  type: VariableInfo["type"],
  dimensions: readonly string[],
): VariableInfo {
  const chunks = metadata.chunks ? [...metadata.chunks] : null;
  let attributes: VariableInfo["attributes"] | null = null;
  return {
    name: objectPath.slice(1),
    type,
    shape,
    dimensions,
    chunks,
    get attributes() {
      attributes ??= withBooleans(readAttributes(path, fileId, objectPath), metadata);
      return attributes;
    },
  };
}

/** Enumerated values keep their meaning as CF flags where the file gives none. */
function withBooleans(attributes: VariableInfo["attributes"], metadata: Metadata): VariableInfo["attributes"] {
  if (metadata.type !== typeClass.enumeration || !metadata.enum_type || "flag_meanings" in attributes)
    return attributes;
  const { members } = metadata.enum_type;
  const flags = Int32Array.from(Object.values(members));
  return { ...attributes, flag_values: flags, flag_meanings: Object.keys(members).join(" ") };
}

function dimensionNames(path: string, fileId: bigint, dataset: Dataset, all: readonly Dataset[]): string[] {
  const { objectPath, shape, scaleName } = dataset;
  if (scaleName !== null && shape.length === 1) return [baseName(objectPath)];
  const attached = callHdf5(path, objectPath.slice(1), (library) =>
    scaleName === null ? shape.map((_, i) => library.get_attached_scales(fileId, objectPath, i)[0]) : [],
  );
  // A coordinate variable of several dimensions is a scale itself and lists its dimensions by number.
  const numbers = scaleName === null ? null : readNumbers(path, fileId, objectPath, "_Netcdf4Coordinates");
  return shape.map((length, i) => {
    if (attached[i]) return baseName(attached[i]);
    const numbered = numbers && all.find((other) => scaleNumber(path, fileId, other) === numbers[i]);
    if (numbered) return baseName(numbered.objectPath);
    const alike = all.filter((other) => other.shape.length === 1 && other.shape[0] === length);
    return alike.length === 1 ? baseName(alike[0].objectPath) : `length_${length}`;
  });
}

function scaleNumber(path: string, fileId: bigint, { objectPath, scaleName }: Dataset): number | undefined {
  if (scaleName === null) return undefined;
  return readNumbers(path, fileId, objectPath, "_Netcdf4Dimid")?.[0];
}

function readNumbers(path: string, fileId: bigint, objectPath: string, name: string): number[] | null {
  const names = callHdf5(path, objectPath.slice(1), (library) => library.get_attribute_names(fileId, objectPath));
  const value = names.includes(name) ? readAttribute(path, fileId, objectPath, name) : null;
  return value !== null && ArrayBuffer.isView(value) ? Array.from(value as ArrayLike<number>, Number) : null;
}
