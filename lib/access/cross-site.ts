import { CodedError } from "@/lib/core/errors";

const harmless = new Set(["GET", "HEAD", "OPTIONS"]);
/** What a form of any other site can send without asking first. */
const formTypes = new Set(["application/x-www-form-urlencoded", "multipart/form-data", "text/plain"]);

/**
 * For changes that a session cookie vouches for: refuses what another site may have caused the browser to send. Reads
 * Sec-Fetch-Site, else Origin; without either it refuses. Throws CodedError `forbidden` or `unsupported-type`.
 */
export function refuseCrossSite(request: Request, publicUrl: string): void {
  if (harmless.has(request.method)) return;
  if (!comesFromHere(request.headers, publicUrl)) {
    throw new CodedError("forbidden", "This change was asked for by another site and is refused.");
  }
  const type = request.headers.get("content-type")?.split(";")[0]?.trim().toLowerCase();
  if (type === undefined ? request.method === "POST" : formTypes.has(type)) {
    throw new CodedError("unsupported-type", "Send the body with Content-Type: application/json.");
  }
}

function comesFromHere(headers: Headers, publicUrl: string): boolean {
  const site = headers.get("sec-fetch-site");
  if (site !== null) return site === "same-origin" || site === "none";
  const origin = headers.get("origin");
  if (origin === null || !URL.canParse(origin)) return false;
  // The cookie belongs to the host that was asked, so an Origin of that same host is this site, too.
  return origin === new URL(publicUrl).origin || new URL(origin).host === headers.get("host");
}
