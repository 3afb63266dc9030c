import { InputError } from "../errors.ts";
import { writtenInstant } from "../instant.ts";
import { type ColumnMapping, type Columns, findColumns } from "./columns.ts";
import { CsvTable } from "./csv-table.ts";
import type { FieldRole } from "./field.ts";
import { assembleGrid, refuseScattered } from "./grid-assembly.ts";
import type { GridFile } from "./grid-file.ts";
import { GridStore, type NodeIndices } from "./grid-store.ts";
import { longitudeAxis } from "./longitude-axis.ts";
import { type NodeSink, RowReader } from "./row-reader.ts";
import { textBlocks } from "./text-blocks.ts";

export interface GridFileOptions {
  /** Name for messages. */
  readonly file: string;
  readonly role: FieldRole;
  /** Our name of a column → its header in the file. */
  readonly columns?: ColumnMapping;
  /** Told the bytes read so far, after every quarter of a megabyte. */
  readonly onProgress?: (bytes: number) => void;
}

/**
 * Reads a field file (CSV, one row a node and time and level) into its grid, in one pass.
 *
 * @param open yields the file's bytes in pieces; called again only to tell the lines of a node that is given twice
 *
 * Errors (InputError with the file, and the line where there is one): text that is not UTF-8 or not a table, columns
 * missing or at odds, a cell that breaks its rule, a node given twice, rows that are not a grid, no rows at all.
 *
 * @example
 * const open = async function* () { yield new TextEncoder().encode("lat,lon,u,v\n50,-5,3,4\n50,-4,5,6"); };
 * [...(await readGridFile(open, { file: "wind.csv", role: "wind" })).lon] // → [-5, -4]
 */
export async function readGridFile(
  open: () => AsyncIterable<Uint8Array>,
  options: GridFileOptions,
): Promise<GridFile> {
  const { file, role } = options;
  let store: GridStore | null = null;
  const scan = await scanNodes(open(), options, 1, (columns, reader) => {
    store = new GridStore(columns.gust !== null, () => longitudeAxis(reader.axes.lon).global);
    return store;
  });
  // The compiler does not follow the assignment in the callback.
  const filled = store as GridStore | null;
  if (filled === null || filled.rows === 0) {
    throw new InputError("the file has rows below its header; found none", { file });
  }
  const { axes } = scan.reader;
  if (filled.repeated === null) refuseScattered(filled.share, axes, file);
  if (filled.repeated !== null || !filled.settle()) {
    throw await repeatedNode(open, options, filled.repeated as unknown as NodeIndices);
  }
  return {
    file,
    role,
    ...assembleGrid(filled, axes, file),
    ignoredColumns: scan.columns.ignored,
    notes: scan.notes,
    bytes: scan.bytes,
  };
}

interface Scan {
  readonly columns: Columns;
  readonly notes: readonly string[];
  readonly reader: RowReader;
  readonly bytes: number;
  /** Lines of the rows to which the sink answered `false`. */
  readonly toldLines: readonly number[];
}

/** Reads a file's rows into a sink, until its end or until the sink has told so many rows. */
async function scanNodes(
  pieces: AsyncIterable<Uint8Array>,
  options: GridFileOptions,
  enoughLines: number,
  sinkFor: (columns: Columns, reader: RowReader) => NodeSink,
): Promise<Scan> {
  const { file, role, columns: mapping = {}, onProgress } = options;
  const table = new CsvTable(file);
  const toldLines: number[] = [];
  let columns: Columns | null = null;
  let reader: RowReader | null = null;
  let sink: NodeSink | null = null;
  let bytes = 0;
  for await (const block of textBlocks(pieces, file, () => table.lines)) {
    const batch = table.take(block);
    bytes = block.bytes;
    onProgress?.(bytes);
    if (table.head === null) continue;
    columns ??= findColumns(table.head, role, mapping, file);
    reader ??= new RowReader(columns, table.head.separator, role, file);
    sink ??= sinkFor(columns, reader);
    for (let row = reader.read(batch, 0, sink); row >= 0; row = reader.read(batch, row + 1, sink)) {
      toldLines.push(batch.lineOf(row));
      if (toldLines.length === enoughLines) break;
    }
    if (toldLines.length === enoughLines) break;
  }
  if (columns === null || reader === null)
    throw new InputError("the file has a header; found none", { file });
  if (toldLines.length < enoughLines) table.end();
  return { columns, notes: table.head?.notes ?? [], reader, bytes, toldLines };
}

/** The error of a node that is given twice: the file is read again up to the second of its lines. */
async function repeatedNode(
  open: () => AsyncIterable<Uint8Array>,
  options: GridFileOptions,
  node: NodeIndices,
): Promise<InputError> {
  const { onProgress: _, ...quietly } = options;
  const { toldLines, reader } = await scanNodes(open(), quietly, 2, () => ({
    put: (time, level, lat, lon) =>
      !(time === node.time && level === node.level && lat === node.lat && lon === node.lon),
  }));
  const { lat, lon, times, height, members } = reader.axes;
  const of = members === null ? { time: node.time, member: 0 } : members.slices.of(node.time);
  const parts = [`latitude ${lat[node.lat]}`, `longitude ${lon[node.lon]}`];
  if (height !== null) parts.push(`height ${Math.round(height[node.level] as number)} m`);
  if (times !== null) parts.push(`time ${writtenInstant(times[of.time] as number)}`);
  if (members !== null) parts.push(`member ${members.numbers[of.member]}`);
  const found = `found ${parts.join(", ")} on lines ${toldLines.join(" and ")}`;
  return new InputError(`a node is given once; ${found}`, {
    file: options.file,
    line: toldLines[1] ?? toldLines[0] ?? 1,
  });
}
