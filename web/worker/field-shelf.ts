import type { FieldDocument } from "../state/plan-document.ts";
import {
  type Field,
  type FieldInspection,
  type FieldReference,
  type FieldsRead,
  type GridFile,
  InputError,
} from "./core.ts";
import { faultText } from "./fault-text.ts";
import type { FileShelf } from "./file-shelf.ts";
import type { FieldAnswer, FieldProgress } from "./protocol.ts";

/** Thrown into a reading that the user has cancelled. */
class Cancelled extends Error {
  override readonly name = "Cancelled";
}

/** Gives the fields of a plan. */
export interface FieldSource {
  /** The same objects as long as the references stay the same. */
  merged(references: readonly FieldReference[]): Promise<FieldsRead>;
}

/** The grids that were read, each once, and the fields that the plan makes of them. */
export interface FieldShelf extends FieldSource {
  open(
    ticket: number,
    field: FieldDocument,
    progress: (progress: FieldProgress) => void,
  ): Promise<FieldAnswer>;
  cancel(ticket: number): void;
  forget(file: string): void;
  /** Counts what was forgotten: as long as it is the same, so are the files. */
  revision(): number;
  /** The fields merged last. */
  current(): readonly Field[];
}

type Reading = Pick<FieldReference, "role" | "file" | "columns">;

interface Read {
  readonly file: string;
  readonly grid: Promise<GridFile>;
}

const NOTHING_READ: { readonly key: string; readonly read: FieldsRead } = {
  key: "[]",
  read: { fields: [], members: [] },
};

export function createFieldShelf(files: FileShelf): FieldShelf {
  const grids = new Map<string, Read>();
  const cancelled = new Set<number>();
  let last = NOTHING_READ;
  let revision = 0;

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
        if (fault instanceof InputError)
          return { ok: false, fault: await faultText(fault), cancelled: false };
        throw fault;
      } finally {
        cancelled.delete(ticket);
      }
    },
    cancel: (ticket) => cancelled.add(ticket),
    forget(file) {
      for (const [key, read] of grids) if (read.file === file) grids.delete(key);
      last = NOTHING_READ;
      revision += 1;
    },
    async merged(references) {
      const key = JSON.stringify(references);
      if (key === last.key) return last.read;
      const { mergeSources, roleSource } = await import("./field-reading.ts");
      const sources = await Promise.all(
        references.map(async (reference) => roleSource(await grid(reference, () => undefined), reference)),
      );
      last = { key, read: mergeSources(sources) };
      return last.read;
    },
    revision: () => revision,
    current: () => last.read.fields,
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
