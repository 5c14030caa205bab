import type { Metadata } from "next";
import Link from "next/link";
import { DataTable } from "@/app/_components/data-table";
import { FilterForm } from "@/app/_components/filter-form";
import { listQuery, nextAddress, pageFrom } from "@/app/_components/list-query";
import { EmptyState, PageFrame, Sheet } from "@/app/_components/page-frame";
import { requireActor } from "@/app/_components/require-actor";
import { StateMark } from "@/app/_components/state-mark";
import { SymbolText } from "@/app/_components/symbol";
import { materialClasses } from "@/lib/calculation/material";
import { paths } from "@/lib/core/paths";
import { listMaterials } from "@/lib/materials/list-materials";
import { ListMaterialsQuery, type MaterialItem } from "@/lib/materials/schemas";
import { formatSignificant } from "@/lib/units";
import { classNames, propertyLabels } from "./_components/class-names";

export const metadata: Metadata = { title: "Materials" };

export default async function MaterialsPage({
  searchParams,
}: {
  searchParams: Promise<Record<string, string | string[] | undefined>>;
}) {
  const actor = await requireActor();
  const given = await searchParams;
  const query = listQuery(ListMaterialsQuery, { limit: "100", ...given });
  const page = await pageFrom(query, (wanted) => listMaterials(actor, wanted));
  const filtered = query.search !== undefined || query.class !== undefined;
  return (
    <PageFrame title="Materials">
      <FilterForm
        fields={[
          { name: "search", label: "Name or condition", placeholder: "stone wool, copper …" },
          {
            name: "class",
            label: "Class",
            options: materialClasses.map((value) => ({ value, label: classNames[value] })),
          },
        ]}
      />
      <Sheet>
        {page.items.length === 0 ? (
          <EmptyState title={filtered ? "No material fits these filters." : "There are no materials yet."}>
            {filtered ? (
              <Link prefetch={false} href={paths.materials} className="underline">
                Show all materials
              </Link>
            ) : null}
          </EmptyState>
        ) : (
          <DataTable
            caption="Materials"
            columns={columns}
            rows={page.items}
            keyOf={(row) => row.slug}
            next={nextAddress(paths.materials, given, page.nextCursor)}
          />
        )}
      </Sheet>
    </PageFrame>
  );
}

const short = (value: number) => formatSignificant(value, 4).replace(/\.0+$/, "");

const columns = [
  {
    head: "Material",
    cell: (row: MaterialItem) => (
      <Link prefetch={false} href={paths.material(row.slug)} className="group block">
        <span className="font-[550] underline decoration-transparent underline-offset-[3px] group-hover:decoration-ink">
          {row.name}
        </span>
        <span className="block text-[13px] text-muted">{row.condition}</span>
      </Link>
    ),
  },
  {
    head: "Class",
    wide: true,
    cell: (row: MaterialItem) => <span className="text-muted">{classNames[row.class]}</span>,
  },
  {
    head: "Properties and valid range",
    cell: (row: MaterialItem) => (
      <ul className="text-[13px]">
        {Object.entries(row.properties).map(([name, range]) => (
          <li key={name} className="md:whitespace-nowrap">
            <span title={propertyLabels[name]}>
              <SymbolText symbol={name} />
              <span className="sr-only">{propertyLabels[name]}</span>
            </span>{" "}
            <span className="num ml-1 whitespace-nowrap">
              {short(range.min)} to {short(range.max)}
            </span>{" "}
            <span className="text-muted">{range.argumentUnit}</span>
            <span className="text-muted max-md:block md:ml-2">{range.basis}</span>
          </li>
        ))}
      </ul>
    ),
  },
  {
    head: "State",
    wide: true,
    cell: (row: MaterialItem) => (
      <span className="block whitespace-nowrap">
        <StateMark state={row.state} revision={row.revision} />
        {row.supplied && !row.adopted ? (
          <span className="block text-[12px] text-muted">supplied, not adopted</span>
        ) : null}
      </span>
    ),
  },
];
