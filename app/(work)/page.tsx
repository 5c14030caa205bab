import Link from "next/link";
import { EmptyState, PageFrame, Sheet } from "@/app/_components/page-frame";
import { requireActor } from "@/app/_components/require-actor";
import { StatusMark } from "@/app/_components/status-mark";
import { momentText } from "@/app/_components/time-text";
import { paths } from "@/lib/core/paths";
import { installation } from "@/lib/people/installation";
import { listRecords } from "@/lib/records/list-records";
import { listTemplates } from "@/lib/templates/list-templates";
import { recentTemplates } from "@/lib/templates/recent-templates";
import { categoryNames } from "./templates/_components/category-names";

export default async function HomePage() {
  const actor = await requireActor();
  const [works, recent, records, templates] = await Promise.all([
    installation(),
    recentTemplates(actor, 8),
    listRecords(actor, { limit: 8 }),
    listTemplates(actor, { limit: 200, state: "issued" }),
  ]);
  const byCategory = new Map<keyof typeof categoryNames, typeof templates.items>();
  for (const template of templates.items)
    byCategory.set(template.category, [...(byCategory.get(template.category) ?? []), template]);

  return (
    <PageFrame title={works.name}>
      <div className="grid items-start gap-5 lg:grid-cols-2">
        <Sheet>
          <h2 className="border-b border-rule px-6 py-3 max-md:px-4">Recently used</h2>
          {recent.length === 0 ? (
            <EmptyState title="You have not run anything yet.">
              Pick a calculation below, or press / and search.
            </EmptyState>
          ) : (
            <ul>
              {recent.map((template) => (
                <li key={template.slug} className="border-b border-soft last:border-b-0">
                  <Link
                    prefetch={false}
                    href={paths.template(template.slug)}
                    className="flex min-h-11 items-center justify-between gap-4 px-6 py-2 hover:bg-film max-md:px-4"
                  >
                    <span className="font-[550]">{template.title}</span>
                    <span className="whitespace-nowrap text-[13px] text-muted">
                      {momentText(template.lastAt)}
                    </span>
                  </Link>
                </li>
              ))}
            </ul>
          )}
        </Sheet>
        <Sheet>
          <h2 className="border-b border-rule px-6 py-3 max-md:px-4">Latest records</h2>
          {records.items.length === 0 ? (
            <EmptyState title="No run has been kept yet.">
              A record holds inputs, results, revision and materials, and can be run again with the same
              digits.
            </EmptyState>
          ) : (
            <ul>
              {records.items.map((record) => (
                <li key={record.number} className="border-b border-soft last:border-b-0">
                  <Link
                    prefetch={false}
                    href={paths.record(record.number)}
                    className="grid grid-cols-[88px_minmax(0,1fr)_auto] items-center gap-3 px-6 py-2 hover:bg-film max-md:px-4"
                  >
                    <span className="num text-[13px]">{record.number}</span>
                    <span className="min-w-0 truncate">{record.title || record.templateTitle}</span>
                    <StatusMark status={record.status} voided={record.voided} />
                  </Link>
                </li>
              ))}
            </ul>
          )}
        </Sheet>
      </div>
      <Sheet className="mt-5">
        <h2 className="border-b border-rule px-6 py-3 max-md:px-4">
          Calculations <small>{templates.items.length} issued</small>
        </h2>
        <div className="columns-1 gap-10 px-6 py-4 max-md:px-4 sm:columns-2 lg:columns-3">
          {[...byCategory].map(([category, items]) => (
            <section key={category} className="mb-5 break-inside-avoid" aria-label={categoryNames[category]}>
              <h3 className="mb-1 text-[13px] text-muted">{categoryNames[category]}</h3>
              <ul>
                {items.map((template) => (
                  <li key={template.slug}>
                    <Link
                      prefetch={false}
                      href={paths.template(template.slug)}
                      className="block py-1 underline decoration-transparent underline-offset-[3px] hover:decoration-ink max-md:py-3"
                    >
                      {template.title}
                    </Link>
                  </li>
                ))}
              </ul>
            </section>
          ))}
        </div>
      </Sheet>
    </PageFrame>
  );
}
