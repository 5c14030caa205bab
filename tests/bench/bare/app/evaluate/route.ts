import { answer } from "../answers";

/** The framework's ceiling: a route handler that reads a JSON body and answers JSON of the same size. */
export async function POST(request: Request): Promise<Response> {
  await request.json();
  return Response.json(answer("evaluate"));
}
