"use client";

import { useRouter } from "next/navigation";
import { useEffect, useRef, type FormEvent } from "react";

/** Search over templates from any page; `/` leads to it. */
export function FindBox() {
  const router = useRouter();
  const input = useRef<HTMLInputElement>(null);

  useEffect(() => {
    const onKey = (event: KeyboardEvent) => {
      const target = event.target as HTMLElement | null;
      const typing = target?.closest("input, textarea, select, [contenteditable=true]");
      if (event.key !== "/" || typing || event.ctrlKey || event.metaKey || event.altKey) return;
      event.preventDefault();
      input.current?.focus();
    };
    window.addEventListener("keydown", onKey);
    return () => window.removeEventListener("keydown", onKey);
  }, []);

  const submit = (event: FormEvent) => {
    event.preventDefault();
    const text = input.current?.value.trim() ?? "";
    router.push(text === "" ? "/templates" : `/templates?search=${encodeURIComponent(text)}`);
  };

  return (
    <form
      role="search"
      onSubmit={submit}
      className="relative min-w-0 flex-1 md:ml-auto md:w-[232px] md:flex-none"
    >
      <input
        ref={input}
        type="search"
        name="search"
        maxLength={100}
        aria-label="Find a calculation"
        aria-keyshortcuts="/"
        placeholder="Find a calculation"
        className="h-8 w-full rounded border border-(--field-rule) bg-field px-2.5 placeholder:text-muted max-md:h-11 max-md:px-2 [&::-webkit-search-cancel-button]:appearance-none"
      />
      <kbd
        aria-hidden="true"
        className="pointer-events-none absolute right-2 top-1.5 hidden rounded border border-rule px-[5px] font-mono text-[11px] font-medium leading-4 text-muted md:block"
      >
        /
      </kbd>
    </form>
  );
}
