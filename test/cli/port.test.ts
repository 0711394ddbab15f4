import { describe, expect, it } from "vitest";
import { wantedPort } from "../../src/cli/port.mjs";

describe("the port of npm start", () => {
  it("is 3000 when nothing is said", () => {
    expect(wantedPort(undefined)).toBe(3000);
    expect(wantedPort(" ")).toBe(3000);
  });

  it("is what PORT says", () => expect(wantedPort("8080")).toBe(8080));

  it.each(["0", "65536", "-1", "80.5", "http", "1e3", "0x50"])("cannot be %s", (setting) =>
    expect(wantedPort(setting)).toBe(null),
  );
});
