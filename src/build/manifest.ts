import { DEVELOPMENT, type Form } from "./form.js";

/** Excel knows an add-in by this number: a new one would be another add-in, and nobody's copy would be updated. */
const RELEASED_ID = "9d01fd15-6c5f-498c-a780-d730b1d90afc";

/**
 * The manifest for one form. manifest.xml is the development form as it stands; the released one differs in id, name,
 * namespace and addresses, and in nothing else.
 *
 * @param source  text of manifest.xml
 * @param form    which add-in, and where it is served
 */
export function manifestFor(source: string, form: Form): string {
  if (form.namespace === DEVELOPMENT.namespace) return source;
  const base = inXml(form.base);
  return source
    .replace(/<!--[^]*?-->\s*/g, "")
    .replace(/<Id>[^<]*<\/Id>/, () => `<Id>${RELEASED_ID}</Id>`)
    .replaceAll(" (development)", "")
    .replaceAll(DEVELOPMENT.namespace, form.namespace)
    .replaceAll(DEVELOPMENT.base, () => base)
    .replaceAll(new URL(DEVELOPMENT.base).origin, () => new URL(form.base).origin);
}

function inXml(text: string): string {
  return text.replace(/&/g, "&amp;").replace(/</g, "&lt;").replace(/"/g, "&quot;");
}
