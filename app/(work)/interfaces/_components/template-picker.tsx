"use client";

import { useRouter } from "next/navigation";
import { useId } from "react";
import { paths } from "@/lib/core/paths";

/** Which template the example calls. */
export function TemplatePicker({
  chosen,
  templates,
}: {
  chosen: string;
  templates: readonly { slug: string; title: string }[];
}) {
  const router = useRouter();
  const id = useId();
  return (
    <div className="mb-4">
      <label htmlFor={id} className="mb-1 block text-[12px] text-muted">
        Template
      </label>
      <select
        id={id}
        value={chosen}
        onChange={(event) =>
          router.replace(`${paths.interfaces}?template=${encodeURIComponent(event.target.value)}`, {
            scroll: false,
          })
        }
        className="h-9 w-full max-w-md rounded border border-(--field-rule) bg-field pl-2 pr-6 max-md:h-11"
      >
        {templates.map((template) => (
          <option key={template.slug} value={template.slug} className="bg-sheet text-ink">
            {template.title}
          </option>
        ))}
      </select>
    </div>
  );
}
