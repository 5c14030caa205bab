import { prepareConnections } from "@/db/client";
import { isDemoDatabase } from "@/lib/access/installation";
import { env } from "@/lib/core/env";
import { needsFirstPerson, setUpCode } from "@/lib/people/set-up-first-person";
import { demoPeople } from "./seed/demo-people";
import { runCommand, say } from "./terminal";

/** Says how to sign in: the demo's accounts, or the set-up code of an installation without people. */
await runCommand(async () => {
  await prepareConnections();
  if (await isDemoDatabase()) {
    say("\nDemo works. Sign in as:");
    for (const person of demoPeople) {
      say(`  ${person.email.padEnd(31)} ${person.password.padEnd(25)} ${person.name}`);
    }
  } else if (await needsFirstPerson()) {
    say(`\nOpen ${env().PUBLIC_URL}/set-up to make the first person. Set-up code: ${setUpCode()}`);
  }
});
