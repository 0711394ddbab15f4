import { createServer } from "node:http";
import type { AddressInfo } from "node:net";
import { answerFromDist } from "../../src/cli/static-site.mjs";

/** Serves the built folder on a free local port. */
export async function serveDist(): Promise<{ url: string; close(): Promise<void> }> {
  const server = createServer(answerFromDist);
  await new Promise<void>((listening) => server.listen(0, "127.0.0.1", listening));
  return {
    url: `http://127.0.0.1:${(server.address() as AddressInfo).port}/`,
    close: () => new Promise((closed) => server.close(() => closed())),
  };
}
