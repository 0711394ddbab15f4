import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { createServer, request, type Server } from "node:http";
import type { AddressInfo } from "node:net";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { answerFromDist } from "../../src/cli/static-site.mjs";

let outer: string;
let server: Server;

beforeAll(async () => {
  outer = mkdtempSync(join(tmpdir(), "comove-site-"));
  const site = join(outer, "site");
  mkdirSync(join(site, "help"), { recursive: true });
  mkdirSync(join(outer, "site-secret"));
  writeFileSync(join(outer, "secret.txt"), "secret");
  writeFileSync(join(outer, "site-secret", "x.txt"), "secret");
  writeFileSync(join(site, "index.html"), "front");
  writeFileSync(join(site, "help", "index.html"), "help");
  writeFileSync(join(site, "functions.js"), "code");
  server = createServer((asked, answer) => answerFromDist(asked, answer, site));
  await new Promise<void>((listening) => server.listen(0, "127.0.0.1", listening));
});

afterAll(async () => {
  await new Promise((closed) => server.close(closed));
  rmSync(outer, { recursive: true });
});

/** Asks for a path exactly as written: `fetch` would tidy it first. */
function ask(path: string): Promise<{ status: number; type: string; text: string }> {
  const { port } = server.address() as AddressInfo;
  return new Promise((resolve, reject) => {
    request({ host: "127.0.0.1", port, path }, (answer) => {
      let text = "";
      answer.setEncoding("utf8").on("data", (part: string) => (text += part));
      answer.on("end", () =>
        resolve({ status: answer.statusCode!, type: String(answer.headers["content-type"]), text }),
      );
    })
      .on("error", reject)
      .end();
  });
}

describe("the server of npm start", () => {
  it.each([
    ["/", "front", "text/html; charset=utf-8"],
    ["/index.html?now=1", "front", "text/html; charset=utf-8"],
    ["/help/", "help", "text/html; charset=utf-8"],
    ["/help/index.html", "help", "text/html; charset=utf-8"],
    ["/functions%2ejs", "code", "text/javascript; charset=utf-8"],
  ])("answers %s", async (path, text, type) => expect(await ask(path)).toEqual({ status: 200, type, text }));

  it.each([
    "/absent.html",
    "/help",
    "/../secret.txt",
    "/..%2fsecret.txt",
    "/%2e%2e/secret.txt",
    "/../site-secret/x.txt",
    "/%",
    "/%00",
    "//",
    "/%ff",
  ])("has no page at %s and goes on", async (path) => {
    const { status, text } = await ask(path);
    expect(text).not.toContain("secret");
    expect(path === "//" ? [200, 404] : [404]).toContain(status);
    expect((await ask("/")).text).toBe("front");
  });
});
