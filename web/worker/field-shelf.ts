import type { FieldDocument } from "../state/plan-document.ts";
import {
  type Field,
  type FieldInspection,
  type FieldReference,
  type GridFile,
  InputError,
  mergeField,
} from "./core.ts";
import type { FileShelf } from "./file-shelf.ts";
import type { FieldAnswer, FieldProgress } from "./protocol.ts";

/** Thrown into a reading that the user has cancelled. */
class Cancelled extends Error {
  override readonly name = "Cancelled";
}

/** The grids that were read, each once, and the fields that the plan makes of them. */
export interface FieldShelf {
  open(
    ticket: number,
    field: FieldDocument,
    progress: (progress: FieldProgress) => void,
  ): Promise<FieldAnswer>;
  cancel(ticket: number): void;
  forget(file: string): void;
  /** The fields of a plan; the same objects as long as its references stay the same. */
  merged(references: readonly FieldReference[]): Promise<readonly Field[]>;
  /** The fields merged last. */
  current(): readonly Field[];
}

type Reading = Pick<FieldReference, "role" | "file" | "columns">;

interface Read {
  readonly file: string;
  readonly grid: Promise<GridFile>;
}

export function createFieldShelf(files: FileShelf): FieldShelf {
  const grids = new Map<string, Read>();
  const cancelled = new Set<number>();
  let last: { readonly key: string; readonly fields: readonly Field[] } = { key: "[]", fields: [] };

  const grid = (reading: Reading, onProgress: (bytes: number) => void): Promise<GridFile> => {
    const { role, file, columns } = reading;
    const key = JSON.stringify([role, file, columns]);
    const known = grids.get(key);
    if (known !== undefined) return known.grid;
    const read = import("./field-reading.ts").then(({ readGridFile }) =>
      readGridFile(() => files.open(file), { file, role, columns, onProgress }),
    );
    grids.set(key, { file, grid: read });
    // What failed is not kept: the file may be given again.
    read.catch(() => grids.delete(key));
    return read;
  };

  return {
    async open(ticket, { role, file, columns = {} }, progress) {
      try {
        const totalBytes = files.size(file);
        const read = await grid({ role, file, columns }, (readBytes) => {
          if (cancelled.has(ticket)) throw new Cancelled();
          progress({ readBytes, totalBytes });
        });
        return { ok: true, inspection: await inspectionOf(read) };
      } catch (fault) {
        if (fault instanceof Cancelled) return { ok: false, fault: `${file} was not read`, cancelled: true };
        if (fault instanceof InputError) return { ok: false, fault: fault.message, cancelled: false };
        throw fault;
      } finally {
        cancelled.delete(ticket);
      }
    },
    cancel: (ticket) => cancelled.add(ticket),
    forget(file) {
      for (const [key, read] of grids) if (read.file === file) grids.delete(key);
      last = { key: "[]", fields: [] };
    },
    async merged(references) {
      const key = JSON.stringify(references);
      if (key === last.key) return last.fields;
      const sources = await Promise.all(
        references.map(async ({ gaps, beyond, outside, ...reading }) => ({
          grid: await grid(reading, () => undefined),
          gaps,
          beyond,
          outside,
        })),
      );
      const roles = [...new Set(references.map(({ role }) => role))];
      const fields = roles.map((role) =>
        mergeField(
          role,
          sources.filter((source) => source.grid.role === role),
        ),
      );
      last = { key, fields };
      return fields;
    },
    current: () => last.fields,
  };
}

const inspections = new WeakMap<GridFile, FieldInspection>();

/** Made once, before a gap policy fills the grid. */
async function inspectionOf(grid: GridFile): Promise<FieldInspection> {
  const known = inspections.get(grid);
  if (known !== undefined) return known;
  const { inspectGrid } = await import("./field-reading.ts");
  const made = inspectGrid(grid);
  inspections.set(grid, made);
  return made;
}
