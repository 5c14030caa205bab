import { endpoint } from "@/lib/http/endpoint";
import { route } from "@/lib/http/route";
import { getInputSchema } from "@/lib/templates/get-input-schema";
import * as operations from "@/openapi/operations/templates";

export const { GET, HEAD, POST, PUT, PATCH, DELETE, OPTIONS } = route({
  GET: endpoint(operations.getInputSchema, getInputSchema),
});
