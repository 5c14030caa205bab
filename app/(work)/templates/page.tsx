import type { Metadata } from "next";
import Link from "next/link";
import { DataTable } from "@/app/_components/data-table";
import { FilterForm } from "@/app/_components/filter-form";
import { listQuery, nextAddress, pageFrom } from "@/app/_components/list-query";
import { EmptyState, PageFrame, Sheet } from "@/app/_components/page-frame";
import { requireActor } from "@/app/_components/require-actor";
import { StateMark } from "@/app/_components/state-mark";
import { dayText } from "@/app/_components/time-text";
import { categories } from "@/lib/calculation/definition";
import { paths } from "@/lib/core/paths";
import { listTemplates } from "@/lib/templates/list-templates";
import { ListTemplatesQuery, type TemplateItem } from "@/lib/templates/schemas";
import { categoryNames } from "./_components/category-names";

export const metadata: Metadata = { title: "Templates" };

const states = [
  { value: "issued", label: "Issued" },
  { value: "superseded", label: "Superseded" },
  { value: "withdrawn", label: "Withdrawn" },
];

export default async function TemplatesPage({
  searchParams,
}: {
  searchParams: Promise<Record<string, string | string[] | undefined>>;
}) {
  const actor = await requireActor();
  const given = await searchParams;
  const query = listQuery(ListTemplatesQuery, { limit: "100", ...given });
  const page = await pageFrom(query, (wanted) => listTemplates(actor, wanted));
  const filtered = query.search !== undefined || query.category !== undefined || query.state !== undefined;
  return (
    <PageFrame title="Templates">
      <FilterForm
        fields={[
          { name: "search", label: "Title, tag, symbol or quantity", placeholder: "pipe, fin, T_surface …" },
          {
            name: "category",
            label: "Category",
            options: categories.map((value) => ({ value, label: categoryNames[value] })),
          },
          { name: "state", label: "State", options: states },
        ]}
      />
      <Sheet>
        {page.items.length === 0 ? (
          <EmptyState title={filtered ? "No template fits these filters." : "There are no templates yet."}>
            {filtered ? (
              <Link prefetch={false} href={paths.templates} className="underline">
                Show all templates
              </Link>
            ) : (
              "A senior engineer writes the first one."
            )}
          </EmptyState>
        ) : (
          <DataTable
            caption="Templates"
            columns={columns}
            rows={page.items}
            keyOf={(row) => row.slug}
            next={nextAddress(paths.templates, given, page.nextCursor)}
          />
        )}
      </Sheet>
    </PageFrame>
  );
}

const columns = [
  {
    head: "Template",
    cell: (row: TemplateItem) => (
      <Link prefetch={false} href={paths.template(row.slug)} className="group block">
        <span className="font-[550] underline decoration-transparent underline-offset-[3px] group-hover:decoration-ink">
          {row.title}
        </span>
        <span className="block text-[13px] text-muted">{firstSentence(row.summary)}</span>
      </Link>
    ),
  },
  {
    head: "Category",
    wide: true,
    cell: (row: TemplateItem) => (
      <span className="whitespace-nowrap text-muted">{categoryNames[row.category]}</span>
    ),
  },
  {
    head: "State",
    cell: (row: TemplateItem) => (
      <span className="block whitespace-nowrap">
        <StateMark state={row.state} revision={row.revision} />
        {row.supplied && !row.adopted ? (
          <span className="block text-[12px] text-muted">supplied, not adopted</span>
        ) : null}
      </span>
    ),
  },
  {
    head: "Issued",
    wide: true,
    cell: (row: TemplateItem) => (
      <span className="whitespace-nowrap text-[13px] text-muted">
        {row.issuedAt ? dayText(row.issuedAt) : "\u2013"}
        <span className="block">{row.issuedBy?.name}</span>
      </span>
    ),
  },
  {
    head: "Verify by",
    wide: true,
    cell: (row: TemplateItem) => (
      <span className="whitespace-nowrap text-[13px] text-muted">
        {row.verifyBy ? dayText(row.verifyBy) : "\u2013"}
      </span>
    ),
  },
  {
    head: "Runs, 30 days",
    wide: true,
    right: true,
    cell: (row: TemplateItem) => <span className="num">{row.runsLast30Days}</span>,
  },
];

function firstSentence(markdown: string): string {
  const plain = markdown.replace(/[*`#>]/g, "").trim();
  const end = /[.!?](\s|$)/.exec(plain);
  const sentence = end ? plain.slice(0, end.index + 1) : plain;
  return sentence.length > 160 ? `${sentence.slice(0, 157)}…` : sentence;
}
