import type { Metadata, Viewport } from "next";
import { headers } from "next/headers";
import { connection } from "next/server";
import type { ReactNode } from "react";
import { firstPaintScript } from "./_components/scheme";
import { SchemeFollower } from "./_components/scheme-follower";
import { archivo, greek, mono } from "./fonts";
import "./globals.css";
import "katex/dist/katex.min.css";

export const metadata: Metadata = {
  title: { default: "Coldface", template: "%s – Coldface" },
  description:
    "Vetted, reusable heat-conduction calculations: run them, keep signed records, call them over REST.",
};

export const viewport: Viewport = {
  width: "device-width",
  initialScale: 1,
  themeColor: [
    { media: "(prefers-color-scheme: light)", color: "#ffffff" },
    { media: "(prefers-color-scheme: dark)", color: "#162128" },
  ],
};

export default async function RootLayout({ children }: { children: ReactNode }) {
  // Pages are never prerendered: a nonce belongs to one answer.
  await connection();
  const nonce = (await headers()).get("x-nonce") ?? undefined;
  return (
    <html
      lang="en"
      className={`${archivo.variable} ${mono.variable} ${greek.variable}`}
      suppressHydrationWarning
    >
      <head>
        <script
          nonce={nonce}
          suppressHydrationWarning
          dangerouslySetInnerHTML={{ __html: firstPaintScript }}
        />
      </head>
      <body>
        <SchemeFollower />
        {children}
      </body>
    </html>
  );
}
