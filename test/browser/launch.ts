import { existsSync, mkdirSync, readFileSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { chromium, type Browser } from "playwright-core";

const ARGUMENTS = [
  "--no-sandbox",
  "--disable-gpu",
  "--disable-quic",
  "--no-first-run",
  "--disable-background-networking",
  "--disable-component-update",
  "--disable-sync",
];

/** Where browsers are commonly installed; `COMOVE_BROWSER` names any other. */
const INSTALLED = [
  "/usr/bin/google-chrome",
  "/usr/bin/chromium",
  "/usr/bin/chromium-browser",
  "/usr/bin/microsoft-edge",
  "/Applications/Google Chrome.app/Contents/MacOS/Google Chrome",
  "/Applications/Microsoft Edge.app/Contents/MacOS/Microsoft Edge",
  "C:/Program Files/Google/Chrome/Application/chrome.exe",
  "C:/Program Files (x86)/Microsoft/Edge/Application/msedge.exe",
];

/** Starts a headless browser: the one named, the one that comes with the packages on Linux, or an installed one. */
export async function launchBrowser(): Promise<Browser> {
  const named = process.env["COMOVE_BROWSER"];
  if (named) {
    if (!existsSync(named)) throw new Error(`COMOVE_BROWSER names ${named}, and there is no such file.`);
    return start(named);
  }
  if (process.platform === "linux" && process.arch === "x64") return startPackaged();
  const installed = INSTALLED.find((path) => existsSync(path));
  if (installed) return start(installed);
  throw new Error(
    "No browser was found. Install Chrome, Chromium or Edge, or set COMOVE_BROWSER to the path of one.",
  );
}

const start = (executablePath: string, more: Record<string, string> = {}): Promise<Browser> =>
  chromium.launch({
    executablePath,
    headless: true,
    args: ARGUMENTS,
    env: { ...process.env, ...more } as Record<string, string>,
  });

/** The package unpacks into the temporary folder and takes whatever lies there already: so one folder per version. */
async function startPackaged(): Promise<Browser> {
  const { version } = JSON.parse(readFileSync("node_modules/@sparticuz/chromium/package.json", "utf8")) as {
    version: string;
  };
  const before = process.env["TMPDIR"];
  const folder = join(tmpdir(), `comove-browser-${version}-${process.getuid?.() ?? 0}`);
  mkdirSync(folder, { recursive: true });
  process.env["TMPDIR"] = folder;
  try {
    const { default: packaged, inflate } = await import("@sparticuz/chromium");
    const executable = await packaged.executablePath();
    // the system libraries that a bare machine lacks travel with the package
    const libraries = await inflate("node_modules/@sparticuz/chromium/bin/al2023.tar.br");
    return await start(executable, {
      LD_LIBRARY_PATH: join(libraries, "lib"),
      FONTCONFIG_FILE: fontSettings(folder),
    });
  } finally {
    if (before === undefined) delete process.env["TMPDIR"];
    else process.env["TMPDIR"] = before;
  }
}

/** A bare machine has no fonts either: those of the package stand in for the common ones, so that text is seen. */
function fontSettings(folder: string): string {
  const stand = (family: string) =>
    `<alias binding="same"><family>${family}</family><prefer><family>Open Sans</family></prefer></alias>`;
  const file = join(folder, "fonts.conf");
  writeFileSync(
    file,
    `<?xml version="1.0"?><!DOCTYPE fontconfig SYSTEM "fonts.dtd"><fontconfig>
<dir>${join(folder, "fonts", "fonts")}</dir><dir>/usr/share/fonts</dir><cachedir>${join(folder, "font-cache")}</cachedir>
${["Arial", "system-ui", "sans-serif"].map(stand).join("\n")}</fontconfig>\n`,
  );
  return file;
}
