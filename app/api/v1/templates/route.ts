import { endpoint } from "@/lib/http/endpoint";
import { route } from "@/lib/http/route";
import { listTemplates } from "@/lib/templates/list-templates";
import * as operations from "@/openapi/operations/templates";

export const { GET, HEAD, POST, PUT, PATCH, DELETE, OPTIONS } = route({
  GET: endpoint(operations.listTemplates, listTemplates),
});
