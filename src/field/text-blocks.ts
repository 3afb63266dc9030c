import { InputError } from "../errors.ts";
import { fileKind } from "./file-kind.ts";

/**
 * Bytes worked on at once. The cells of a block of 64 KiB fit the processor's caches: blocks of 256 KiB read a fifth slower.
 */
const BLOCK_BYTES = 64 * 1024;

const LINE_FEED = 10;
const CARRIAGE_RETURN = 13;

/** Whole lines of a text file. */
export interface TextBlock {
  /** Ends with `newline`. */
  readonly text: string;
  readonly newline: "\n" | "\r";
  /** Bytes read so far, this block included. */
  readonly bytes: number;
}

/**
 * Cuts a file's bytes into blocks of whole lines and decodes them as UTF-8; a byte order mark is left out and a last line
 * without an end gets one. Where the blocks are cut does not depend on the pieces.
 *
 * @param linesTaken lines in the blocks before, asked only when there is a fault to place
 *
 * Errors: a file of another kind, bytes that are not UTF-8, a line longer than a block.
 */
export async function* textBlocks(
  pieces: AsyncIterable<Uint8Array>,
  file: string,
  linesTaken: () => number,
): AsyncGenerator<TextBlock, void, void> {
  const cutter = new BlockCutter(file, linesTaken);
  for await (const piece of pieces) {
    let taken = 0;
    while (taken < piece.length) {
      taken += cutter.fill(piece, taken);
      if (cutter.full) yield cutter.cut();
    }
  }
  if (!cutter.empty) yield cutter.rest();
}

class BlockCutter {
  private readonly file: string;
  private readonly linesTaken: () => number;
  private readonly buffer = new Uint8Array(BLOCK_BYTES);
  private readonly decoder = new TextDecoder("utf-8", { fatal: true, ignoreBOM: true });
  private length = 0;
  private bytes = 0;
  private lineEnd = 0;

  constructor(file: string, linesTaken: () => number) {
    this.file = file;
    this.linesTaken = linesTaken;
  }

  get full(): boolean {
    return this.length === BLOCK_BYTES;
  }

  get empty(): boolean {
    return this.length === 0;
  }

  /** Takes what fits of a piece from an offset on, and says how much. */
  fill(piece: Uint8Array, offset: number): number {
    const count = Math.min(piece.length - offset, BLOCK_BYTES - this.length);
    this.buffer.set(piece.subarray(offset, offset + count), this.length);
    this.length += count;
    return count;
  }

  cut(): TextBlock {
    this.refuseOtherKind();
    const end = this.buffer.lastIndexOf(this.settledLineEnd()) + 1;
    if (end === 0) {
      throw new InputError(`a line is at most ${BLOCK_BYTES} bytes long; found a longer one`, this.place(0));
    }
    const block = this.decode(end);
    this.buffer.copyWithin(0, end, this.length);
    this.length -= end;
    return block;
  }

  rest(): TextBlock {
    this.refuseOtherKind();
    const newline = this.settledLineEnd() === LINE_FEED ? "\n" : "\r";
    const block = this.decode(this.length);
    return block.text.endsWith(newline) ? block : { ...block, text: block.text + newline };
  }

  private refuseOtherKind(): void {
    if (this.bytes > 0) return;
    const kind = fileKind(this.buffer.subarray(0, this.length));
    if (kind === null) return;
    const { name, remedy } = kind;
    throw new InputError(`a field is a CSV file; found what looks like ${name}: ${remedy}`, {
      file: this.file,
    });
  }

  /** LF, alone or after CR, unless the first block knows only CR. */
  private settledLineEnd(): number {
    if (this.lineEnd === 0) {
      const head = this.buffer.subarray(0, this.length);
      this.lineEnd =
        !head.includes(LINE_FEED) && head.includes(CARRIAGE_RETURN) ? CARRIAGE_RETURN : LINE_FEED;
    }
    return this.lineEnd;
  }

  private decode(end: number): TextBlock {
    const lines = this.buffer.subarray(0, end);
    let text: string;
    try {
      text = this.decoder.decode(lines);
    } catch {
      throw new InputError(
        "the text is UTF-8; found bytes that are not",
        this.place(this.linesBeforeFault(lines)),
      );
    }
    if (this.bytes === 0 && text.startsWith("\uFEFF")) text = text.slice(1);
    this.bytes += end;
    return { text, newline: this.lineEnd === LINE_FEED ? "\n" : "\r", bytes: this.bytes };
  }

  private linesBeforeFault(lines: Uint8Array): number {
    let start = 0;
    for (let count = 0; start < lines.length; count++) {
      const found = lines.indexOf(this.settledLineEnd(), start);
      const end = found < 0 ? lines.length : found + 1;
      try {
        this.decoder.decode(lines.subarray(start, end));
      } catch {
        return count;
      }
      start = end;
    }
    return 0;
  }

  private place(linesBefore: number): { file: string; line: number } {
    return { file: this.file, line: 1 + this.linesTaken() + linesBefore };
  }
}
