import type { ReactNode } from "react";
import { Wordmark } from "@/app/_components/wordmark";

export default function FrontLayout({ children }: { children: ReactNode }) {
  return (
    <div className="mx-auto flex min-h-dvh max-w-[400px] flex-col justify-center px-4 py-10">
      <header className="mb-6">
        <Wordmark />
      </header>
      <main className="border border-rule bg-sheet p-6">{children}</main>
      <footer className="mt-4 text-[13px] text-muted">
        Calculations support engineering judgement. Local codes and licensed practice govern.
      </footer>
    </div>
  );
}
