import type { SystemActor } from "@/lib/access/actor";

export const seeding: SystemActor = { kind: "system", reason: "seed" };
