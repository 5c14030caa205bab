import { CodedError } from "@/lib/core/errors";
import { parseStrictJson } from "./strict-json";

/** Largest JSON body, in bytes. */
export const jsonBodyLimit = 1_000_000;

function tooLarge(limit: number): CodedError {
  return new CodedError(
    "too-large",
    `The body is larger than ${limit.toLocaleString("en-GB")} bytes. Send it in several requests.`,
  );
}

/** Counts while reading, so a body without an honest Content-Length cannot fill the memory. */
async function readBytes(request: Request, limit: number): Promise<Uint8Array> {
  const declared = request.headers.get("content-length");
  if (declared !== null && Number(declared) > limit) throw tooLarge(limit);
  if (!request.body) return new Uint8Array(0);
  const chunks: Uint8Array[] = [];
  let size = 0;
  const reader = request.body.getReader();
  for (;;) {
    const { done, value } = await reader.read();
    if (done) break;
    size += value.byteLength;
    if (size > limit) {
      await reader.cancel();
      throw tooLarge(limit);
    }
    chunks.push(value);
  }
  if (declared !== null && Number(declared) !== size) {
    throw new CodedError("malformed-json", "The body is shorter than its Content-Length says.");
  }
  return chunks.length === 1 && chunks[0] ? chunks[0] : Buffer.concat(chunks);
}

function checkType(request: Request): void {
  const type = request.headers.get("content-type") ?? "";
  const [media = "", ...parameters] = type
    .toLowerCase()
    .split(";")
    .map((part) => part.trim());
  const charset = parameters.find((parameter) => parameter.startsWith("charset="));
  if (media !== "application/json") {
    throw new CodedError(
      "unsupported-type",
      `The body is ${media ? `“${media.slice(0, 80)}”` : "of no named type"}. Send it with Content-Type: application/json.`,
    );
  }
  if (charset !== undefined && !/^charset="?utf-8"?$/.test(charset)) {
    throw new CodedError("unsupported-type", "The body must be UTF-8.");
  }
  const encoding = request.headers.get("content-encoding");
  if (encoding !== null && encoding !== "identity") {
    throw new CodedError("unsupported-type", "A compressed body is not read here. Send it as it is.");
  }
}

/** Reads a JSON body. With `optional`, an empty body is `{}` whatever its type. */
export async function readJsonBody(request: Request, optional: boolean): Promise<unknown> {
  const length = request.headers.get("content-length");
  const named = request.headers.has("content-type");
  if (named && (length === null || length !== "0")) checkType(request);
  const bytes = await readBytes(request, jsonBodyLimit);
  if (bytes.byteLength === 0 && optional) return {};
  if (!named) checkType(request);
  let text: string;
  try {
    text = new TextDecoder("utf-8", { fatal: true, ignoreBOM: false }).decode(bytes);
  } catch {
    throw new CodedError("malformed-json", "The body is not UTF-8.");
  }
  return parseStrictJson(text);
}
