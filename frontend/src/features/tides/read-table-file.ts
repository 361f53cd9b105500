/** What the server takes at most, in characters; a year of tides has under 100,000. */
export const LONGEST_TEXT = 5_000_000;

export type TableFile =
  | { readonly isRead: true; readonly text: string }
  | { readonly isRead: false; readonly whyNot: string };

const SPREADSHEET_NAME = /\.(?:xlsx?|xlsm|xlsb|ods|numbers)$/i;
/** How packed and older spreadsheet files begin, and PDF. */
const ZIP = [0x50, 0x4b, 0x03, 0x04];
const COMPOUND_FILE = [0xd0, 0xcf, 0x11, 0xe0];
const PDF = [0x25, 0x50, 0x44, 0x46];

/**
 * The text of a file that somebody chose, read in the browser; nothing is sent. Refuses what is
 * too large, a spreadsheet or a PDF in words that say what to do. Text that is no UTF-8 is read as
 * the older western encoding, as many a tide table still is.
 */
export async function readTableFile(file: File): Promise<TableFile> {
  if (file.size > LONGEST_TEXT) {
    return refuse(`${file.name} is far more than a year of tides. Choose a file under 5 MB.`);
  }
  const bytes = await bytesOf(file);
  if (bytes === null) {
    return refuse(
      `${file.name} could not be read. Look whether it is still there, and open to you.`,
    );
  }
  if (SPREADSHEET_NAME.test(file.name) || begins(bytes, ZIP) || begins(bytes, COMPOUND_FILE)) {
    return refuse(`${file.name} is a spreadsheet. Save it as text (CSV) there, then choose that.`);
  }
  if (begins(bytes, PDF)) {
    return refuse(`${file.name} is a PDF. Copy the rows out of it and paste them below.`);
  }
  return { isRead: true, text: decode(bytes) };
}

/** Null where the file has gone or is closed to the reader since it was chosen. */
async function bytesOf(file: File): Promise<Uint8Array | null> {
  try {
    return new Uint8Array(await file.arrayBuffer());
  } catch (error) {
    if (error instanceof DOMException) return null;
    throw error;
  }
}

function refuse(whyNot: string): TableFile {
  return { isRead: false, whyNot };
}

function begins(bytes: Uint8Array, mark: readonly number[]): boolean {
  return mark.every((byte, place) => bytes[place] === byte);
}

function decode(bytes: Uint8Array): string {
  if (begins(bytes, [0xff, 0xfe])) return new TextDecoder('utf-16le').decode(bytes);
  if (begins(bytes, [0xfe, 0xff])) return new TextDecoder('utf-16be').decode(bytes);
  try {
    return new TextDecoder('utf-8', { fatal: true }).decode(bytes);
  } catch (error) {
    if (error instanceof TypeError) return new TextDecoder('windows-1252').decode(bytes);
    throw error;
  }
}
