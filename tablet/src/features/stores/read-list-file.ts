/** More than the hub takes: it would only travel to be refused. */
const MOST_BYTES = 4_000_000;

/** The text of a list as spreadsheets write it: UTF-8, or the older code of Windows. */
export async function readListFile(file: File): Promise<string> {
  // Whatever is said of the size then, the schema says: the text is cut only so that the page does not choke on a film.
  const bytes = await file.slice(0, MOST_BYTES).arrayBuffer();
  try {
    return new TextDecoder('utf-8', { fatal: true }).decode(bytes);
  } catch {
    return new TextDecoder('windows-1252').decode(bytes);
  }
}
