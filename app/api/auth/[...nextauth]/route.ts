import NextAuth from "next-auth";
import { env } from "@/lib/core/env";
import { authOptions } from "@/lib/people/auth-options";

interface Context {
  params: Promise<{ nextauth: string[] }>;
}

function handle(request: Request, context: Context): Promise<Response> {
  // next-auth reads the address of the installation from here and nowhere else.
  process.env.NEXTAUTH_URL ??= env().PUBLIC_URL;
  const handler = NextAuth(authOptions()) as (request: Request, context: Context) => Promise<Response>;
  return handler(request, context);
}

export { handle as GET, handle as POST };
