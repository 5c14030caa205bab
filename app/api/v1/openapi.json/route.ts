import { env } from "@/lib/core/env";
import { publicEndpoint } from "@/lib/http/endpoint";
import { route } from "@/lib/http/route";
import { openApiDocument } from "@/openapi/document";
import * as operations from "@/openapi/operations/catalogue";

export const { GET, HEAD, POST, PUT, PATCH, DELETE, OPTIONS } = route({
  GET: publicEndpoint(operations.getOpenApiDocument, async () => ({ ...openApiDocument(env().PUBLIC_URL) })),
});
