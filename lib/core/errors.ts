/**
 * Error codes of the product: one table from which the type, the reply schema and the HTTP status derive.
 * A domain error carries a code and field problems; it knows nothing of requests or replies.
 */
export const errorCodes = {
  "malformed-json": { status: 400, title: "The body is not valid JSON" },
  unauthenticated: { status: 401, title: "Sign in or send a valid key" },
  "insufficient-scope": { status: 403, title: "The key lacks a scope" },
  forbidden: { status: 403, title: "Not allowed" },
  "not-found": { status: 404, title: "Not found" },
  "method-not-allowed": { status: 405, title: "This method is not offered here" },
  "state-conflict": { status: 409, title: "The present state does not allow this" },
  "still-running": { status: 409, title: "The first request with this key is still running" },
  withdrawn: { status: 410, title: "This revision is withdrawn" },
  stale: { status: 412, title: "Somebody saved a newer state" },
  "too-large": { status: 413, title: "The body is too large" },
  "unsupported-type": { status: 415, title: "This content type is not read here" },
  "missing-input": { status: 422, title: "An input is missing" },
  "not-accepted": { status: 422, title: "The status of the run is not among those accepted" },
  "crossed-bounds": { status: 422, title: "The lower bound lies above the upper one" },
  "unknown-member": { status: 422, title: "A name is not known here" },
  "invalid-input": { status: 422, title: "A value cannot be read" },
  "unreadable-unit": { status: 422, title: "A unit cannot be read" },
  "unknown-material": { status: 422, title: "A material is not known" },
  "unit-mismatch": { status: 422, title: "A unit does not fit the quantity" },
  "out-of-range": { status: 422, title: "A value is outside its bounds" },
  "outside-validity": { status: 422, title: "A property was asked outside its valid range" },
  "no-solution": { status: 422, title: "No solution lies in the interval" },
  "not-finite": { status: 422, title: "A value is not finite" },
  "not-converged": { status: 422, title: "The solution did not converge" },
  "budget-exceeded": { status: 422, title: "The run was too long" },
  "definition-invalid": { status: 422, title: "The definition has errors" },
  "idempotency-key-reused": { status: 422, title: "The idempotency key was used for another request" },
  "if-match-required": { status: 428, title: "Say which state the change is based on" },
  "too-many-requests": { status: 429, title: "Too many requests" },
  internal: { status: 500, title: "An error on our side" },
  busy: { status: 503, title: "Busy, try again shortly" },
} as const satisfies Record<string, { status: number; title: string }>;

export type ErrorCode = keyof typeof errorCodes;

/** One thing that is wrong, at one place: what, where (JSON pointer) and how to mend it. */
export interface FieldProblem {
  /** JSON pointer as URI fragment, `#/inputs/t/unit`; rows of a file as `#row=12`. */
  pointer: string;
  code: ErrorCode;
  /** A whole sentence for people. */
  message: string;
  received?: string | number | boolean | null;
  expected?: string;
  acceptedUnits?: string[];
  limit?: string | number;
}

const mark = Symbol.for("coldface.CodedError");

/** The one error class of the product's own rooms. Everything else that is thrown is a fault of ours. */
export class CodedError extends Error {
  readonly code: ErrorCode;
  readonly problems: FieldProblem[];
  /** Members beside the standard ones, for example the present ETag of a stale write. */
  readonly extra: Record<string, unknown>;

  get [mark](): true {
    return true;
  }

  /** The bundler loads this module once for the start of the server and once for its routes; errors of both are one class. */
  static override [Symbol.hasInstance](value: unknown): boolean {
    return typeof value === "object" && value !== null && mark in value;
  }

  constructor(
    code: ErrorCode,
    detail: string,
    problems: FieldProblem[] = [],
    extra: Record<string, unknown> = {},
  ) {
    super(detail);
    this.name = "CodedError";
    this.code = code;
    this.problems = problems;
    this.extra = extra;
  }

  /** From field problems alone: the code is that of the first, the detail counts the rest. */
  static from(problems: FieldProblem[]): CodedError {
    const first = problems[0];
    if (!first) throw new TypeError("CodedError.from needs at least one problem");
    const rest = problems.length - 1;
    const detail =
      rest === 0
        ? first.message
        : `${first.message} (and ${rest} more ${rest === 1 ? "problem" : "problems"})`;
    return new CodedError(first.code, detail, problems);
  }
}
