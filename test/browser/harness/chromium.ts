import { spawnSync } from "node:child_process";
import { chmodSync, createReadStream, createWriteStream, existsSync, mkdirSync, mkdtempSync, readFileSync, renameSync, rmSync, writeFileSync } from "node:fs";
import { createRequire } from "node:module";
import { dirname, join } from "node:path";
import { pipeline } from "node:stream/promises";
import { createBrotliDecompress } from "node:zlib";

/** Where a browser stands that was unpacked from its npm package, and what it needs around it. */
export interface UnpackedBrowser {
  readonly executable: string;
  readonly environment: Record<string, string>;
}

/**
 * Unpacks the browser from its npm package into a folder of our own, once for each version. The package's own unpacking
 * takes any file of that name already in the temporary folder, which may be another version.
 */
export async function unpackBrowser(): Promise<UnpackedBrowser> {
  const packed = join(packageFolder("@sparticuz/chromium"), "bin");
  const version = (JSON.parse(readFileSync(join(packed, "../package.json"), "utf8")) as { version: string }).version;
  const cache = join(packageFolder("playwright-core"), "../.cache");
  const home = join(cache, `test-browser-${version}`);
  if (!existsSync(home)) {
    mkdirSync(cache, { recursive: true });
    // unpacked aside and renamed, so that an interrupted or parallel run never leaves half a browser under the final name
    const aside = mkdtempSync(`${home}-`);
    await unpackFile(join(packed, "chromium.br"), join(aside, "chromium"));
    chmodSync(join(aside, "chromium"), 0o755);
    for (const archive of ["al2023.tar", "fonts.tar", "swiftshader.tar"]) {
      await unpackFile(join(packed, `${archive}.br`), join(aside, archive));
      const target = archive === "swiftshader.tar" ? aside : join(aside, archive.replace(".tar", ""));
      mkdirSync(target, { recursive: true });
      const tar = spawnSync("tar", ["-xf", join(aside, archive), "-C", target]);
      if (tar.status !== 0) throw new Error(`tar could not unpack ${archive}: ${String(tar.stderr)}`);
      rmSync(join(aside, archive));
    }
    writeFileSync(join(aside, "fonts/fonts.conf"), fontsIn(home));
    try {
      renameSync(aside, home);
    } catch (error) {
      rmSync(aside, { recursive: true });
      if (!existsSync(home)) throw error;
    }
  }
  return {
    executable: join(home, "chromium"),
    environment: { LD_LIBRARY_PATH: join(home, "al2023/lib"), FONTCONFIG_PATH: join(home, "fonts") },
  };
}

// the package's own file names folders of another kind of machine; only its one family, so that pictures are alike everywhere
function fontsIn(home: string): string {
  return `<?xml version="1.0"?>
<!DOCTYPE fontconfig SYSTEM "fonts.dtd">
<fontconfig>
  <dir>${home}/fonts/fonts</dir>
  <cachedir>${home}/fonts/cache</cachedir>
</fontconfig>
`;
}

async function unpackFile(from: string, to: string): Promise<void> {
  await pipeline(createReadStream(from), createBrotliDecompress(), createWriteStream(to));
}

function packageFolder(name: string): string {
  const require = createRequire(import.meta.url);
  let folder = dirname(require.resolve(name));
  while (!existsSync(join(folder, "package.json")) || !isPackage(folder, name)) folder = dirname(folder);
  return folder;
}

function isPackage(folder: string, name: string): boolean {
  return (JSON.parse(readFileSync(join(folder, "package.json"), "utf8")) as { name?: string }).name === name;
}
