import "server-only";
import type { Actor } from "@/lib/access/actor";
import type { Definition } from "@/lib/calculation/definition";
import { pageLimits } from "@/lib/core/paging";
import { listMaterials } from "@/lib/materials/list-materials";
import { getMaterial } from "@/lib/materials/get-material";
import { formatSignificant } from "@/lib/units";
import type { MaterialChoice } from "./_components/material-choice";

/** Materials that the form offers, with range, service limit and source; none are read for a template without them. */
export async function materialChoices(actor: Actor, definition: Definition): Promise<MaterialChoice[]> {
  const uses = definition.inputs.some(
    (input) =>
      input.kind === "material" ||
      (input.kind === "table" && input.columns.some((column) => column.kind === "material")),
  );
  if (!uses) return [];
  const page = await listMaterials(actor, { limit: pageLimits.most });
  return Promise.all(
    page.items.map(async (item) => {
      const { definition: material } = (await getMaterial(actor, { slug: item.slug })).current;
      const short = (value: number) => formatSignificant(value, 4).replace(/\.0+$/, "");
      const first = Object.values(material.properties)[0];
      return {
        slug: item.slug,
        name: item.name,
        class: item.class,
        properties: Object.keys(item.properties),
        ranges: Object.fromEntries(
          Object.entries(item.properties).map(([name, range]) => [
            name,
            `${short(range.min)} to ${short(range.max)} ${range.argumentUnit}`,
          ]),
        ),
        service: serviceText(material.service),
        source: material.properties.k?.source ?? first?.source ?? "",
      };
    }),
  );
}

type Service = NonNullable<Awaited<ReturnType<typeof getMaterial>>["current"]["definition"]["service"]>;

function serviceText(service: Service | undefined): string | null {
  if (!service) return null;
  const { min, max } = service;
  if (min && max) return `${min.value} ${min.unit} to ${max.value} ${max.unit}`;
  if (max) return `up to ${max.value} ${max.unit}`;
  return min ? `from ${min.value} ${min.unit}` : null;
}
