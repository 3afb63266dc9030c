import type { FieldDocument } from "../state/plan-document.ts";
import { InputError } from "./core.ts";
import { faultText } from "./fault-text.ts";
import { fileKind, inspectField } from "./field-reading.ts";
import { pieces } from "./file-shelf.ts";
import type { FieldPreview } from "./protocol.ts";

const HEAD_BYTES = 65_536;
const SHOWN_ROWS = 6;

/** Reads the head of a file with a mapping of columns: what it would be, or why it can't be read. */
export async function previewField(content: Blob, field: FieldDocument): Promise<FieldPreview> {
  const head = await wholeLines(content);
  const isOtherKind = fileKind(new Uint8Array(await head.arrayBuffer())) !== null;
  const rows = isOtherKind ? [] : tableOf(await head.text());
  const [header = []] = rows;
  const shown = { header, rows: rows.slice(1, SHOWN_ROWS + 1), isOtherKind };
  try {
    const { ignoredColumns } = await inspectField(() => pieces(head), {
      file: field.file,
      role: field.role,
      ...(field.columns === undefined ? {} : { columns: field.columns }),
    });
    return { ...shown, used: header.filter((name) => !ignoredColumns.includes(name)), fault: null };
  } catch (fault) {
    if (!(fault instanceof InputError)) throw fault;
    return { ...shown, used: [], fault: await faultText(fault) };
  }
}

/** The beginning of a file up to the end of a line. */
async function wholeLines(content: Blob): Promise<Blob> {
  if (content.size <= HEAD_BYTES) return content;
  const bytes = new Uint8Array(await content.slice(0, HEAD_BYTES).arrayBuffer());
  const end = bytes.lastIndexOf(10);
  return content.slice(0, end === -1 ? HEAD_BYTES : end + 1);
}

/** Cells for the eye: quotes are taken off, notes left out. The reader's own rules are the core's. */
function tableOf(text: string): string[][] {
  const lines = text
    .replace(/^\uFEFF/, "")
    .split(/\r\n|\n|\r/)
    .filter((line) => line !== "" && !line.startsWith("#"))
    .slice(0, SHOWN_ROWS + 1);
  const first = lines[0] ?? "";
  const separator = [";", "\t", ","].find((mark) => first.includes(mark)) ?? ",";
  return lines.map((line) => line.split(separator).map((cell) => cell.trim().replace(/^"(.*)"$/, "$1")));
}
