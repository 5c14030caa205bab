import "server-only";
import { and, desc, eq, inArray, max } from "drizzle-orm";
import { reader } from "@/db/client";
import { usageDaily } from "@/db/schema/system";
import { templateRevisions, templates } from "@/db/schema/templates";
import { reachesTemplate } from "@/lib/access/actions";
import { actorId, type Actor } from "@/lib/access/actor";
import { permit } from "@/lib/access/permit";

export interface RecentTemplate {
  slug: string;
  title: string;
  /** Last run by this actor, RFC 3339. */
  lastAt: string;
}

/** Templates that the actor has run, latest first, by their issued title. */
export async function recentTemplates(actor: Actor, count: number): Promise<RecentTemplate[]> {
  permit(actor, "template.list");
  const lastAt = max(usageDaily.lastAt);
  const used = await reader()
    .select({ slug: usageDaily.template, lastAt })
    .from(usageDaily)
    .where(and(eq(usageDaily.callerKind, actor.kind), eq(usageDaily.callerId, actorId(actor))))
    .groupBy(usageDaily.template)
    .orderBy(desc(lastAt))
    .limit(count);
  const reached = used.filter((row) => reachesTemplate(actor, row.slug));
  if (reached.length === 0) return [];
  const titles = await reader()
    .select({ slug: templates.slug, title: templateRevisions.title })
    .from(templates)
    .innerJoin(templateRevisions, eq(templateRevisions.templateId, templates.id))
    .where(
      and(
        eq(templateRevisions.state, "issued"),
        inArray(
          templates.slug,
          reached.map((row) => row.slug),
        ),
      ),
    );
  const titleOf = new Map(titles.map((row) => [row.slug, row.title]));
  return reached.flatMap((row) => {
    const title = titleOf.get(row.slug);
    return title === undefined || row.lastAt === null
      ? []
      : [{ slug: row.slug, title, lastAt: row.lastAt.toISOString() }];
  });
}
