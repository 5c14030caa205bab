import { endpoint } from "@/lib/http/endpoint";
import { route } from "@/lib/http/route";
import { listTemplateRevisions } from "@/lib/templates/list-template-revisions";
import * as operations from "@/openapi/operations/templates";

export const { GET, HEAD, POST, PUT, PATCH, DELETE, OPTIONS } = route({
  GET: endpoint(operations.listTemplateRevisions, listTemplateRevisions),
});
