import { InputError } from "../errors.ts";
import { writtenInstant } from "../instant.ts";
import type { GridFile, GridMember } from "./grid-file.ts";
import { type FoundAxes, GridLayout, type OrderedAxis } from "./grid-layout.ts";
import type { GridSlice } from "./grid-slice.ts";
import { type GridStore, LEAST_SHARE } from "./grid-store.ts";
import { longitudeAxis } from "./longitude-axis.ts";

export type AssembledGrid = Pick<
  GridFile,
  "lon" | "lat" | "height" | "times" | "slices" | "gusts" | "masks" | "members" | "global"
>;

/** Error: fewer than one node in twenty given. */
export function refuseScattered(share: number, axes: FoundAxes, file: string): void {
  if (share * LEAST_SHARE >= 1) return;
  const sizes = [axes.members?.numbers ?? null, axes.times, axes.height, axes.lat, axes.lon].flatMap(
    (axis) => (axis === null ? [] : [axis.length]),
  );
  const found = `one in ${Math.round(1 / share)} of ${sizes.join(" × ")}`;
  throw new InputError(
    `the rows are not a grid: at least one node in ${LEAST_SHARE} is given; found ${found}`,
    { file },
  );
}

/**
 * Orders a store's nodes along ascending axes and tells the missing ones apart. The store's slices are taken over.
 *
 * Error: a meridian given under two longitudes with different values.
 */
export function assembleGrid(store: GridStore, axes: FoundAxes, file: string): AssembledGrid {
  const { lon, sources, global } = longitudeAxis(axes.lon);
  const lat = ordered(axes.lat);
  const height = axes.height === null ? null : ordered(axes.height);
  const times = axes.times === null ? null : ordered(axes.times);
  const layout = new GridLayout(store, sources, lat, height, { file, axes });
  const members: GridMember[] = [];
  for (const { member, slices } of orderedSlices(times, axes, file))
    members.push(takeMember(member, slices, store, layout, members.at(-1)?.masks.at(-1) ?? null));
  const { member: _, ...control } = members[0] as GridMember;
  return {
    lon,
    lat: lat.values,
    height: height?.values ?? null,
    times: times?.values ?? null,
    ...control,
    ...(axes.members === null ? {} : { members }),
    global,
  };
}

/** Indices of a member's slices in the order of the times. */
interface MemberOrder {
  readonly member: number;
  readonly slices: readonly number[];
}

/** The slices of every member in order; of the one member 0 where the file has no members. */
function orderedSlices(times: OrderedAxis | null, { members }: FoundAxes, file: string): MemberOrder[] {
  const order = [...(times?.sources ?? [0])];
  if (members === null) return [{ member: 0, slices: order }];
  const { values, sources } = ordered(members.numbers);
  return Array.from(sources, (source, index) => {
    const member = values[index] as number;
    const slices = order.map((time, at) => {
      const slice = members.slices.find(source, time);
      if (slice !== undefined) return slice;
      const moment = writtenInstant(times?.values[at] as number);
      throw new InputError(
        `every member has every valid time; found none of ${moment} for member ${member}`,
        {
          file,
        },
      );
    });
    return { member, slices };
  });
}

/** @param before the mask of the slice before, which serves again where it is the same */
function takeMember(
  member: number,
  order: readonly number[],
  store: GridStore,
  layout: GridLayout,
  before: Uint8Array | null,
): GridMember {
  const slices: Float64Array[] = [];
  const gusts: Float64Array[] = [];
  const masks: (Uint8Array | null)[] = [];
  for (const index of order) {
    const slice = layout.take(store.slices[index] as GridSlice);
    delete store.slices[index];
    slices.push(slice.values);
    if (slice.gusts !== null) gusts.push(slice.gusts);
    masks.push(shared(slice.mask, masks.length === 0 ? before : (masks.at(-1) ?? null)));
  }
  return { member, slices, gusts: gusts.length === 0 ? null : gusts, masks };
}

function ordered(found: readonly number[]): OrderedAxis {
  const sources = Int32Array.from(found.keys()).sort((a, b) => (found[a] as number) - (found[b] as number));
  return { sources, values: Float64Array.from(sources, (index) => found[index] as number) };
}

/** The mask before where it is the same: land stays where it is through a file, and one mask does for all times. */
function shared(mask: Uint8Array | null, before: Uint8Array | null): Uint8Array | null {
  if (mask === null || before === null) return mask;
  return mask.every((state, node) => state === before[node]) ? before : mask;
}
