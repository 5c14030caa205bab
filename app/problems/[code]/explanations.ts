import type { ErrorCode } from "@/lib/core/errors";

/** What each refusal means and how to mend it; the page of its type. */
export const explanations: Record<ErrorCode, { meaning: string; mend: string }> = {
  "malformed-json": {
    meaning:
      "The body is not JSON as RFC 7493 wants it: it breaks off, a member stands twice in one object, a text holds half a surrogate pair, or a number is too large for a double.",
    mend: "Look at the place that the detail names. Write the body with a JSON library and not by hand.",
  },
  unauthenticated: {
    meaning: "No session or key came with the request, or the key is mistyped, revoked or expired.",
    mend: "Sign in, or send Authorization: Bearer followed by a key that stands.",
  },
  "insufficient-scope": {
    meaning: "The key is good, but this operation needs a scope that it does not have.",
    mend: "Ask the key's owner for a key with the scope that the member scope names.",
  },
  forbidden: {
    meaning: "You may see this, but your role (or any key) may not do that to it.",
    mend: "Ask somebody with the role that the detail names.",
  },
  "not-found": {
    meaning: "Nothing has this address, or it is not yours to see. Both are answered alike.",
    mend: "Check the spelling of slug, revision or number, and that your key is not limited to other templates.",
  },
  "method-not-allowed": {
    meaning: "The address exists, but not with this method.",
    mend: "Use one of the methods in the Allow header.",
  },
  "state-conflict": {
    meaning:
      "The present state does not allow this: a record that is void is not voided again, a draft keeps no records.",
    mend: "Read the object again and decide anew.",
  },
  "still-running": {
    meaning: "A request with the same Idempotency-Key has not ended yet.",
    mend: "Wait for the seconds in Retry-After and send the same request again.",
  },
  withdrawn: {
    meaning: "The revision is withdrawn and no longer runs. It can still be read, and its records run again.",
    mend: "Use the issued revision, and look at the reason of the withdrawal for what you calculated before.",
  },
  stale: {
    meaning: "Somebody saved a newer state since you read it.",
    mend: "Read it again, take over what changed, and save with the new ETag.",
  },
  "too-large": {
    meaning: "The body has more bytes than this operation reads.",
    mend: "Send fewer rows at once.",
  },
  "unsupported-type": {
    meaning: "The body is not of a type that is read here, or it is compressed.",
    mend: "Send it as it is with Content-Type: application/json.",
  },
  "missing-input": {
    meaning: "An input, or a member of the body, was not given and has no default.",
    mend: "Give it. With defaults set to refuse, and in kept records for inputs marked so, a default is not taken.",
  },
  "not-accepted": {
    meaning:
      "The run ended with a status that the request did not accept. The evaluation stands in the problem.",
    mend: "Look at its limits and cautions; widen accept only if they may stand.",
  },
  "crossed-bounds": {
    meaning: "A lower bound lies above the upper one, in an input or between the ends of a search.",
    mend: "Exchange or correct the two.",
  },
  "unknown-member": {
    meaning:
      "A symbol, option, query or body member is not known. Nothing unknown is ignored, because it may be a slip.",
    mend: "Take the name that the message proposes.",
  },
  "invalid-input": {
    meaning:
      "A value cannot be read: not a number, not of the kind that is asked for, or a number with two readings such as 1,250.",
    mend: "Write numbers with a decimal point and no grouping, or with the unit beside it.",
  },
  "unreadable-unit": {
    meaning: "The unit is not known, or has two readings.",
    mend: "Use one of the texts in acceptedUnits.",
  },
  "unknown-material": {
    meaning: "No issued material has this slug, or not with this revision.",
    mend: "Look the slug up in the index of materials.",
  },
  "unit-mismatch": {
    meaning: "The unit belongs to another quantity than the input or result declares.",
    mend: "Use one of the texts in acceptedUnits.",
  },
  "out-of-range": {
    meaning: "A value lies outside the bounds that the template or the interface declares.",
    mend: "The message names the bound, and limit holds it.",
  },
  "outside-validity": {
    meaning: "A property was asked at a temperature for which its source gives no value.",
    mend: "Choose a material whose range holds the temperature, or allow extrapolation; then the run carries a caution.",
  },
  "no-solution": {
    meaning: "The equation that the working solves has no solution between the bounds.",
    mend: "Check the inputs that the message names.",
  },
  "not-finite": {
    meaning:
      "A line of the working gave infinity or no number: a division by zero, or a root of a negative number.",
    mend: "Check the inputs that the line reads.",
  },
  "not-converged": {
    meaning: "An iteration of the working did not settle within its limit.",
    mend: "Check the inputs; tell the template's author if they are as they should be.",
  },
  "budget-exceeded": {
    meaning: "The run took more steps or time than a request may take.",
    mend: "Send fewer rows at once, or let the template's author simplify the working.",
  },
  "definition-invalid": {
    meaning: "The definition has errors. Each stands in diagnostics with its line and a likely mend.",
    mend: "Mend the errors; warnings and remarks do not stop a run.",
  },
  "idempotency-key-reused": {
    meaning: "The same Idempotency-Key came with another method, address or body before.",
    mend: "Use a new key for a new request.",
  },
  "if-match-required": {
    meaning: "A change must say on which state it is based.",
    mend: "Send the ETag that you read as If-Match.",
  },
  "too-many-requests": {
    meaning: "The key's requests of this minute are spent.",
    mend: "Wait for the seconds in Retry-After. Many rows in one request count once.",
  },
  internal: {
    meaning: "Something failed on our side. Nothing was kept.",
    mend: "Give the request id (instance) to your administrator; it stands in the log.",
  },
  busy: {
    meaning: "The database is busy or cannot be written at the moment. Nothing was kept.",
    mend: "Wait for the seconds in Retry-After and send the same request again.",
  },
};
