import type { IncomingMessage, ServerResponse } from "node:http";

export declare function answerFromDist(request: IncomingMessage, response: ServerResponse): void;
