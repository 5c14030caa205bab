import { readiness } from "@/lib/access/readiness";

export const dynamic = "force-dynamic";

/** Whether requests can be served in full: 200, or 503 with what is missing. */
export async function GET(): Promise<Response> {
  const answer = await readiness();
  const headers = { "Cache-Control": "no-store", ...(answer.ready ? {} : { "Retry-After": "5" }) };
  return Response.json(answer, { status: answer.ready ? 200 : 503, headers });
}
