import type { PlanDocument, RouteDocument } from "../state/plan-document.ts";
import { InputError, importRoutes, readArchive, writeArchive } from "./core.ts";
import type { ArchiveAnswer, RoutesAnswer, WrittenArchive } from "./protocol.ts";

/* Files of other kinds than a plan, read and written away from the page, since a large one takes a while. */

/** Largest archive that is taken into memory, bytes. */
const LARGEST = 500_000_000;

export async function readRoutes(name: string, content: Blob): Promise<RoutesAnswer> {
  return orFault(async () => {
    const { routes, notes } = importRoutes(await content.text(), name);
    return { ok: true, routes: routes as readonly RouteDocument[], notes };
  });
}

export async function openArchive(name: string, content: Blob): Promise<ArchiveAnswer> {
  return orFault(async () => {
    if (content.size > LARGEST) {
      const size = Math.round(content.size / 1e6);
      throw new InputError(`an archive is at most ${LARGEST / 1e6} MB; found ${size} MB`, { file: name });
    }
    const { plan, files } = readArchive(new Uint8Array(await content.arrayBuffer()), name);
    const blobs = [...files].map(
      ([file, bytes]) => [file, new Blob([bytes as Uint8Array<ArrayBuffer>])] as const,
    );
    return { ok: true, plan, files: new Map(blobs) };
  });
}

/** @param blob gives a file that the plan names. @throws InputError where it has none */
export async function packArchive(
  plan: PlanDocument,
  stem: string,
  blob: (name: string) => Blob,
): Promise<WrittenArchive> {
  return orFault(async () => {
    const { craft, fields = [] } = plan;
    const named = [
      ...("file" in craft && typeof craft.file === "string" ? [craft.file] : []),
      ...fields.map(({ file }) => file),
    ];
    const contents = new Map<string, Uint8Array>();
    for (const name of named) contents.set(name, new Uint8Array(await blob(name).arrayBuffer()));
    const document = plan as Parameters<typeof writeArchive>[0];
    const bytes = writeArchive(document, stem, (name) => contents.get(name) ?? new Uint8Array());
    return { ok: true, content: new Blob([bytes as Uint8Array<ArrayBuffer>], { type: "application/zip" }) };
  });
}

async function orFault<T>(
  answer: () => Promise<T>,
): Promise<T | { readonly ok: false; readonly fault: string }> {
  try {
    return await answer();
  } catch (fault) {
    if (fault instanceof InputError) return { ok: false, fault: fault.message };
    throw fault;
  }
}
