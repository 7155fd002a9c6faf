/** Text of a file: UTF-16 by its mark, UTF-8, else the western single-byte set, in which old loggers and spreadsheets write. */
export function decodeText(bytes: Uint8Array): string {
  const [first, second] = bytes;
  if (first === 0xff && second === 0xfe) return new TextDecoder('utf-16le').decode(bytes);
  if (first === 0xfe && second === 0xff) return new TextDecoder('utf-16be').decode(bytes);
  try {
    return new TextDecoder('utf-8', { fatal: true }).decode(bytes);
  } catch (error) {
    if (error instanceof TypeError) return new TextDecoder('windows-1252').decode(bytes);
    throw error;
  }
}
