/** A weather file's text: UTF-8 where it is that, else Latin 1, in which older files spell their stations. */
export function fileText(bytes: Uint8Array): string {
  try {
    return new TextDecoder('utf-8', { fatal: true }).decode(bytes);
  } catch {
    return new TextDecoder('latin1').decode(bytes);
  }
}
