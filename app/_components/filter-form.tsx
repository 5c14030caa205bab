"use client";

import { useRouter, usePathname, useSearchParams } from "next/navigation";
import { useId, type FormEvent } from "react";
import { Button } from "./ui/button";

export interface FilterField {
  name: string;
  label: string;
  /** Without options it is a text. */
  options?: readonly { value: string; label: string }[];
  placeholder?: string;
}

/** Filters of a list page, kept in its address so that a list can be sent to somebody. */
export function FilterForm({ fields }: { fields: readonly FilterField[] }) {
  const router = useRouter();
  const path = usePathname();
  const present = useSearchParams();
  const id = useId();
  const apply = (form: HTMLFormElement) => {
    const wanted = new URLSearchParams();
    for (const [name, value] of new FormData(form))
      if (typeof value === "string" && value.trim() !== "") wanted.set(name, value.trim());
    router.push(wanted.size === 0 ? path : `${path}?${wanted.toString()}`);
  };
  const submit = (event: FormEvent<HTMLFormElement>) => {
    event.preventDefault();
    apply(event.currentTarget);
  };
  return (
    <form
      key={present.toString()}
      onSubmit={submit}
      role="search"
      aria-label="Filter the list"
      className="mb-4 flex flex-wrap items-end gap-3 max-md:px-4"
    >
      {fields.map((field) => (
        <div
          key={field.name}
          className={`min-w-0 ${field.options ? "max-md:w-[calc(50%-6px)]" : "max-md:w-full"}`}
        >
          <label htmlFor={`${id}${field.name}`} className="mb-1 block text-[12px] text-muted">
            {field.label}
          </label>
          {field.options ? (
            <select
              id={`${id}${field.name}`}
              name={field.name}
              defaultValue={present.get(field.name) ?? ""}
              onChange={(event) => event.target.form && apply(event.target.form)}
              className="h-9 min-w-44 rounded border border-(--field-rule) bg-field pl-2 pr-6 max-md:h-11 max-md:min-w-0 max-md:w-full"
            >
              <option value="">all</option>
              {field.options.map((option) => (
                <option key={option.value} value={option.value}>
                  {option.label}
                </option>
              ))}
            </select>
          ) : (
            <input
              id={`${id}${field.name}`}
              name={field.name}
              defaultValue={present.get(field.name) ?? ""}
              placeholder={field.placeholder}
              maxLength={100}
              className="h-9 w-64 rounded border border-(--field-rule) bg-field px-2.5 placeholder:text-muted max-md:h-11 max-md:w-full"
            />
          )}
        </div>
      ))}
      <Button type="submit">Find</Button>
    </form>
  );
}
