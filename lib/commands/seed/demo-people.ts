import { inArray } from "drizzle-orm";
import type { Tx } from "@/db/client";
import { people } from "@/db/schema/people";
import { hashPassword } from "@/lib/access/password";
import { permit } from "@/lib/access/permit";
import { insertPerson, type PersonReply } from "@/lib/people/create-person";
import { seeding } from "./seeding";

/** People of the fictitious works Tarn Bridge, named by role. Their passwords are published on purpose. */
export const demoPeople = [
  {
    email: "admin@tarnbridge.example",
    name: "Administrator",
    role: "reader",
    isAdmin: true,
    password: "tarn-bridge-administrator",
  },
  {
    email: "senior@tarnbridge.example",
    name: "Senior engineer, utilities",
    role: "senior",
    isAdmin: false,
    password: "tarn-bridge-senior",
  },
  {
    email: "checker@tarnbridge.example",
    name: "Senior engineer, furnaces",
    role: "senior",
    isAdmin: false,
    password: "tarn-bridge-checker",
  },
  {
    email: "engineer@tarnbridge.example",
    name: "Engineer",
    role: "engineer",
    isAdmin: false,
    password: "tarn-bridge-engineer",
  },
  {
    email: "reader@tarnbridge.example",
    name: "Reader",
    role: "reader",
    isAdmin: false,
    password: "tarn-bridge-reader",
  },
] as const;

/** Hashes that take a moment, made before the transaction begins. */
export function demoPasswordHashes(): Promise<string[]> {
  return Promise.all(demoPeople.map((person) => hashPassword(person.password)));
}

export async function insertDemoPeople(tx: Tx, hashes: readonly string[]): Promise<PersonReply[]> {
  const permitted = permit(seeding, "person.create");
  const made: PersonReply[] = [];
  for (const [at, { password: _published, ...person }] of demoPeople.entries()) {
    made.push(await insertPerson(tx, permitted, { ...person, passwordHash: hashes[at] ?? null }));
  }
  return made;
}

/** The two seniors who sign for what is supplied in the demo works. */
export async function demoSeniors(tx: Tx): Promise<string[]> {
  const seniors = demoPeople.filter((person) => person.role === "senior").map((person) => person.email);
  const rows = await tx.select({ id: people.id }).from(people).where(inArray(people.email, seniors));
  return rows.map((row) => row.id);
}
