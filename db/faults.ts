import { LibsqlError } from "@libsql/client";

/** The libSQL error inside whatever wrapper Drizzle put around it, or null. */
function libsqlError(error: unknown): LibsqlError | null {
  for (let at: unknown = error, depth = 0; at instanceof Error && depth < 6; at = at.cause, depth += 1) {
    if (at instanceof LibsqlError) return at;
  }
  return null;
}

/** Somebody else holds the lock: worth another try. */
export function isBusy(error: unknown): boolean {
  const code = libsqlError(error)?.code;
  return code === "SQLITE_BUSY" || code === "SQLITE_LOCKED";
}

/** The disk is full, read-only or failing: nothing is wrong with the request. */
export function isStorageFault(error: unknown): boolean {
  const code = libsqlError(error)?.code;
  return (
    code === "SQLITE_FULL" ||
    code === "SQLITE_READONLY" ||
    code === "SQLITE_IOERR" ||
    code === "SQLITE_CANTOPEN"
  );
}

/** A UNIQUE or PRIMARY KEY constraint refused the row. A remote server tells it in the message only. */
export function isUniqueViolation(error: unknown): boolean {
  const found = libsqlError(error);
  return found !== null && /UNIQUE constraint failed|PRIMARY KEY constraint failed/.test(found.message);
}
