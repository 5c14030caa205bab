"use client";

import { useId, type InputHTMLAttributes, type TextareaHTMLAttributes } from "react";

interface Shared {
  label: string;
  hint?: string;
  fault?: string;
}

const box = "w-full rounded border bg-field px-2.5";

function Frame({ id, label, hint, fault, children }: Shared & { id: string; children: React.ReactNode }) {
  return (
    <div className="mb-3">
      <label htmlFor={id} className="mb-1 block font-[550]">
        {label}
      </label>
      {children}
      <div id={`${id}-note`} className="mt-1 text-[12px] leading-4">
        {fault ? <p className="text-fault">{fault}</p> : null}
        {hint ? <p className="text-muted">{hint}</p> : null}
      </div>
    </div>
  );
}

/** A labelled line of text with its hint and its fault. */
export function TextField({
  label,
  hint,
  fault,
  className = "",
  ...rest
}: Shared & InputHTMLAttributes<HTMLInputElement>) {
  const id = useId();
  return (
    <Frame id={id} label={label} hint={hint} fault={fault}>
      <input
        id={id}
        aria-invalid={fault ? true : undefined}
        aria-describedby={`${id}-note`}
        className={`${box} h-9 max-md:h-11 ${fault ? "border-fault" : "border-(--field-rule)"} ${className}`}
        {...rest}
      />
    </Frame>
  );
}

/** The same for several lines. */
export function TextArea({
  label,
  hint,
  fault,
  className = "",
  ...rest
}: Shared & TextareaHTMLAttributes<HTMLTextAreaElement>) {
  const id = useId();
  return (
    <Frame id={id} label={label} hint={hint} fault={fault}>
      <textarea
        id={id}
        aria-invalid={fault ? true : undefined}
        aria-describedby={`${id}-note`}
        rows={3}
        className={`${box} py-2 ${fault ? "border-fault" : "border-(--field-rule)"} ${className}`}
        {...rest}
      />
    </Frame>
  );
}
