import { InputError } from "./core.ts";

/** The files that the plan names, as the user gave them. */
export interface FileShelf {
  keep(name: string, content: Blob): void;
  forget(name: string): void;
  size(name: string): number;
  /** @throws InputError where there is no such file */
  blob(name: string): Blob;
  /** A file's bytes in pieces. @throws InputError where there is no such file */
  open(name: string): AsyncIterable<Uint8Array>;
}

export function createFileShelf(): FileShelf {
  const files = new Map<string, Blob>();
  const find = (name: string): Blob => {
    const found = files.get(name);
    if (found === undefined) throw new InputError(`the plan names "${name}"; open that file too`);
    return found;
  };
  return {
    keep: (name, content) => files.set(name, content),
    forget: (name) => files.delete(name),
    size: (name) => find(name).size,
    blob: find,
    open: (name) => pieces(find(name)),
  };
}

/** A file's bytes in pieces, as the core takes them; between two the worker can hear a cancellation. */
export async function* pieces(content: Blob): AsyncGenerator<Uint8Array> {
  const reader = content.stream().getReader();
  try {
    for (;;) {
      const { done, value } = await reader.read();
      if (done) return;
      yield value;
    }
  } finally {
    reader.releaseLock();
  }
}
