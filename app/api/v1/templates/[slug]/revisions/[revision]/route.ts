import { endpoint } from "@/lib/http/endpoint";
import { route } from "@/lib/http/route";
import { getTemplateRevision } from "@/lib/templates/get-template";
import * as operations from "@/openapi/operations/templates";

export const { GET, HEAD, POST, PUT, PATCH, DELETE, OPTIONS } = route({
  GET: endpoint(operations.getTemplateRevision, getTemplateRevision),
});
