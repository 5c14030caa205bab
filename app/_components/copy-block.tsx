"use client";

import { useState } from "react";
import { TextButton } from "./ui/button";

/** A text to take away, with a button that copies it. */
export function CopyBlock({ text, label }: { text: string; label: string }) {
  const [said, setSaid] = useState("");
  const copy = async () => {
    try {
      await navigator.clipboard.writeText(text);
      setSaid("Copied.");
    } catch {
      setSaid("The browser did not allow copying. Select the text instead.");
    }
  };
  return (
    <div className="min-w-0">
      <div className="mb-1 flex items-baseline justify-between gap-4">
        <span className="text-[12px] text-muted">{label}</span>
        <span className="flex gap-3 text-[12px]">
          <span role="status" className="text-muted">
            {said}
          </span>
          <TextButton onClick={() => void copy()}>Copy</TextButton>
        </span>
      </div>
      <pre
        tabIndex={0}
        aria-label={label}
        className="num max-h-[50vh] overflow-auto rounded border border-rule bg-field p-3 text-[12.5px] leading-5"
      >
        {text}
      </pre>
    </div>
  );
}
