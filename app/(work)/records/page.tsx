import type { Metadata } from "next";
import Link from "next/link";
import { DataTable } from "@/app/_components/data-table";
import { FilterForm } from "@/app/_components/filter-form";
import { keeperText } from "@/app/_components/keeper-text";
import { listQuery, nextAddress, pageFrom } from "@/app/_components/list-query";
import { EmptyState, PageFrame, Sheet } from "@/app/_components/page-frame";
import { requireActor } from "@/app/_components/require-actor";
import { StatusMark } from "@/app/_components/status-mark";
import { momentText } from "@/app/_components/time-text";
import { paths } from "@/lib/core/paths";
import { listRecords } from "@/lib/records/list-records";
import { ListRecordsQuery, type RecordItem } from "@/lib/records/schemas";

export const metadata: Metadata = { title: "Records" };

const filters = ["search", "template", "tag", "status", "owner", "voided"] as const;

export default async function RecordsPage({
  searchParams,
}: {
  searchParams: Promise<Record<string, string | string[] | undefined>>;
}) {
  const actor = await requireActor();
  const given = await searchParams;
  const query = listQuery(ListRecordsQuery, given);
  const page = await pageFrom(query, (wanted) => listRecords(actor, wanted));
  const filtered = filters.some((name) => query[name] !== undefined);
  return (
    <PageFrame title="Records">
      <FilterForm
        fields={[
          { name: "search", label: "Title or number", placeholder: "R-000001" },
          { name: "tag", label: "Tag", placeholder: "equipment number" },
          {
            name: "status",
            label: "Status",
            options: [
              { value: "ok", label: "No limit broken" },
              { value: "caution", label: "Caution" },
              { value: "stop", label: "Stop limit broken" },
            ],
          },
          { name: "owner", label: "Kept by", options: [{ value: "me", label: "me" }] },
        ]}
      />
      <Sheet>
        {page.items.length === 0 ? (
          <EmptyState title={filtered ? "No record fits these filters." : "No run has been kept yet."}>
            {filtered ? (
              <Link prefetch={false} href={paths.records} className="underline">
                Show all records
              </Link>
            ) : (
              <>
                Open a{" "}
                <Link prefetch={false} href={paths.templates} className="underline">
                  template
                </Link>
                , fill its form and press “Keep record”.
              </>
            )}
          </EmptyState>
        ) : (
          <DataTable
            caption="Records"
            columns={columns}
            rows={page.items}
            keyOf={(row) => row.number}
            next={nextAddress(paths.records, given, page.nextCursor)}
          />
        )}
      </Sheet>
    </PageFrame>
  );
}

const columns = [
  {
    head: "Record",
    cell: (row: RecordItem) => (
      <Link prefetch={false} href={paths.record(row.number)} className="group block">
        <span className="num whitespace-nowrap font-medium underline decoration-transparent underline-offset-[3px] group-hover:decoration-ink">
          {row.number}
        </span>
        <span className="block text-[13px]">{row.title}</span>
      </Link>
    ),
  },
  {
    head: "Template",
    cell: (row: RecordItem) => (
      <span>
        {row.templateTitle}
        <span className="block text-[13px] text-muted">revision {row.revision}</span>
      </span>
    ),
  },
  { head: "Status", cell: (row: RecordItem) => <StatusMark status={row.status} voided={row.voided} /> },
  {
    head: "Tags",
    wide: true,
    cell: (row: RecordItem) => <span className="text-[13px] text-muted">{row.tags.join(", ")}</span>,
  },
  {
    head: "Kept",
    wide: true,
    cell: (row: RecordItem) => (
      <span className="whitespace-nowrap text-[13px] text-muted">
        {momentText(row.createdAt)}
        <span className="block">{keeperText(row.createdBy)}</span>
      </span>
    ),
  },
];
