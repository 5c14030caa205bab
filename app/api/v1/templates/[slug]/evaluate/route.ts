import { endpoint } from "@/lib/http/endpoint";
import { route } from "@/lib/http/route";
import { evaluateTemplate } from "@/lib/templates/evaluate-template";
import * as operations from "@/openapi/operations/runs";

export const { GET, HEAD, POST, PUT, PATCH, DELETE, OPTIONS } = route({
  POST: endpoint(operations.evaluateTemplate, evaluateTemplate),
});
