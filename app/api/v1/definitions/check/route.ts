import { endpoint } from "@/lib/http/endpoint";
import { route } from "@/lib/http/route";
import { checkDefinition } from "@/lib/templates/check-definition";
import * as operations from "@/openapi/operations/definitions";

export const { GET, HEAD, POST, PUT, PATCH, DELETE, OPTIONS } = route({
  POST: endpoint(operations.checkDefinition, checkDefinition),
});
