import { existsSync, readdirSync, readFileSync } from "node:fs";
import { join } from "node:path";
import { fileURLToPath } from "node:url";
import { gzipSync } from "node:zlib";
import { describe, expect, it } from "vitest";

const dist = fileURLToPath(new URL("../../dist/", import.meta.url));
const read = (file: string): string => readFileSync(join(dist, file), "utf8");

const VENDOR_SCRIPT = "https://appsforoffice.microsoft.com/lib/1/hosted/office.js";
const PAGES = ["index.html", "pane.html", "help/index.html"];
const DEVELOPMENT_PLACE = "https://localhost:3000/";

/** Everything that a page loads or links to, comments left out. */
function addressesIn(html: string): string[] {
  const attributes = html
    .replace(/<!--.*?-->/gs, "")
    .matchAll(/\b(?:src|href|action|data|poster)="?([^"\s>]*)/gi);
  return [...attributes].map(([, address]) => address);
}

const scriptsOf = (page: string): string[] =>
  [...read(page).matchAll(/<script[^>]*\ssrc="([^"]*)"/g)].map(([, source]) => source);

/** The directives of a page's content security policy. */
function policyOf(page: string): ReadonlyMap<string, readonly string[]> {
  const text = /http-equiv="Content-Security-Policy" content="([^"]*)"/i.exec(read(page))?.[1] ?? "";
  const directives = text.split(";").map((part) => part.trim().split(/\s+/));
  return new Map(directives.map(([name, ...sources]) => [name, sources]));
}

it("functions.js is at most 150 kB gzipped", () =>
  expect(gzipSync(read("functions.js"), { level: 9 }).length).toBeLessThanOrEqual(150_000));

describe.each(["functions.js", "worker.js"])("%s", (file) => {
  const script = read(file);

  it("is one file: it fetches no other script of its own", () =>
    expect(/document\.createElement\(["']script|importScripts\(/.exec(script)).toBe(null));

  it("evaluates no text", () => expect(/\beval\(|\bFunction\(["']/.exec(script)).toBe(null));

  it("names no address outside the licences it carries", () =>
    expect(/\bhttps?:\/\/[\w.-]+/.exec(script.replace(/\/\*.*?\*\//gs, ""))?.[0]).toBe(undefined));
});

describe.each(PAGES)("%s", (page) => {
  const addresses = addressesIn(read(page));

  it("names nothing outside its own folder but the vendor's script", () => {
    const outside = addresses.filter((address) => /^[a-z]+:|^\/\//i.test(address));
    expect(outside).toEqual(page === "pane.html" ? [VENDOR_SCRIPT] : []);
  });

  // an add-in may be served from any folder of a host
  it("names nothing from the root of its host", () =>
    expect(addresses.filter((address) => address.startsWith("/"))).toEqual([]));

  it("names only files that the build makes", () => {
    const files = addresses
      .filter((address) => !/^(https:|#)/.test(address))
      .map((a) => a.replace(/#.*/, ""));
    expect(files.filter((file) => !existsSync(join(dist, page, "..", file)))).toEqual([]);
  });

  it("holds no script between its tags", () =>
    expect(read(page).replace(/<script[^>]*\ssrc="[^"]*"[^>]*><\/script>/g, "")).not.toMatch(
      /<script|\son\w+="/i,
    ));

  it("says its language, its title and how wide it is", () => {
    for (const part of ['<html lang="en"', "<title>", 'name="viewport"']) expect(read(page)).toContain(part);
  });
});

describe("the order of the scripts", () => {
  it("of the pane is the vendor's, the functions, the pane", () =>
    expect(scriptsOf("pane.html")).toEqual([VENDOR_SCRIPT, "functions.js", "pane.js"]));

  it("of the embedded sheet is the stub, the functions, the page", () =>
    expect(scriptsOf("index.html")).toEqual(["stub.js", "functions.js", "embedded.js"]));
});

describe.each(["index.html", "pane.html"])("the policy of %s", (page) => {
  const policy = policyOf(page);
  const vendor = page === "pane.html" ? [new URL(VENDOR_SCRIPT).origin] : [];

  it("lets scripts come from where they are expected only, none inline and none evaluated", () =>
    expect(policy.get("script-src")).toEqual(["'self'", ...vendor]));

  it("lets the page talk to its own folder only", () => {
    expect(policy.get("default-src")).toEqual(["'self'"]);
    expect(policy.get("connect-src")).toEqual(["'self'"]);
    const hosts = [...policy.values()].flat().filter((source) => !/^'[a-z-]+'$|^data:$|^blob:$/.test(source));
    expect(hosts).toEqual(vendor);
  });
});

describe("the folder", () => {
  const files = readdirSync(dist, { recursive: true, encoding: "utf8" });

  it("holds no source, map or test", () =>
    expect(files.filter((file) => /\.(ts|map|tsx)$|test/.test(file) && !file.startsWith("office"))).toEqual(
      [],
    ));

  it("asks for the development place only in the two files that the manifest command rewrites", () => {
    const texts = files.filter(
      (file) => /\.(html|js|css|json|xml)$/.test(file) && !file.startsWith("office"),
    );
    expect(texts.filter((file) => read(file).includes(DEVELOPMENT_PLACE)).sort()).toEqual([
      "functions.json",
      "manifest.xml",
    ]);
  });

  it("carries the licences of what is built in", () => {
    const text = read("licences.txt");
    for (const name of [
      "ml-matrix",
      "pure-rand",
      "@stdlib/math-base-special-gammainc",
      "@univerjs/core",
      "react",
    ])
      expect(text).toMatch(new RegExp(`^${name} \\d+\\.\\d+\\.\\d+$`, "m"));
  });

  it("has style sheets that load nothing from elsewhere", () => {
    const sheets = files.filter((file) => file.endsWith(".css") && !file.startsWith("office")).map(read);
    expect(sheets.length).toBeGreaterThan(0);
    for (const sheet of sheets) expect(sheet).not.toMatch(/@import|url\(["']?(https?:|\/\/)/);
  });
});
