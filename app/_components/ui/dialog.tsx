"use client";

import { Dialog as Primitive } from "radix-ui";
import type { ReactNode } from "react";

interface DialogProps {
  open: boolean;
  onOpenChange: (open: boolean) => void;
  trigger?: ReactNode;
  title: string;
  description?: ReactNode;
  children: ReactNode;
}

/** One window over the page: titled, closed by Escape, focus kept inside and given back. */
export function Dialog({ open, onOpenChange, trigger, title, description, children }: DialogProps) {
  return (
    <Primitive.Root open={open} onOpenChange={onOpenChange}>
      {trigger ? <Primitive.Trigger asChild>{trigger}</Primitive.Trigger> : null}
      <Primitive.Portal>
        <Primitive.Overlay className="fixed inset-0 z-40 bg-[rgb(15_23_28/0.55)]" />
        <Primitive.Content
          aria-describedby={description ? undefined : ""}
          className="fixed left-1/2 top-[8vh] z-50 max-h-[84vh] w-[min(600px,calc(100vw-32px))] -translate-x-1/2 overflow-auto rounded border border-ink bg-sheet p-6 outline-none max-md:p-4"
        >
          <Primitive.Title className="text-lg leading-6 font-[620]">{title}</Primitive.Title>
          {description ? (
            <Primitive.Description className="mt-1 text-muted">{description}</Primitive.Description>
          ) : null}
          <div className="mt-4">{children}</div>
        </Primitive.Content>
      </Primitive.Portal>
    </Primitive.Root>
  );
}
