import { endpoint } from "@/lib/http/endpoint";
import { route } from "@/lib/http/route";
import { getPropertyValue } from "@/lib/materials/get-property-value";
import * as operations from "@/openapi/operations/materials";

export const { GET, HEAD, POST, PUT, PATCH, DELETE, OPTIONS } = route({
  GET: endpoint(operations.getPropertyValue, getPropertyValue),
});
