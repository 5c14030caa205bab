import type { ReactNode } from "react";

/** The one grid of every page: crumb, heading with state and actions, content. */
export function PageFrame({
  crumb,
  title,
  meta,
  actions,
  children,
}: {
  crumb?: ReactNode;
  title: ReactNode;
  meta?: ReactNode;
  actions?: ReactNode;
  children: ReactNode;
}) {
  return (
    <main
      id="main"
      tabIndex={-1}
      className="mx-auto max-w-page px-8 pb-12 pt-6 outline-none max-md:px-0 max-md:pb-24 max-md:pt-4"
    >
      {crumb ? <div className="text-[13px] text-muted max-md:px-4">{crumb}</div> : null}
      <div className="mb-5 mt-0.5 flex flex-wrap items-end gap-x-6 gap-y-2 max-md:mb-4 max-md:px-4">
        <div className="min-w-0">
          <h1>{title}</h1>
          {meta ? <div className="mt-1.5 flex flex-wrap items-center gap-x-3.5 gap-y-1">{meta}</div> : null}
        </div>
        {actions ? (
          <div className="ml-auto flex flex-wrap gap-2 max-md:ml-0 max-md:mt-1 max-md:w-full">{actions}</div>
        ) : null}
      </div>
      {children}
    </main>
  );
}

/** A bordered sheet on the film. */
export function Sheet({ children, className = "" }: { children: ReactNode; className?: string }) {
  return (
    <section className={`border border-rule bg-sheet max-md:border-x-0 ${className}`}>{children}</section>
  );
}

/** What a page says when it has nothing to show: what would stand here and the next step. */
export function EmptyState({ title, children }: { title: string; children?: ReactNode }) {
  return (
    <div className="max-w-prose px-6 py-8 max-md:px-4">
      <p className="font-[620]">{title}</p>
      {children ? <div className="mt-1 text-muted">{children}</div> : null}
    </div>
  );
}
