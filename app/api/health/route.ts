export const dynamic = "force-dynamic";

/** Whether the process answers; asks nobody else. */
export function GET(): Response {
  return Response.json({ status: "ok" }, { headers: { "Cache-Control": "no-store" } });
}
