import type { FieldDocument } from "../state/plan-document.ts";
import type { FieldAnswer, FieldPreview, FieldProgress, FieldSource } from "./protocol.ts";

/** The fields that were opened, by the name that plans use. */
export interface FieldShelf {
  open(
    ticket: number,
    source: FieldSource,
    field: FieldDocument,
    progress: (progress: FieldProgress) => void,
  ): Promise<FieldAnswer>;
  cancel(ticket: number): void;
  forget(name: string): void;
  preview(source: FieldSource, field: FieldDocument): Promise<FieldPreview>;
}

const PREVIEW_BYTES = 16_384;
const PREVIEW_ROWS = 6;

export function createFieldShelf(): FieldShelf {
  const cancelled = new Set<number>();
  const kept = new Map<string, number>();

  return {
    async open(ticket, source, field, progress) {
      const total = source.content.size;
      let read = 0;
      for await (const piece of pieces(source.content)) {
        if (cancelled.delete(ticket))
          return { ok: false, fault: `${source.name} was not read`, cancelled: true };
        read += piece.byteLength;
        progress({ readBytes: read, totalBytes: total });
      }
      kept.set(source.name, read);
      return { ok: false, fault: `${field.file}: the reader of fields is not joined yet`, cancelled: false };
    },
    cancel: (ticket) => cancelled.add(ticket),
    forget: (name) => kept.delete(name),
    async preview(source) {
      const text = await source.content.slice(0, PREVIEW_BYTES).text();
      const lines = text.split(/\r?\n/).filter((line) => line !== "" && !line.startsWith("#"));
      const [header = [], ...rows] = lines.slice(0, PREVIEW_ROWS + 1).map((line) => line.split(/[,;\t]/));
      return { header, rows, recognised: header.map(() => null), fault: null };
    },
  };
}

/** A file's bytes in pieces, as the core takes them. */
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
