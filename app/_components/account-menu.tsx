"use client";

import { UserRound } from "lucide-react";
import { DropdownMenu } from "radix-ui";
import { signOut } from "next-auth/react";
import { chooseScheme } from "./scheme";

interface AccountMenuProps {
  name: string;
  email: string;
  role: string;
}

const item =
  "flex min-h-9 w-full items-center px-3 text-left outline-none data-[highlighted]:bg-film max-md:min-h-11";

/** Who is signed in, the colour scheme, and the way out. */
export function AccountMenu({ name, email, role }: AccountMenuProps) {
  return (
    <DropdownMenu.Root modal={false}>
      <DropdownMenu.Trigger
        className="inline-flex min-h-8 items-center justify-center whitespace-nowrap rounded px-1 text-muted hover:text-ink max-md:size-11"
        aria-label={`Account of ${name}, ${role}`}
      >
        <UserRound size={18} aria-hidden="true" className="md:hidden" />
        <span className="max-md:hidden">{role}</span>
      </DropdownMenu.Trigger>
      <DropdownMenu.Content
        align="end"
        sideOffset={6}
        className="z-40 w-64 rounded border border-ink bg-sheet p-1"
      >
        <div className="border-b border-soft px-3 pb-2 pt-1.5">
          <p className="font-[620]">{name}</p>
          <p className="break-all text-[13px] text-muted">{email}</p>
          <p className="text-[13px] text-muted md:hidden">{role}</p>
        </div>
        <DropdownMenu.Label className="px-3 pb-1 pt-2 text-[11px] text-muted">Colours</DropdownMenu.Label>
        <DropdownMenu.Item className={item} onSelect={() => chooseScheme("light")}>
          Light
        </DropdownMenu.Item>
        <DropdownMenu.Item className={item} onSelect={() => chooseScheme("dark")}>
          Dark, for control rooms
        </DropdownMenu.Item>
        <DropdownMenu.Item className={item} onSelect={() => chooseScheme("system")}>
          As the device
        </DropdownMenu.Item>
        <DropdownMenu.Separator className="my-1 border-t border-soft" />
        <DropdownMenu.Item className={item} onSelect={() => void signOut({ callbackUrl: "/sign-in" })}>
          Sign out
        </DropdownMenu.Item>
      </DropdownMenu.Content>
    </DropdownMenu.Root>
  );
}
