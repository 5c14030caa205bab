import type { ButtonHTMLAttributes, ReactNode } from "react";
import Link from "next/link";

type Tone = "plain" | "main" | "fault";

const tones: Record<Tone, string> = {
  plain: "border-rule bg-sheet text-ink hover:border-ink",
  main: "border-ink bg-ink text-sheet hover:opacity-90",
  fault: "border-fault bg-sheet text-fault hover:bg-fault hover:text-sheet",
};

const shape =
  "inline-flex min-h-9 items-center justify-center gap-2 rounded border px-3.5 text-sm font-[550] leading-5 no-underline disabled:opacity-45 max-md:min-h-11";

interface ButtonProps extends ButtonHTMLAttributes<HTMLButtonElement> {
  tone?: Tone;
}

export function Button({ tone = "plain", className = "", type = "button", ...rest }: ButtonProps) {
  return <button type={type} className={`${shape} ${tones[tone]} ${className}`} {...rest} />;
}

/** A link that looks like a button, for going somewhere rather than doing something. */
export function ButtonLink({
  href,
  tone = "plain",
  children,
}: {
  href: string;
  tone?: Tone;
  children: ReactNode;
}) {
  return (
    <Link href={href} className={`${shape} ${tones[tone]}`}>
      {children}
    </Link>
  );
}

/** A quiet action inside a pane. */
export function TextButton({
  className = "",
  type = "button",
  ...rest
}: ButtonHTMLAttributes<HTMLButtonElement>) {
  return (
    <button
      type={type}
      className={`min-h-6 text-[13px] underline decoration-rule underline-offset-[3px] hover:decoration-ink disabled:text-muted max-md:min-h-11 max-md:min-w-11 ${className}`}
      {...rest}
    />
  );
}
