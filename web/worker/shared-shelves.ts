import { type FieldReference, type FieldsRead, InputError, type Land, type LandFinder } from "./core.ts";
import type { FieldShelf } from "./field-shelf.ts";
import { type FileShelf, pieces } from "./file-shelf.ts";
import type { LandShelf } from "./land-shelf.ts";
import type { PlanSources } from "./plan-reader.ts";
import { type Remote, reach } from "./remote.ts";

/** What one worker lets another use, so that no file is read twice. Grids are copied once, when they are first asked for. */
export interface Shelves {
  file(name: string): Blob;
  fields(references: readonly FieldReference[]): Promise<FieldsRead>;
  land(): Land | null;
  /** Changes when a file of the same name is another. */
  revision(): number;
}

export function shelvesOf(files: FileShelf, fields: FieldShelf, land: LandShelf): Shelves {
  return {
    file: (name) => files.blob(name),
    fields: (references) => fields.merged(references),
    land: () => land.ready(),
    revision: () => fields.revision(),
  };
}

/** The sources behind a port, each kept once it has come. */
export function sourcesBehind(port: MessagePort): PlanSources {
  return sourcesOf(reach<Shelves>(port));
}

export function sourcesOf(shelves: Remote<Shelves>): PlanSources {
  let known: { readonly key: string; readonly fields: Promise<FieldsRead> } | null = null;
  let finder: LandFinder | null = null;
  return {
    files: {
      async *open(name) {
        yield* pieces(await shelves.file(name).catch(asInputError));
      },
    },
    fields: {
      async merged(references) {
        const key = JSON.stringify([await shelves.revision(), references]);
        if (known?.key === key) return known.fields;
        const fields = shelves.fields(references).catch(asInputError);
        known = { key, fields };
        fields.catch(() => {
          known = null;
        });
        return fields;
      },
    },
    land: async () => {
      const land = finder === null ? await shelves.land() : null;
      if (land !== null) finder ??= (await import("./land.ts")).landFinder(land);
      return finder;
    },
  };
}

/** What the user can mend loses its class on the way between workers, not its name. */
function asInputError(fault: unknown): never {
  if (fault instanceof Error && fault.name === "InputError") throw new InputError(fault.message);
  throw fault;
}
