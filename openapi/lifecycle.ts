import { paths } from "@/lib/core/paths";
import type { Presented } from "@/lib/http/operation";
import type { Lifecycle } from "@/lib/templates/schemas";

/**
 * Headers of a revision on its way out of use: Deprecation (RFC 9745), Sunset (RFC 8594, only with a set date) and the
 * successor (RFC 5829).
 */
export function lifecycleHeaders(lifecycle: Lifecycle): NonNullable<Presented["headers"]> {
  const { slug, supersededAt, withdrawalDate, successor } = lifecycle;
  return {
    ...(supersededAt === null ? {} : { Deprecation: `@${Math.floor(supersededAt.getTime() / 1000)}` }),
    ...(withdrawalDate === null ? {} : { Sunset: withdrawalDate.toUTCString() }),
    ...(successor === null
      ? {}
      : { Link: `<${paths.apiTemplateRevision(slug, successor)}>; rel="successor-version"` }),
  };
}

export const lifecycleHeaderNames = ["Deprecation", "Sunset"] as const;
