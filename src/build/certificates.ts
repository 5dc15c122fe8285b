import { X509Certificate } from "node:crypto";
import { existsSync, mkdirSync, readFileSync, rmSync } from "node:fs";
import { join } from "node:path";
import { fileURLToPath } from "node:url";
import { generateCertificates, getHttpsServerOptions } from "office-addin-dev-certs";

/** What a server needs to speak https. */
export interface Certificate {
  readonly cert: Buffer;
  readonly key: Buffer;
  /** the system itself trusts it; if not, every browser asks once */
  readonly trusted: boolean;
}

const KEPT = fileURLToPath(new URL("../../node_modules/.cache/certificates", import.meta.url));
const DAY = 86_400_000;

/**
 * A certificate for localhost. Where Excel itself runs, the system is asked to trust it (it may ask for your password);
 * elsewhere that would take an administrator, so the browser is left to ask.
 *
 * @param platform  as process.platform has it
 * @param folder    where one that the system does not trust is kept
 */
export async function certificateFor(platform: string, folder = KEPT): Promise<Certificate> {
  if (platform === "win32" || platform === "darwin") {
    const { cert, key } = (await getHttpsServerOptions()) as { cert: Buffer; key: Buffer };
    return { cert, key, trusted: true };
  }
  const [authority, cert, key] = ["ca.crt", "localhost.crt", "localhost.key"].map((name) => join(folder, name)) as [string, string, string];
  if (!lasts(cert)) {
    rmSync(folder, { recursive: true, force: true });
    mkdirSync(folder, { recursive: true });
    await generateCertificates(authority, cert, key);
  }
  return { cert: readFileSync(cert), key: readFileSync(key), trusted: false };
}

function lasts(path: string): boolean {
  return existsSync(path) && Date.parse(new X509Certificate(readFileSync(path)).validTo) > Date.now() + DAY;
}
