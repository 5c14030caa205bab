import { isDeepStrictEqual } from "node:util";
import type { Operation } from "./operation";

const checking = process.env.NODE_ENV === "test" || process.env.COLDFACE_CHECK_REPLIES === "1";

/**
 * In tests, compares an answer with its declaration: a member that is not declared is as wrong as one that is missing.
 * Throws an Error, which becomes a 500 that fails the test.
 */
export function checkReply(operation: Operation, body: unknown): void {
  if (!checking) return;
  const sent: unknown = JSON.parse(JSON.stringify(body));
  const parsed = operation.reply.schema.safeParse(sent);
  if (!parsed.success) {
    throw new Error(`The answer of ${operation.id} differs from its declaration: ${parsed.error.message}`);
  }
  const declared: unknown = JSON.parse(JSON.stringify(parsed.data));
  if (!isDeepStrictEqual(declared, sent)) {
    throw new Error(`The answer of ${operation.id} holds members that its declaration does not name.`);
  }
}
