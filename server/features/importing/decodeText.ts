/** Bytes as text: UTF-16 with its mark, UTF-8, else windows-1252, which reads any bytes. */
export function decodeText(bytes: Uint8Array): string {
  if (bytes[0] === 0xff && bytes[1] === 0xfe) return new TextDecoder('utf-16le').decode(bytes)
  if (bytes[0] === 0xfe && bytes[1] === 0xff) return new TextDecoder('utf-16be').decode(bytes)
  try {
    return new TextDecoder('utf-8', { fatal: true }).decode(bytes)
  } catch (error) {
    // Not UTF-8: what older programs of one country wrote.
    if (error instanceof TypeError) return new TextDecoder('windows-1252').decode(bytes)
    throw error
  }
}
