/** A strict reader of RFC 4180: CR LF ends a record, a quote stands only where the grammar has one; every record is ended. */
export function readCsv(text: string): string[][] {
  const field = /(?:"((?:[^"]|"")*)"|([^",\r\n]*))(,|\r\n)/y;
  const rows: string[][] = [];
  let row: string[] = [];
  while (field.lastIndex < text.length) {
    const at = field.lastIndex;
    const match = field.exec(text);
    if (match === null) throw new Error(`not RFC 4180 at ${at}: ${JSON.stringify(text.slice(at, at + 40))}`);
    row.push(match[1] === undefined ? (match[2] ?? "") : match[1].replaceAll('""', '"'));
    if (match[3] === "\r\n") {
      rows.push(row);
      row = [];
    }
  }
  return rows;
}
