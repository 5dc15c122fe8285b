/**
 * Puts text on the clipboard.
 *
 * @param text  the text
 * @returns     false where the page has no leave to
 */
export async function copyText(text: string): Promise<boolean> {
  try {
    await navigator.clipboard.writeText(text);
    return true;
  } catch {
    return false;
  }
}
