import { endpoint } from "@/lib/http/endpoint";
import { route } from "@/lib/http/route";
import { getMaterial } from "@/lib/materials/get-material";
import * as operations from "@/openapi/operations/materials";

export const { GET, HEAD, POST, PUT, PATCH, DELETE, OPTIONS } = route({
  GET: endpoint(operations.getMaterial, getMaterial),
});
