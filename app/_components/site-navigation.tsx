"use client";

import { DropdownMenu } from "radix-ui";
import { Menu } from "lucide-react";
import Link from "next/link";
import { usePathname } from "next/navigation";

const places = [
  { href: "/", label: "Home" },
  { href: "/templates", label: "Templates" },
  { href: "/materials", label: "Materials" },
  { href: "/records", label: "Records" },
  { href: "/interfaces", label: "Interfaces" },
] as const;

function isHere(href: string, path: string): boolean {
  return href === "/" ? path === "/" : path === href || path.startsWith(`${href}/`);
}

/** Places along the top; on a narrow screen the same places in a menu. */
export function SiteNavigation() {
  const path = usePathname();
  return (
    <>
      <nav aria-label="Main" className="hidden h-full gap-6 md:flex">
        {places.map((place) => (
          <Link
            key={place.href}
            href={place.href}
            aria-current={isHere(place.href, path) ? "page" : undefined}
            className="flex items-center border-y-2 border-transparent text-muted hover:text-ink aria-[current]:border-b-ink aria-[current]:font-[550] aria-[current]:text-ink"
          >
            {place.label}
          </Link>
        ))}
      </nav>
      <DropdownMenu.Root modal={false}>
        <DropdownMenu.Trigger
          className="inline-flex size-11 items-center justify-center rounded border border-rule md:hidden"
          aria-label="Menu"
        >
          <Menu size={18} aria-hidden="true" />
        </DropdownMenu.Trigger>
        <DropdownMenu.Content
          align="start"
          sideOffset={4}
          className="z-40 min-w-52 rounded border border-ink bg-sheet p-1"
        >
          {places.map((place) => (
            <DropdownMenu.Item key={place.href} asChild>
              <Link
                href={place.href}
                aria-current={isHere(place.href, path) ? "page" : undefined}
                className="flex min-h-11 items-center px-3 outline-none data-[highlighted]:bg-film aria-[current]:font-[620]"
              >
                {place.label}
              </Link>
            </DropdownMenu.Item>
          ))}
        </DropdownMenu.Content>
      </DropdownMenu.Root>
    </>
  );
}
