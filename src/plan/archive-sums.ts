/*
 * The check sums that a ZIP archive states for its files. What unpacks archives does not compare them.
 * https://pkware.cachefly.net/webdocs/casestudies/APPNOTE.TXT, version 6.3.10.
 */

/** Signatures and lengths of 4.3.12 (a file's header in the directory), 4.3.14 to 4.3.16 (the ends of the directory). */
const HEADER = { signature: 0x02014b50, length: 46 };
const END = { signature: 0x06054b50, length: 22 };
const LONG_LOCATOR = { signature: 0x07064b50, length: 20 };
const LONG_END = { signature: 0x06064b50, length: 56 };
/** Longest comment after the end, bytes. */
const COMMENT = 0xffff;

/** The CRC-32 of every entry, in the order of the archive's directory; those of its readable beginning where the directory is damaged. */
export function statedSums(archive: Uint8Array): number[] {
  const view = new DataView(archive.buffer, archive.byteOffset, archive.byteLength);
  const sums: number[] = [];
  const { entries, offset } = directoryOf(view);
  let at = offset;
  while (sums.length < entries && has(view, at, HEADER)) {
    sums.push(view.getUint32(at + 16, true));
    const [name, extra, comment] = [28, 30, 32].map((field) => view.getUint16(at + field, true));
    at += HEADER.length + (name as number) + (extra as number) + (comment as number);
  }
  return sums;
}

function directoryOf(view: DataView): { readonly entries: number; readonly offset: number } {
  const last = view.byteLength - END.length;
  let end = last;
  while (end >= 0 && end >= last - COMMENT && !has(view, end, END)) end -= 1;
  if (!has(view, end, END)) return { entries: 0, offset: 0 };
  const long = longEnd(view, end - LONG_LOCATOR.length);
  return long ?? { entries: view.getUint16(end + 10, true), offset: view.getUint32(end + 16, true) };
}

/** The end of a directory that is too long for the short one; `null` where there is none. */
function longEnd(view: DataView, locator: number) {
  if (!has(view, locator, LONG_LOCATOR)) return null;
  const end = Number(view.getBigUint64(locator + 8, true));
  if (!has(view, end, LONG_END)) return null;
  return {
    entries: Number(view.getBigUint64(end + 32, true)),
    offset: Number(view.getBigUint64(end + 48, true)),
  };
}

function has(view: DataView, at: number, { signature, length }: typeof END): boolean {
  return at >= 0 && at + length <= view.byteLength && view.getUint32(at, true) === signature;
}
