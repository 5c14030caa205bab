import "server-only";
import { eq } from "drizzle-orm";
import { reader } from "@/db/client";
import { settings } from "@/db/schema/system";
import { isDemoDatabase } from "@/lib/access/installation";

export interface Installation {
  /** Legal owner in title blocks. */
  name: string;
  demo: boolean;
}

/** Whose installation this is. */
export async function installation(): Promise<Installation> {
  const [demo, rows] = await Promise.all([
    isDemoDatabase(),
    reader().select({ value: settings.value }).from(settings).where(eq(settings.key, "works-name")).limit(1),
  ]);
  return { name: rows[0]?.value ?? (demo ? "Tarn Bridge works" : "Coldface"), demo };
}
