import { z } from "zod";

/** Headers of requests and answers, as the document describes them. */

export const headerDocuments = {
  "X-Request-Id": {
    description: "The id of the request, as sent or made here; quote it when you report a fault.",
    schema: { type: "string", maxLength: 128 },
  },
  Link: {
    description:
      "`service-desc` leads to this document, `next` to the next page, `successor-version` to the issued revision.",
    schema: { type: "string" },
  },
  "RateLimit-Policy": {
    description: "Quota `q` in a window of `w` seconds.",
    schema: { type: "string" },
  },
  RateLimit: {
    description: "Requests `r` left, and seconds `t` until the window ends.",
    schema: { type: "string" },
  },
  ETag: { description: "Strong tag of the content.", schema: { type: "string" } },
  Location: { description: "Address of what was made.", schema: { type: "string", format: "uri-reference" } },
  Deprecation: {
    description: "The revision is superseded since this moment (RFC 9745).",
    schema: { type: "string", pattern: "^@[0-9]+$" },
  },
  Sunset: {
    description: "The revision will be withdrawn at this moment (RFC 8594).",
    schema: { type: "string" },
  },
} as const;

export const idempotencyHeader = z.object({
  "Idempotency-Key": z.string().min(1).max(257).optional().meta({
    description:
      "1 to 255 printable characters; the same request again is given the first answer for 24 hours.",
  }),
});
