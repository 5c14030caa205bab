import "server-only";
import { createHmac } from "node:crypto";
import { count } from "drizzle-orm";
import { reader, type Readable } from "@/db/client";
import { people } from "@/db/schema/people";
import { write } from "@/db/tx";
import { hashPassword } from "@/lib/access/password";
import { equalInConstantTime } from "@/lib/core/crypto";
import { env } from "@/lib/core/env";
import { CodedError } from "@/lib/core/errors";
import { parseInput } from "@/lib/core/parse";
import { insertPerson, refuseWeakPassword, type PersonReply } from "./create-person";
import { SetUpInput } from "./schemas";

const alphabet = "23456789ABCDEFGHJKLMNPQRSTUVWXYZ";

/**
 * Code that makes the first person: 100 bits derived from AUTH_SECRET, so that every instance knows it, nothing is
 * stored, and only who can read the log can use it. Worth nothing once there is a person.
 */
export function setUpCode(): string {
  const bytes = createHmac("sha256", env().AUTH_SECRET).update("set-up code of the first person").digest();
  const letters = [...bytes.subarray(0, 20)].map((byte) => alphabet[byte % 32]).join("");
  return letters.replace(/(.{5})(?=.)/g, "$1-");
}

/** Whether this installation still waits for its first person. */
export async function needsFirstPerson(db: Readable = reader()): Promise<boolean> {
  const [row] = await db.select({ n: count() }).from(people);
  return row?.n === 0;
}

/**
 * Makes the first person: senior engineer and administrator, who can then invite the others. Open to whoever has the
 * set-up code. Throws `state-conflict` when there are people already, `invalid-input` for a wrong code or weak password.
 */
export async function setUpFirstPerson(input: SetUpInput): Promise<PersonReply> {
  const { code, password, ...person } = parseInput(SetUpInput, input);
  const letters = (text: string) => text.toUpperCase().replace(/[^A-Z0-9]/g, "");
  if (!equalInConstantTime(letters(code), letters(setUpCode()))) {
    throw CodedError.from([
      {
        pointer: "#/code",
        code: "invalid-input",
        message: "This is not the set-up code. It stands in the log of the server, after “set-up code”.",
      },
    ]);
  }
  refuseWeakPassword(password, person);
  const passwordHash = await hashPassword(password);
  return write(async (tx) => {
    if (!(await needsFirstPerson(tx))) {
      throw new CodedError(
        "state-conflict",
        "There is a first person already. Ask an administrator for an invitation.",
      );
    }
    return insertPerson(
      tx,
      { kind: "system", reason: "set-up code" },
      { ...person, role: "senior", isAdmin: true, passwordHash },
    );
  });
}
