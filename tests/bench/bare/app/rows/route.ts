import { answer } from "../answers";

/** JSON alone: the body is parsed and an answer of the same size is written. */
export async function POST(request: Request): Promise<Response> {
  const body: unknown = JSON.parse(await request.text());
  if (body === null) return new Response(null, { status: 400 });
  return new Response(JSON.stringify(answer("rows")), { headers: { "content-type": "application/json" } });
}
