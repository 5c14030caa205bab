import type { z } from "zod";
import type { ErrorCode } from "@/lib/core/errors";

/**
 * One operation of the interface as a record. The route handler and the OpenAPI document are both made from it, so
 * they cannot disagree.
 */

export type Method = "GET" | "POST" | "PUT" | "PATCH" | "DELETE";

/** What the wrapper does with the answer of a verb: content, and headers that go beside it. */
export interface Presented {
  readonly body: unknown;
  readonly headers?: Readonly<Record<string, string | readonly string[]>>;
}

/** Parts of a request as they are written down, for an example. */
export interface ExampleRequest {
  readonly params?: Readonly<Record<string, string>>;
  readonly query?: Readonly<Record<string, string>>;
  readonly body?: unknown;
}

export interface SuccessExample extends ExampleRequest {
  readonly summary: string;
  readonly reply: unknown;
}

export interface FailureExample extends ExampleRequest {
  readonly summary: string;
  readonly code: ErrorCode;
  readonly detail: string;
  readonly errors?: readonly Readonly<Record<string, unknown>>[];
}

export interface RequestParts {
  readonly params?: z.ZodObject;
  readonly query?: z.ZodObject;
  readonly body?: z.ZodObject;
  /** An empty body reads as `{}`. */
  readonly bodyOptional?: boolean;
  /**
   * A request whose body has faults still reaches the verb, with the faulty members left out and the problems in
   * the call, so that the verb can add what it finds itself before it refuses. Such a verb must call `call.refuse()`.
   */
  readonly collects?: boolean;
}

export interface Operation<
  Request extends RequestParts = RequestParts,
  Reply extends z.ZodType = z.ZodType,
  Result = unknown,
> {
  /** Verb and noun, `createRecord`. */
  readonly id: string;
  readonly method: Method;
  /** Below the base, with `{name}` for parameters: `/templates/{slug}/evaluate`. */
  readonly path: string;
  readonly summary: string;
  readonly description: string;
  readonly tag: string;
  /** A scope that a key needs, `session` for signed-in people only, `public` for everybody. */
  readonly scope: string;
  readonly request: Request;
  readonly reply: {
    readonly status: 200 | 201;
    readonly description: string;
    readonly schema: Reply;
    /** Headers beside the ones that every answer has. */
    readonly headers?: readonly string[];
  };
  /** Codes that only this operation answers, beside the ones that follow from its parts. */
  readonly refusals: readonly ErrorCode[];
  readonly examples: { readonly success: SuccessExample; readonly failure: FailureExample };
  /** A single resource: strong ETag, If-None-Match. */
  readonly etag?: boolean;
  /** Creates something: reads Idempotency-Key. */
  readonly idempotent?: boolean;
  /** How the verb's answer is written; without it the answer is the content. */
  present?(result: Result): Presented;
}

type PartOutput<Part> = Part extends z.ZodType ? z.output<Part> : unknown;

/** What the verb of an operation receives: members of path, query and body side by side. */
export type OperationInput<Request extends RequestParts> = PartOutput<Request["params"]> &
  PartOutput<Request["query"]> &
  PartOutput<Request["body"]>;

/** Makes an operation record and keeps its types for the handler. */
export function operation<
  const Request extends RequestParts,
  Reply extends z.ZodType,
  Result = z.input<Reply>,
>(record: Operation<Request, Reply, Result>): Operation<Request, Reply, Result> {
  return record;
}
