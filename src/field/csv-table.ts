import Papa from "papaparse";
import { InputError } from "../errors.ts";
import type { TextBlock } from "./text-blocks.ts";

/** Text kept while a quoted cell stays open, in UTF-16 units: beyond it the quote is taken as never closed. */
const OPEN_QUOTE_LIMIT = 1 << 20;

const QUOTE_RULE = "a quoted cell ends with a quote before a separator or a line end; found none";

export type Separator = "," | ";" | "\t";

/** What stands before the rows of a table. */
export interface TableHead {
  /** Lines that begin with `#` before the header, without the `#`, trimmed. */
  readonly notes: readonly string[];
  /** As written, trimmed. */
  readonly headers: readonly string[];
  readonly headerLine: number;
  readonly separator: Separator;
}

/** Rows of cells that stand together in a table. */
export interface RowBatch {
  readonly rows: readonly (readonly string[])[];
  /** 1-based line on which a row of the batch begins. */
  lineOf(row: number): number;
}

/**
 * Turns blocks of text into rows of cells by RFC 4180. The head is read with the first block.
 *
 * Errors: no header, a quoted cell that is never closed or goes on after its closing quote.
 */
export class CsvTable {
  private readonly file: string;
  private tableHead: TableHead | null = null;
  private parser: InstanceType<typeof Papa.Parser> | null = null;
  private rest = "";
  private line = 1;

  constructor(file: string) {
    this.file = file;
  }

  /** Lines in the blocks taken so far. */
  get lines(): number {
    return this.line - 1 + occurrences(this.rest, "\n");
  }

  /** `null` until a header has been met. */
  get head(): TableHead | null {
    return this.tableHead;
  }

  /** The rows that a block completes; none while the header is still to come. */
  take(block: TextBlock): RowBatch {
    let text = this.rest + block.text;
    if (this.tableHead === null) {
      text = this.readHead(text, block.newline);
      if (this.parser === null) return { rows: [], lineOf: () => this.line };
    }
    const { data, errors, meta } = (this.parser as InstanceType<typeof Papa.Parser>).parse(text, 0, true);
    const batch = this.batch(data, text, block.newline, meta.cursor);
    // A fault in the row that the end of the block cuts is looked at again with the next block.
    const fault = errors.find((error) => error.row < data.length);
    if (fault !== undefined) {
      throw new InputError(QUOTE_RULE, { file: this.file, line: batch.lineOf(fault.row) });
    }
    this.rest = text.slice(meta.cursor);
    if (this.rest.length > OPEN_QUOTE_LIMIT) this.end();
    return batch;
  }

  /** To be called after the last block. */
  end(): void {
    if (this.rest !== "") {
      throw new InputError(QUOTE_RULE, { file: this.file, line: this.line });
    }
  }

  private batch(rows: string[][], text: string, newline: string, cursor: number): RowBatch {
    const first = this.line;
    const quoted = text.includes('"');
    this.line += quoted ? occurrences(text.slice(0, cursor), newline) : rows.length;
    const lineOf = (row: number): number => {
      if (!quoted) return first + row;
      const before = rows.slice(0, row).flat();
      return before.reduce((line, cell) => line + occurrences(cell, newline), first + row);
    };
    return { rows, lineOf };
  }

  /** Sets the head where the text has it, and returns what is left after it. */
  private readHead(text: string, newline: "\n" | "\r"): string {
    const notes = [...this.notesSoFar];
    let start = 0;
    for (;;) {
      const end = text.indexOf(newline, start);
      if (end < 0) break;
      const line = text.slice(start, end).trim();
      if (line !== "" && !line.startsWith("#")) break;
      if (line !== "") notes.push(line.slice(1).trim());
      start = end + 1;
      this.line++;
    }
    this.notesSoFar = notes;
    const left = text.slice(start);
    return left === "" ? "" : this.readHeader(left, newline, notes);
  }
  private notesSoFar: readonly string[] = [];

  private readHeader(text: string, newline: "\n" | "\r", notes: readonly string[]): string {
    const separator = separatorOf(text.slice(0, text.indexOf(newline)));
    const config = { delimiter: separator, newline };
    const header = new Papa.Parser({ ...config, preview: 1, fastMode: false }).parse(text, 0, true);
    const cells = header.data[0];
    const place = { file: this.file, line: this.line };
    if (cells === undefined || header.errors.length > 0) throw new InputError(QUOTE_RULE, place);
    this.tableHead = { notes, headers: cells.map((cell) => cell.trim()), headerLine: this.line, separator };
    this.parser = new Papa.Parser(config);
    this.line += occurrences(text.slice(0, header.meta.cursor), newline);
    return text.slice(header.meta.cursor);
  }
}

/** The separator that stands most often in a header outside quotes; of equals the semicolon, then the tab. */
function separatorOf(header: string): Separator {
  const bare = header.replace(/"[^"]*"/g, "");
  const candidates: readonly Separator[] = [";", "\t", ","];
  const counts = candidates.map((candidate) => occurrences(bare, candidate));
  return candidates[counts.indexOf(Math.max(...counts))] as Separator;
}

function occurrences(text: string, wanted: string): number {
  let count = 0;
  for (let at = text.indexOf(wanted); at >= 0; at = text.indexOf(wanted, at + 1)) count++;
  return count;
}
