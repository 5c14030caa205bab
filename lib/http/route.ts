import "server-only";
import { CodedError } from "@/lib/core/errors";
import { markOf } from "./call";
import type { Handler } from "./endpoint";
import type { Method } from "./operation";
import { emptyReply, problemReply } from "./reply";

/** Every method that a route of Next can answer, so that none is left to its own bodyless replies. */
const methods = ["GET", "POST", "PUT", "PATCH", "DELETE"] as const satisfies readonly Method[];

export type RouteMethods = Record<Method | "HEAD" | "OPTIONS", Handler>;

/** The handlers of one address: HEAD mirrors GET, OPTIONS lists, all others are 405 with Allow. */
export function route(handlers: Partial<Record<Method, Handler>>): RouteMethods {
  const offered = methods.filter((method) => handlers[method] !== undefined);
  const allow = [...offered, ...(handlers.GET ? ["HEAD"] : []), "OPTIONS"].join(", ");

  const refuse: Handler = async (request) => {
    const detail = `${request.method} is not offered here. Use one of ${allow}.`;
    return problemReply(new CodedError("method-not-allowed", detail), request, markOf(request), {
      Allow: allow,
    });
  };
  const list: Handler = async (request) => emptyReply(markOf(request), { Allow: allow });

  return {
    GET: handlers.GET ?? refuse,
    HEAD: handlers.GET ?? refuse,
    POST: handlers.POST ?? refuse,
    PUT: handlers.PUT ?? refuse,
    PATCH: handlers.PATCH ?? refuse,
    DELETE: handlers.DELETE ?? refuse,
    OPTIONS: list,
  };
}

const nothing: Handler = async (request) =>
  problemReply(new CodedError("not-found", "No operation has this address."), request, markOf(request));

/** For every address below the base that no operation has. */
export const unknownAddress: RouteMethods = {
  GET: nothing,
  HEAD: nothing,
  POST: nothing,
  PUT: nothing,
  PATCH: nothing,
  DELETE: nothing,
  OPTIONS: nothing,
};
