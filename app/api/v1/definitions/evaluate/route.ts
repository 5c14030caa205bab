import { endpoint } from "@/lib/http/endpoint";
import { route } from "@/lib/http/route";
import { evaluateDefinition } from "@/lib/templates/evaluate-definition";
import * as operations from "@/openapi/operations/definitions";

export const { GET, HEAD, POST, PUT, PATCH, DELETE, OPTIONS } = route({
  POST: endpoint(operations.evaluateDefinition, evaluateDefinition),
});
