import type { Metadata, Viewport } from "next";
import { headers } from "next/headers";
import type { ReactNode } from "react";
import { Providers } from "@/components/layout/providers";
import { fontVariables } from "./fonts";
import "./globals.css";

export const metadata: Metadata = {
  title: { default: "Saddlemark", template: "%s · Saddlemark" },
  description: "Solver advice for saddle-point systems of mixed finite and virtual elements, checked against a team's own record.",
};

export const viewport: Viewport = {
  width: "device-width",
  initialScale: 1,
  themeColor: [
    { media: "(prefers-color-scheme: light)", color: "#F7F4EA" },
    { media: "(prefers-color-scheme: dark)", color: "#11191B" },
  ],
};

/** Reading the nonce makes every page dynamic, which it must be: a page built beforehand has no nonce in its scripts. */
export default async function RootLayout({ children }: { children: ReactNode }) {
  const nonce = (await headers()).get("x-nonce") ?? undefined;
  return (
    <html lang="en" className={fontVariables} suppressHydrationWarning>
      <body className="bg-paper font-sans text-ink antialiased">
        <Providers nonce={nonce}>{children}</Providers>
      </body>
    </html>
  );
}
