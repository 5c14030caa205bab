import Link from "next/link";
import type { ReactNode } from "react";
import { AccountMenu } from "@/app/_components/account-menu";
import { FindBox } from "@/app/_components/find-box";
import { QueryProvider } from "@/app/_components/query-provider";
import { requireActor } from "@/app/_components/require-actor";
import { SiteNavigation } from "@/app/_components/site-navigation";
import { Wordmark } from "@/app/_components/wordmark";
import { installation } from "@/lib/people/installation";

export default async function WorkLayout({ children }: { children: ReactNode }) {
  const actor = await requireActor();
  const works = await installation();
  return (
    <QueryProvider>
      <header>
        <a
          href="#main"
          className="sr-only focus:not-sr-only focus:absolute focus:left-2 focus:top-2 focus:z-50 focus:bg-sheet focus:p-2"
        >
          To the content
        </a>
        {works.demo ? (
          <p className="border-b border-rule bg-film px-8 py-1 text-[12px] leading-4 text-muted max-md:px-4">
            Demonstration data of a fictitious works. Not for design use.
          </p>
        ) : null}
        <div className="flex h-12 items-center gap-8 border-b border-rule bg-sheet px-8 max-lg:gap-5 max-md:h-14 max-md:gap-2 max-md:px-4">
          <Link href="/" aria-label="Coldface, home">
            <Wordmark />
          </Link>
          <SiteNavigation />
          <FindBox />
          <AccountMenu
            name={actor.name}
            email={actor.email}
            role={actor.isAdmin && actor.role === "reader" ? "administrator" : actor.role}
          />
        </div>
      </header>
      {children}
    </QueryProvider>
  );
}
