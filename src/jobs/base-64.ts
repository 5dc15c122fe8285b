const SLICE = 0x6000; // divisible by 3, and few enough arguments for one call

/** Figures as text that any file or cell can hold, bit for bit, the least significant byte first on every machine. */
export function base64Of(values: Float64Array): string {
  const bytes = new Uint8Array(8 * values.length);
  const view = new DataView(bytes.buffer);
  values.forEach((value, k) => view.setFloat64(8 * k, value, true));
  let text = "";
  for (let at = 0; at < bytes.length; at += SLICE) text += btoa(String.fromCharCode(...bytes.subarray(at, at + SLICE)));
  return text;
}

/**
 * The figures of such a text.
 *
 * @returns undefined for a text that is none
 */
export function figuresOf(text: string): Float64Array | undefined {
  let bytes: string;
  try {
    bytes = atob(text);
  } catch {
    return undefined;
  }
  if (bytes.length % 8 !== 0) return undefined;
  const view = new DataView(new ArrayBuffer(bytes.length));
  for (let at = 0; at < bytes.length; at++) view.setUint8(at, bytes.charCodeAt(at));
  return Float64Array.from({ length: bytes.length / 8 }, (_, k) => view.getFloat64(8 * k, true));
}
